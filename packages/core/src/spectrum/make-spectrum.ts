import { OutOfDomainError } from "../ground/errors.js";
import { type PowerLawPiece, termsAt } from "../numerics/power-law.js";
import type { Spectrum } from "./spectrum.js";

type Extras = Pick<Spectrum, "pointsSpan" | "sensitivities" | "notes">;

/** A spectrum from new pieces that tile its support: value, knots and end exponents all follow from them. */
export function spectrumFromPieces(unit: string, pieces: readonly PowerLawPiece[], extras: Extras = {}): Spectrum {
  const first = pieces[0];
  const last = pieces.at(-1);
  if (first === undefined || last === undefined)
    throw new OutOfDomainError("A spectrum needs at least one piece; got none.");
  const upperEdges = Float64Array.from(pieces, (piece) => piece.to);
  const support: readonly [number, number] = Object.freeze([first.from, last.to] as const);
  return Object.freeze({
    unit,
    support,
    knots: Object.freeze(pieces.slice(1).map((piece) => piece.from)),
    lowExponent: Math.max(...first.terms.filter((term) => term.level > 0).map((term) => term.exponent)),
    highExponent: Math.min(...last.terms.filter((term) => term.level > 0).map((term) => term.exponent)),
    pieces: Object.freeze(pieces.map(frozenPiece)),
    ...extras,
    powerDensityAt(hz: number): number {
      requireInside(hz, support);
      const piece = pieces[pieceIndex(upperEdges, hz)];
      return piece === undefined ? Number.NaN : termsAt(piece.terms, hz);
    },
  });
}

/** Refuses a frequency outside the support in one sentence. */
export function requireInside(hz: number, support: readonly [number, number]): void {
  if (hz >= support[0] && hz <= support[1]) return;
  throw new OutOfDomainError(
    `The spectrum is defined from ${support[0]} Hz to ${support[1]} Hz; got ${hz} Hz; say how it goes on beyond its points (option beyond).`,
  );
}

/** Index of the piece that holds `hz`, by bisection over the upper edges. */
function pieceIndex(upperEdges: Float64Array, hz: number): number {
  let low = 0;
  let high = upperEdges.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((upperEdges[middle] as number) < hz) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** In place: the pieces are the maker's own. */
function frozenPiece(piece: PowerLawPiece): PowerLawPiece {
  for (const term of piece.terms) Object.freeze(term);
  Object.freeze(piece.terms);
  return Object.freeze(piece);
}
