import { requireBetween } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { completeOptions } from "../ground/options.js";
import { coverageFactor } from "../numerics/coverage-factor.js";
import type { Sensitivity, Spectrum } from "./spectrum.js";

/** What {@link densityInterval} takes. */
export interface DensityIntervalOptions {
  /** Ends of the range, Hz; those of the points (or of the support) unless given. */
  readonly fromHz?: number | undefined;
  readonly toHz?: number | undefined;
  /** 0.95 unless given. */
  readonly coverageProbability?: number | undefined;
  /** Degrees of freedom behind the standard uncertainties: Student's factor instead of the normal one. */
  readonly degreesOfFreedom?: number | undefined;
}

/** Where the density lies with the coverage named, frequency by frequency. */
export interface DensityRange {
  /** Hz, ascending. */
  readonly frequencies: readonly number[];
  /** unit/√Hz. */
  readonly lower: readonly number[];
  readonly upper: readonly number[];
  readonly coverageProbability: number;
  /** Expanded over standard uncertainty. */
  readonly k: number;
  /** "95 %, k = 1.96": for a legend. */
  readonly label: string;
}

const intervalDefaults: DensityIntervalOptions = Object.freeze({
  fromHz: undefined,
  toHz: undefined,
  coverageProbability: 0.95,
  degreesOfFreedom: Number.POSITIVE_INFINITY,
});

const pointsADecade = 24;

/**
 * The interval of a spectrum's density at each frequency, from its own sensitivities: ln e(f) ± k·u, with
 * u² = Σ g_i g_j u_ij and g = d ln e/d parameter.
 *
 * @param spectrum - with sensitivities: a fit, a polyline, or what was made of them.
 * @param options - range in Hz, coverage probability, degrees of freedom.
 * @returns frequencies with lower and upper density, k, and a label that names both.
 * @throws OutOfDomainError for a spectrum without sensitivities, a range outside its support, a probability outside (0, 1).
 * @see JCGM 100:2008, 5.2.2 and annex G.
 *
 * @example
 * ```ts
 * import { curveFromPoints, densityInterval, fitCurve } from "@quietband/core";
 * const points = [1, 3, 10, 30, 100, 300, 1000, 3000].map((frequency) => ({
 *   frequency,
 *   density: 8e-9 * Math.sqrt(1 + 40 / frequency),
 * }));
 * const fit = fitCurve(curveFromPoints(points, { unit: "V" }));
 * const { upper, lower, label } = densityInterval(fit);
 * label; // → 95 %, k = 1.96
 * upper.at(-1) / lower.at(-1); // → 1.127
 * ```
 */
export function densityInterval(spectrum: Spectrum, options: DensityIntervalOptions = {}): DensityRange {
  const given = completeOptions<DensityIntervalOptions>("densityInterval", intervalDefaults, options);
  const { coverageProbability = 0.95, degreesOfFreedom = Number.POSITIVE_INFINITY } = given;
  requireBetween("coverageProbability", coverageProbability, [0, 1], { low: true, high: true });
  const groups = spectrum.sensitivities ?? [];
  if (groups.length === 0)
    throw new OutOfDomainError(
      "densityInterval needs a spectrum that carries uncertainty, a fit or a polyline; got none.",
    );
  const [first, last] = spectrum.pointsSpan ?? spectrum.support;
  const frequencies = gridOf(spectrum, given.fromHz ?? first, given.toHz ?? last);
  const k = coverageFactor(coverageProbability, degreesOfFreedom);
  const spreads = frequencies.map((hz) => Math.exp(k * relativeAt(groups, hz)));
  const densities = frequencies.map((hz) => Math.sqrt(spectrum.powerDensityAt(hz)));
  return Object.freeze({
    frequencies: Object.freeze(frequencies),
    lower: Object.freeze(densities.map((density, index) => density / (spreads[index] as number))),
    upper: Object.freeze(densities.map((density, index) => density * (spreads[index] as number))),
    coverageProbability,
    k,
    label: `${Number((100 * coverageProbability).toPrecision(6))} %, k = ${k.toFixed(2)}`,
  });
}

function gridOf({ support, knots }: Spectrum, fromHz: number, toHz: number): number[] {
  if (!(fromHz > 0 && toHz > fromHz && toHz < Number.POSITIVE_INFINITY && fromHz >= support[0] && toHz <= support[1]))
    throw new OutOfDomainError(
      `The interval must run from above 0 Hz to a higher finite frequency inside ${support[0]} Hz to ${support[1]} Hz; got ${fromHz} Hz to ${toHz} Hz; name fromHz and toHz.`,
    );
  const steps = Math.max(2, Math.ceil(pointsADecade * Math.log10(toHz / fromHz)));
  const even = Array.from({ length: steps - 1 }, (_, k) => fromHz * (toHz / fromHz) ** ((k + 1) / steps));
  const bends = knots.filter((hz) => hz > fromHz && hz < toHz);
  return [...new Set([fromHz, ...even, ...bends, toHz])].toSorted((one, other) => one - other);
}

/** Relative standard uncertainty of the density at a frequency. */
function relativeAt(groups: readonly Sensitivity[], hz: number): number {
  let variance = 0;
  for (const group of groups) {
    const { covariance } = group;
    const slopes: { readonly parameter: number; readonly slope: number }[] = [];
    group.gradientAt(hz, (parameter, slope) => slopes.push({ parameter, slope: 0.5 * slope }));
    for (const one of slopes) {
      if ("variances" in covariance) variance += (covariance.variances[one.parameter] ?? 0) * one.slope ** 2;
      else
        for (const other of slopes)
          variance += (covariance.matrix[one.parameter]?.[other.parameter] ?? 0) * one.slope * other.slope;
    }
  }
  return Math.sqrt(Math.max(variance, 0));
}
