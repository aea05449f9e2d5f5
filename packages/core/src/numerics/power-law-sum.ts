import { mergePieces } from "./merge-pieces.js";
import type { PowerLawPiece } from "./power-law.js";

/** Pieces of the sum of two piecewise sums of power laws, on the intervals both have. */
export function addPieces(one: readonly PowerLawPiece[], other: readonly PowerLawPiece[]): PowerLawPiece[] {
  return mergePieces(one, other, (a, b) => [...a.terms, ...b.terms]);
}
