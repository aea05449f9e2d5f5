import { requirePositive, requireWhole } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { productError } from "../numerics/turns.js";
import { wholePower } from "../numerics/whole-power.js";
import { butterworthPoles } from "./butterworth-poles.js";
import { inName, makeWeighting } from "./make-weighting.js";
import type { ComplexHz, Weighting } from "./weighting.js";

/** What {@link butterworthBandPass} takes. */
export interface BandPassOptions {
  /** Order of the low-pass prototype, 1 to 12: the band-pass has twice as many poles. */
  readonly order: number;
  /** Half-power frequencies, Hz; positive, the low one below the high one. */
  readonly lowCutoffHz: number;
  readonly highCutoffHz: number;
}

/**
 * Butterworth band-pass: |H|² = 1/(1 + x^(2n)), x = (f − f₁f₂/f)/(f₂ − f₁).
 *
 * f² − f₁f₂ is formed with the errors of both products, so that a narrow filter keeps its digits beside its centre.
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
export function butterworthBandPass({ order, lowCutoffHz, highCutoffHz }: BandPassOptions): Weighting {
  requireWhole("order", order, 1, 12);
  requirePositive("lowCutoffHz", lowCutoffHz, "Hz");
  requirePositive("highCutoffHz", highCutoffHz, "Hz");
  if (!(highCutoffHz > lowCutoffHz))
    throw new OutOfDomainError(`highCutoffHz must be above lowCutoffHz = ${lowCutoffHz} Hz; got ${highCutoffHz} Hz.`);
  const width = highCutoffHz - lowCutoffHz;
  const product = lowCutoffHz * highCutoffHz;
  const lost = productError(lowCutoffHz, highCutoffHz);
  return makeWeighting({
    name: `Butterworth band-pass, order ${order}, ${inName(lowCutoffHz)} Hz to ${inName(highCutoffHz)} Hz`,
    knots: [lowCutoffHz, Math.sqrt(lowCutoffHz) * Math.sqrt(highCutoffHz), highCutoffHz],
    lowExponent: -2 * order,
    highExponent: 2 * order,
    rational: {
      gain: width ** (2 * order),
      zerosAtOrigin: order,
      zeros: [],
      poles: butterworthPoles(order).flatMap((pole) => bandPassPoles(pole, width, product)),
    },
    powerGainAt(hz: number): number {
      if (hz === 0) return 0;
      const difference = hz * hz - product + (productError(hz, hz) - lost);
      return 1 / (1 + wholePower(difference / (hz * width), 2 * order));
    },
  });
}

/** Roots of s² − p·w·s + f₁f₂ for a prototype pole p: the larger by the stable sign, the other from their product. */
function bandPassPoles({ re, im }: ComplexHz, width: number, product: number): ComplexHz[] {
  const [b, c] = [0.5 * re * width, 0.5 * im * width];
  const root = squareRoot({ re: b * b - c * c - product, im: 2 * b * c });
  const sign = b * root.re + c * root.im >= 0 ? 1 : -1;
  const large = { re: b + sign * root.re, im: c + sign * root.im };
  const size = large.re * large.re + large.im * large.im;
  return [large, { re: (product * large.re) / size, im: (-product * large.im) / size }];
}

function squareRoot({ re, im }: ComplexHz): ComplexHz {
  const size = Math.hypot(re, im);
  if (size === 0) return { re: 0, im: 0 };
  const half = Math.sqrt(0.5 * (size + Math.abs(re)));
  const other = im / (2 * half);
  return re >= 0 ? { re: half, im: other } : { re: Math.abs(other), im: im >= 0 ? half : -half };
}
