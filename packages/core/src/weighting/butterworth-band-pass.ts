import { requirePositive, requireWhole } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { completeOptions } from "../ground/options.js";
import { productError } from "../numerics/product-error.js";
import { wholePower } from "../numerics/whole-power.js";
import { butterworthPoles } from "./butterworth-poles.js";
import { withConjugates } from "./conjugates.js";
import { inName, makeWeighting } from "./make-weighting.js";
import type { ComplexHz, Weighting } from "./weighting.js";

/** What {@link butterworthBandPass} takes. */
export interface ButterworthBandPassOptions {
  /** Order n of the low-pass prototype, 1 to 12: the band-pass has twice as many poles. */
  readonly order: number;
  /** Lower half-power frequency f₁, Hz; positive. */
  readonly lowCutoffHz: number;
  /** Upper half-power frequency f₂, Hz; above the lower. */
  readonly highCutoffHz: number;
}

const needed: ButterworthBandPassOptions = Object.freeze({
  order: Number.NaN,
  lowCutoffHz: Number.NaN,
  highCutoffHz: Number.NaN,
});

/**
 * Butterworth band-pass: |H|² = 1/(1 + x^(2n)), x = (f − f₁f₂/f)/(f₂ − f₁).
 *
 * x is formed as (f − f_c)(f + f_c)/f, f_c = √(f₁f₂) with the digits that its rounding lost, so that a narrow filter keeps its
 * digits beside its centre.
 *
 * @throws OutOfDomainError for an order out of range, or cutoffs that are not positive, finite and ascending.
 *
 * @example
 * ```ts
 * import { butterworthBandPass, noiseBandwidth } from "@quietband/core";
 * const filter = butterworthBandPass({ order: 2, lowCutoffHz: 900, highCutoffHz: 1100 });
 * noiseBandwidth(filter).hz; // → 222.14
 * ```
 */
export function butterworthBandPass(options: ButterworthBandPassOptions): Weighting {
  const { order, lowCutoffHz, highCutoffHz } = completeOptions("butterworthBandPass", needed, options);
  requireWhole("order", order, 1, 12);
  requirePositive("lowCutoffHz", lowCutoffHz, "Hz");
  requirePositive("highCutoffHz", highCutoffHz, "Hz");
  if (!(highCutoffHz > lowCutoffHz))
    throw new OutOfDomainError(`highCutoffHz must be above lowCutoffHz = ${lowCutoffHz} Hz; got ${highCutoffHz} Hz.`);
  const width = highCutoffHz - lowCutoffHz;
  const square = lowCutoffHz * highCutoffHz;
  const centre = Math.sqrt(square);
  const squareLost = square - centre * centre - productError(centre, centre) + productError(lowCutoffHz, highCutoffHz);
  const centreLost = squareLost / (2 * centre);
  const upper = butterworthPoles(order).filter(({ im }) => im >= 0);
  return makeWeighting({
    name: `Butterworth band-pass, order ${order}, ${inName(lowCutoffHz)} Hz to ${inName(highCutoffHz)} Hz`,
    knots: [lowCutoffHz, centre, highCutoffHz],
    lowExponent: -2 * order,
    highExponent: 2 * order,
    rational: {
      gain: width ** (2 * order),
      zerosAtOrigin: order,
      zeros: [],
      poles: upper.flatMap((pole) => bandPassPoles(pole, width, square)),
    },
    powerGainAt(hz: number): number {
      const off = (hz - centre - centreLost) / hz;
      return 1 / (1 + wholePower((off * (hz + centre)) / width, 2 * order));
    },
  });
}

/** Roots of s² − p·w·s + f₁f₂ and their conjugates: the larger by the sign that does not cancel, the other from their product. */
function bandPassPoles({ re, im }: ComplexHz, width: number, square: number): ComplexHz[] {
  const [b, c] = [0.5 * re * width, 0.5 * im * width];
  const root = squareRoot({ re: (b - c) * (b + c) - square, im: 2 * b * c });
  const sign = b * root.re + c * root.im >= 0 ? 1 : -1;
  const large = { re: b + sign * root.re, im: c + sign * root.im };
  // A real prototype pole has a conjugate pair of its own, or two real poles.
  if (im === 0 && large.im !== 0) return withConjugates([{ re: large.re, im: Math.abs(large.im) }]);
  const size = large.re * large.re + large.im * large.im;
  return withConjugates([large, { re: (square * large.re) / size, im: (-square * large.im) / size }]);
}

function squareRoot({ re, im }: ComplexHz): ComplexHz {
  const half = Math.sqrt(0.5 * (Math.hypot(re, im) + Math.abs(re)));
  if (half === 0) return { re: 0, im: 0 };
  const other = im / (2 * half);
  return re >= 0 ? { re: half, im: other } : { re: Math.abs(other), im: im >= 0 ? half : -half };
}
