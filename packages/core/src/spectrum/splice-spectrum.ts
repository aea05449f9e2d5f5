import type { PowerLawPiece } from "../numerics/power-law.js";
import { spectrumFromPieces } from "./make-spectrum.js";
import type { Sensitivity, Spectrum } from "./spectrum.js";

/**
 * One spectrum between two frequencies and another elsewhere, both made of power laws: each keeps its pieces and its
 * sensitivities where it holds. An error of an axis, common to both, stays whole.
 */
export function spliceSpectrum(
  outer: Spectrum,
  inner: Spectrum,
  [from, to]: readonly [number, number],
  innerName: string,
): Spectrum {
  const pieces = [
    ...cut(outer.pieces ?? [], outer.support[0], from),
    ...cut(inner.pieces ?? [], from, to),
    ...cut(outer.pieces ?? [], to, outer.support[1]),
  ];
  const inside = (hz: number): boolean => hz >= from && hz <= to;
  const common = (name: string): boolean => name === "axis";
  const sensitivities = [
    ...(outer.sensitivities ?? []).map((group) =>
      common(group.name) ? group : onlyWhere(group, (hz) => !inside(hz), [from, to]),
    ),
    ...(inner.sensitivities ?? [])
      .filter(({ name }) => !common(name))
      .map((group) => ({ ...onlyWhere(group, inside, [from, to]), name: innerName })),
  ];
  return spectrumFromPieces(outer.unit, pieces, {
    ...(outer.pointsSpan !== undefined && { pointsSpan: outer.pointsSpan }),
    sensitivities: Object.freeze(sensitivities),
    notes: outer.notes ?? [],
  });
}

function cut(pieces: readonly PowerLawPiece[], from: number, to: number): PowerLawPiece[] {
  return pieces
    .filter((piece) => piece.to > from && piece.from < to)
    .map((piece) => ({
      from: Math.max(piece.from, from),
      to: Math.min(piece.to, to),
      terms: piece.terms.map((term) => ({ ...term })),
    }));
}

function onlyWhere(group: Sensitivity, holds: (hz: number) => boolean, edges: readonly [number, number]): Sensitivity {
  const { name, count, covariance } = group;
  return Object.freeze({
    name,
    count,
    covariance,
    knots: Object.freeze([...new Set([...group.knots, ...edges])].toSorted((one, other) => one - other)),
    gradientAt(hz: number, visit: (parameter: number, slope: number) => void): void {
      if (holds(hz)) group.gradientAt(hz, visit);
    },
  });
}
