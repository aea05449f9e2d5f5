import { mergePieces } from "./merge-pieces.js";
import { type PowerLawPiece, type PowerLawTerm, termAt } from "./power-law.js";

/** Pieces of the product of two piecewise sums of power laws, on the intervals both have. */
export function multiplyPieces(one: readonly PowerLawPiece[], other: readonly PowerLawPiece[]): PowerLawPiece[] {
  return mergePieces(one, other, (a, b, from, to) =>
    a.terms.flatMap((term) => b.terms.map((by) => multiplyTerms(term, by, from, to))),
  );
}

/** Anchored at the end of the overlap that holds most of its integral: far from it a steep exponent would lose digits. */
function multiplyTerms(one: PowerLawTerm, other: PowerLawTerm, from: number, to: number): PowerLawTerm {
  const exponent = one.exponent + other.exponent;
  const inside = from === 0 ? (to === Number.POSITIVE_INFINITY ? one.at : to) : from;
  const at = exponent > 1 || to === Number.POSITIVE_INFINITY ? inside : to;
  return { at, level: termAt(one, at) * termAt(other, at), exponent };
}
