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

/** Value of one term at x > 0. */
export function termAt(term: PowerLawTerm, x: number): number {
  if (term.exponent === 0) return term.level;
  return term.level * Math.exp(-term.exponent * Math.log(x / term.at));
}

/** Value of a sum of terms at x > 0. */
export function termsAt(terms: readonly PowerLawTerm[], x: number): number {
  let sum = 0;
  for (const term of terms) sum += termAt(term, x);
  return sum;
}
