import { bandNoise, functionSpectrum, type Spectrum, type Weighting } from "@quietband/core";
import type { BudgetLine } from "./budget-lines.js";
import { isSpectrum } from "./noise-source.js";

/** The power two sources share before their correlation is applied, unit², signed as their gains. */
export interface CrossPower {
  readonly power: number;
  /** Bound on its relative error. */
  readonly powerError: number;
}

/**
 * c₁c₂·∫ √(S₁S₂)·|H₁||H₂| df: what a coefficient of 1 at every frequency adds twice. By Cauchy and Schwarz it is at most
 * the root of the two powers, and equals it where both have one spectrum. Where a source has no density the root is taken:
 * the coefficient is then that of the whole bands.
 */
export function crossPower(one: BudgetLine, other: BudgetLine, band: readonly [number, number]): CrossPower {
  const sign = Math.sign(one.gain) * Math.sign(other.gain);
  const error = 0.5 * (one.powerError + other.powerError) + 2 * Number.EPSILON;
  const sameShape = one.source === other.source && one.weighting === other.weighting;
  if (sign === 0 || sameShape || !isSpectrum(one.source) || !isSpectrum(other.source))
    return { power: sign * Math.sqrt(one.power) * Math.sqrt(other.power), powerError: error };
  const shared = one.weighting === other.weighting ? one.weighting : undefined;
  const apart = one.weighting === other.weighting ? [] : [one.weighting, other.weighting];
  const spectrum = meanSpectrum(one.source, other.source, apart);
  const found = bandNoise(spectrum, { fromHz: band[0], toHz: band[1], weighting: shared });
  return { power: one.gain * other.gain * found.power, powerError: 2 * found.numericalError + 4 * Number.EPSILON };
}

/** For a noise that ends at a frequency: any law that steep converges. */
const steepest = 100;

/** √(S₁S₂), times the amplitude gains of filters that differ. */
function meanSpectrum(one: Spectrum, other: Spectrum, filters: readonly (Weighting | undefined)[]): Spectrum {
  const gains = filters.filter((filter) => filter !== undefined);
  const all: readonly (Spectrum | Weighting)[] = [one, other, ...gains];
  const half = (key: "lowExponent" | "highExponent"): number =>
    all.reduce((sum, part) => sum + 0.5 * Math.min(part[key], steepest), 0);
  return functionSpectrum(
    (hz) =>
      Math.sqrt(one.powerDensityAt(hz) * gains.reduce((product, filter) => product * filter.powerGainAt(hz), 1)) *
      Math.sqrt(other.powerDensityAt(hz)),
    {
      unit: one.unit,
      support: [Math.max(...all.map((part) => part.support[0])), Math.min(...all.map((part) => part.support[1]))],
      knots: [...new Set(all.flatMap((part) => [...part.knots]))],
      lowExponent: half("lowExponent"),
      highExponent: half("highExponent"),
    },
  );
}
