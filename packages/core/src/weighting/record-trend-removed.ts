import { requirePositive } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { inName, makeLobed } from "./make-weighting.js";
import { steady, wave } from "./waves.js";
import type { Weighting } from "./weighting.js";

/** What {@link recordTrendRemoved} takes. */
export interface RecordTrendRemovedOptions {
  /** Length of the record T, s; positive. */
  readonly seconds: number;
}

const needed: RecordTrendRemovedOptions = Object.freeze({ seconds: Number.NaN });

/**
 * What a dc-coupled record of T seconds shows once its mean and its straight-line trend are gone:
 * |H|² = 1 − j₀(x)² − 3 j₁(x)², x = πfT, j_n the spherical Bessel functions.
 *
 * A wave seen over a record is Σ (2n + 1) iⁿ j_n(x) P_n of the place in it (DLMF 10.60.7); the first two Legendre polynomials
 * are taken out. Converges from 0 Hz for exponents below 5.
 *
 * @throws OutOfDomainError for a length that is not positive and finite.
 *
 * @example
 * ```ts
 * import { recordTrendRemoved } from "@quietband/core";
 * recordTrendRemoved({ seconds: 1 }).powerGainAt(100); // → 0.99997
 * ```
 */
export function recordTrendRemoved(options: RecordTrendRemovedOptions): Weighting {
  const { seconds } = completeOptions("recordTrendRemoved", needed, options);
  requirePositive("seconds", seconds, "s");
  const inverse = (hz: number): number => 1 / (Math.PI * hz * seconds);
  return makeLobed({
    name: `mean and trend removed over ${inName(seconds)} s`,
    knots: [0.5 / seconds, 1 / seconds],
    lowExponent: -4,
    highExponent: 0,
    lobes: {
      lobeHz: 1 / seconds,
      peaksEveryHz: [],
      parts: [
        { envelopeAt: () => 1, waves: [steady(1)] },
        // −j₀² − 3 j₁² = −(sin²x + 3 cos²x)/x² + 3 sin 2x/x³ − 3 sin²x/x⁴
        { envelopeAt: (hz: number) => -(inverse(hz) ** 2), waves: [steady(2), wave(seconds, 1)] },
        { envelopeAt: (hz: number) => 3 * inverse(hz) ** 3, waves: [wave(seconds, 0, 1)] },
        { envelopeAt: (hz: number) => -3 * inverse(hz) ** 4, waves: [steady(0.5), wave(seconds, -0.5)] },
      ],
    },
    powerGainAt(hz: number): number {
      const x = Math.PI * hz * seconds;
      return x < 3 ? lossOfTrend(x) : 1 - shareOfTrend(x);
    },
  });
}

/** j₀² + 3 j₁², what mean and trend hold. */
function shareOfTrend(x: number): number {
  if (x > 1e9) return 0;
  const j0 = Math.sin(x) / x;
  const j1 = (j0 - Math.cos(x)) / x;
  return j0 * j0 + 3 * j1 * j1;
}

/** Σ_{n≥2} (2n + 1) j_n(x)², what they leave, all terms positive; j_n by its power series (DLMF 10.53.1). */
function lossOfTrend(x: number): number {
  const square = 0.5 * x * x;
  let lead = x / 3;
  let sum = 0;
  for (let n = 2; n < 24; n += 1) {
    lead *= x / (2 * n + 1);
    let term = 1;
    let series = 1;
    for (let k = 1; k < 30 && Math.abs(term) > 1e-18; k += 1) {
      term *= -square / (k * (2 * n + 2 * k + 1));
      series += term;
    }
    const part = (2 * n + 1) * (lead * series) ** 2;
    sum += part;
    if (part < 1e-18 * sum) break;
  }
  return sum;
}
