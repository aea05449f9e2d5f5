import type { PowerLawPiece, PowerLawTerm } from "../numerics/power-law.js";
import { powerLawIntegral, powerLawIntegralError } from "../numerics/power-law-integral.js";
import { multiplyPieces } from "../numerics/power-law-product.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";
import type { RoutedPower } from "./routed-power.js";

/** Power laws through a brick wall or a gain table are power laws: the sum of their closed integrals. */
export function exactPower(
  spectrum: Spectrum,
  weighting: Weighting | undefined,
  fromHz: number,
  toHz: number,
): RoutedPower | undefined {
  if (spectrum.pieces === undefined) return undefined;
  if (weighting === undefined) return sumOfPieces(spectrum.pieces, fromHz, toHz);
  if (weighting.pieces === undefined) return undefined;
  return sumOfPieces(multiplyPieces(spectrum.pieces, weighting.pieces), fromHz, toHz);
}

function sumOfPieces(pieces: readonly PowerLawPiece[], fromHz: number, toHz: number): RoutedPower {
  let power = 0;
  let lost = 0;
  let error = 0;
  eachTermOver(pieces, fromHz, toHz, (term, low, high) => {
    const part = powerLawIntegral(term, low, high);
    error += part * powerLawIntegralError(term, low, high);
    const next = power + part;
    lost += power >= part ? power - next + part : part - next + power;
    power = next;
  });
  return { power: power + lost, error, status: "exact", evaluations: 0 };
}

/** Calls `visit` for every term of every piece that a band meets, with the edges of their overlap. */
export function eachTermOver(
  pieces: readonly PowerLawPiece[],
  fromHz: number,
  toHz: number,
  visit: (term: PowerLawTerm, low: number, high: number) => void,
): void {
  for (const piece of pieces) {
    const low = Math.max(fromHz, piece.from);
    const high = Math.min(toHz, piece.to);
    if (!(high > low)) continue;
    for (const term of piece.terms) if (term.level > 0) visit(term, low, high);
  }
}
