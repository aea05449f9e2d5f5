import { OutOfDomainError, type Spectrum, type Weighting } from "@quietband/core";

/**
 * A spectrum behind a filter as a spectrum: S·|H|². Relative sensitivities pass a filter unchanged, so uncertainty stays.
 *
 * @internal
 */
export function filteredSpectrum(spectrum: Spectrum, weighting: Weighting | undefined): Spectrum {
  if (weighting === undefined) return spectrum;
  const [low, high] = [
    Math.max(spectrum.support[0], weighting.support[0]),
    Math.min(spectrum.support[1], weighting.support[1]),
  ];
  if (!(high > low))
    throw new OutOfDomainError(
      `The noise is defined from ${spectrum.support[0]} Hz to ${spectrum.support[1]} Hz, ${weighting.name} from ${weighting.support[0]} Hz to ${weighting.support[1]} Hz; they must share frequencies.`,
    );
  const { pieces: _, parts: __, skirt: ___, ...rest } = spectrum;
  return Object.freeze({
    ...rest,
    support: Object.freeze([low, high] as const),
    knots: Object.freeze(
      [...new Set([...spectrum.knots, ...weighting.knots])]
        .filter((hz) => hz > low && hz < high)
        .toSorted((one, other) => one - other),
    ),
    lowExponent: spectrum.lowExponent + weighting.lowExponent,
    highExponent: spectrum.highExponent + weighting.highExponent,
    powerDensityAt: (hz: number) => spectrum.powerDensityAt(hz) * weighting.powerGainAt(hz),
  });
}
