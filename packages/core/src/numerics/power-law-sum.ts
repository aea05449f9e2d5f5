import type { PowerLawPiece } from "./power-law.js";

/** Pieces of the sum of two piecewise sums of power laws, on the intervals both have. */
export function addPieces(one: readonly PowerLawPiece[], other: readonly PowerLawPiece[]): PowerLawPiece[] {
  const sum: PowerLawPiece[] = [];
  let i = 0;
  let j = 0;
  while (i < one.length && j < other.length) {
    const a = one[i] as PowerLawPiece;
    const b = other[j] as PowerLawPiece;
    const from = Math.max(a.from, b.from);
    const to = Math.min(a.to, b.to);
    if (to > from) sum.push({ from, to, terms: [...a.terms, ...b.terms] });
    if (a.to <= b.to) i += 1;
    if (b.to <= a.to) j += 1;
  }
  return sum;
}
