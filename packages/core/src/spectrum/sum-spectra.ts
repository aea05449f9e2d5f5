import { OutOfDomainError } from "../ground/errors.js";
import type { PowerLawPiece } from "../numerics/power-law.js";
import { addPieces } from "../numerics/power-law-sum.js";
import { requireInside, spectrumFromPieces } from "./make-spectrum.js";
import type { Sensitivity, Spectrum } from "./spectrum.js";

/**
 * The sum of independent noises: S(f) = Σ Sᵢ(f), on the frequencies all of them have.
 *
 * Sums of power laws stay sums of power laws, so exact routes survive. Every part keeps its own uncertainty; a part
 * that is added twice counts as two independent noises with independent uncertainties.
 *
 * @param spectra - at least one, all of one unit.
 * @throws OutOfDomainError for no spectrum, different units, or supports that do not overlap.
 *
 * @example
 * ```ts
 * import { bandNoise, sumSpectra, whiteFlicker } from "@quietband/core";
 * const one = whiteFlicker({ floor: 3e-9, cornerHz: 0 });
 * const other = whiteFlicker({ floor: 4e-9, cornerHz: 0 });
 * bandNoise(sumSpectra(one, other), { fromHz: 0, toHz: 100 }).rms; // → 50.00e-9
 * ```
 */
export function sumSpectra(...spectra: readonly Spectrum[]): Spectrum {
  const [first, ...others] = spectra;
  if (first === undefined) throw new OutOfDomainError("A sum needs at least one spectrum; got none.");
  const odd = others.find((spectrum) => spectrum.unit !== first.unit);
  if (odd !== undefined)
    throw new OutOfDomainError(
      `All spectra of a sum must have one unit; got ${first.unit} and ${odd.unit}; refer them to one place with scaleSpectrum first.`,
    );
  if (others.length === 0) return first;
  const low = Math.max(...spectra.map((spectrum) => spectrum.support[0]));
  const high = Math.min(...spectra.map((spectrum) => spectrum.support[1]));
  if (!(high > low))
    throw new OutOfDomainError(
      `The spectra of a sum must share a range of frequencies; the highest lower end is ${low} Hz, the lowest upper end ${high} Hz.`,
    );
  const sensitivities = Object.freeze(spectra.flatMap((spectrum) => sharesOf(spectrum, spectra)));
  const spans = spectra.flatMap((spectrum) => (spectrum.pointsSpan === undefined ? [] : [spectrum.pointsSpan]));
  const extras = {
    ...(sensitivities.length > 0 && { sensitivities }),
    ...(spans.length > 0 && {
      pointsSpan: Object.freeze([
        Math.max(...spans.map((span) => span[0])),
        Math.min(...spans.map((span) => span[1])),
      ] as const),
    }),
    notes: Object.freeze([...new Set(spectra.flatMap((spectrum) => spectrum.notes ?? []))]),
  };
  const pieces = spectra.map((spectrum) => spectrum.pieces);
  if (pieces.every((list): list is readonly PowerLawPiece[] => list !== undefined))
    return spectrumFromPieces(first.unit, pieces.reduce(addPieces), extras);
  const support = Object.freeze([low, high] as const);
  return Object.freeze({
    unit: first.unit,
    support,
    knots: Object.freeze(
      [...new Set(spectra.flatMap((spectrum) => [...spectrum.knots]))]
        .filter((hz) => hz > low && hz < high)
        .toSorted((a, b) => a - b),
    ),
    lowExponent: Math.max(...spectra.map((spectrum) => spectrum.lowExponent)),
    highExponent: Math.min(...spectra.map((spectrum) => spectrum.highExponent)),
    ...extras,
    parts: Object.freeze(spectra.flatMap((spectrum) => spectrum.parts ?? [spectrum])),
    powerDensityAt(hz: number): number {
      requireInside(hz, support);
      return totalAt(spectra, hz);
    },
  });
}

/** d ln(ΣS)/dp = (Sᵢ/ΣS) · d ln Sᵢ/dp for the parameters of one part. */
function sharesOf(part: Spectrum, spectra: readonly Spectrum[]): Sensitivity[] {
  return (part.sensitivities ?? []).map((sensitivity) =>
    Object.freeze({
      ...sensitivity,
      straight: false,
      gradientAt(hz: number, visit: (parameter: number, slope: number) => void): void {
        const share = part.powerDensityAt(hz) / totalAt(spectra, hz);
        sensitivity.gradientAt(hz, (parameter, slope) => visit(parameter, slope * share));
      },
    }),
  );
}

function totalAt(spectra: readonly Spectrum[], hz: number): number {
  let sum = 0;
  for (const spectrum of spectra) sum += spectrum.powerDensityAt(hz);
  return sum;
}
