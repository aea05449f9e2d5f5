/** One power law, anchored inside the interval it is used on: level · (x/at)^(−exponent). */
export interface PowerLawTerm {
  /** Where the level holds; positive. Anchoring there keeps steep exponents (thousands on a hand-read step) finite. */
  readonly at: number;
  /** Value at `at`; zero or positive. */
  readonly level: number;
  /** Positive falls. */
  readonly exponent: number;
}

/** A sum of power laws on an interval [from, to], 0 ≤ from < to ≤ ∞. */
export interface PowerLawPiece {
  readonly from: number;
  readonly to: number;
  readonly terms: readonly PowerLawTerm[];
}

/** Value of one term at x > 0, right to a few ulp: whole exponents by division, others by one power. */
export function termAt({ at, level, exponent }: PowerLawTerm, x: number): number {
  if (exponent === 0) return level;
  if (exponent === 1) return (level * at) / x;
  // Math.pow is 40 ns slower than exp(a·ln x), which loses |a·ln x| ulp: 1e-14 for exponent 3 over twelve decades.
  return level * (x / at) ** -exponent;
}

/** Value of a sum of terms at x > 0. */
export function termsAt(terms: readonly PowerLawTerm[], x: number): number {
  let sum = 0;
  for (const term of terms) sum += termAt(term, x);
  return sum;
}
