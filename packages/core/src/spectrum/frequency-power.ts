import type { Spectrum } from "./spectrum.js";

/** S(f) · f^order: the integrand of a spectral moment. A power law stays one, its exponent lower by the order. */
export function timesFrequency(spectrum: Spectrum, order: number): Spectrum {
  if (order === 0) return spectrum;
  const { pieces, parts, skirt: _, sensitivities: __, ...rest } = spectrum;
  return Object.freeze({
    ...rest,
    lowExponent: spectrum.lowExponent - order,
    highExponent: spectrum.highExponent - order,
    ...(pieces !== undefined && {
      pieces: pieces.map((piece) => ({
        ...piece,
        terms: piece.terms.map(({ at, level, exponent }) => ({
          at,
          level: level * at ** order,
          exponent: exponent - order,
        })),
      })),
    }),
    ...(parts !== undefined && { parts: parts.map((part) => timesFrequency(part, order)) }),
    powerDensityAt: (hz: number) => spectrum.powerDensityAt(hz) * hz ** order,
  });
}
