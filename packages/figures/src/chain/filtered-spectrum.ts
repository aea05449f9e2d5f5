import { OutOfDomainError, type Spectrum, type Weighting } from "@quietband/core";

/**
 * A spectrum behind a filter as a spectrum: S·|H|². Relative sensitivities pass a filter unchanged, so uncertainty stays.
 * Where it suffices, the filter as the weighting of a band keeps exact routes.
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
  if (weighting.pieces?.every(({ terms }) => terms.length === 0) === true) return silence(spectrum.unit, [low, high]);
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

/** No noise at all: what is left where two paths cancel. */
function silence(unit: string, [low, high]: readonly [number, number]): Spectrum {
  return Object.freeze({
    unit,
    support: Object.freeze([low, high] as const),
    knots: Object.freeze([]),
    lowExponent: Number.NEGATIVE_INFINITY,
    highExponent: Number.POSITIVE_INFINITY,
    pieces: Object.freeze([Object.freeze({ from: low, to: high, terms: Object.freeze([]) })]),
    powerDensityAt: () => 0,
  });
}
