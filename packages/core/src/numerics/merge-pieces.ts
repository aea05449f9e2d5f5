import type { PowerLawPiece, PowerLawTerm } from "./power-law.js";

/** Combines two lists of ascending pieces on the intervals both have. */
export function mergePieces(
  one: readonly PowerLawPiece[],
  other: readonly PowerLawPiece[],
  combine: (a: PowerLawPiece, b: PowerLawPiece, from: number, to: number) => readonly PowerLawTerm[],
): PowerLawPiece[] {
  const merged: PowerLawPiece[] = [];
  let i = 0;
  let j = 0;
  while (i < one.length && j < other.length) {
    const a = one[i] as PowerLawPiece;
    const b = other[j] as PowerLawPiece;
    const from = Math.max(a.from, b.from);
    const to = Math.min(a.to, b.to);
    if (to > from) merged.push({ from, to, terms: combine(a, b, from, to) });
    if (a.to <= b.to) i += 1;
    if (b.to <= a.to) j += 1;
  }
  return merged;
}
