import { requirePositive, requireWhole } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { besselPoles } from "./bessel-poles.js";
import { atScale, squaredSize } from "./conjugates.js";
import { inName, makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/** What {@link besselLowPass} takes. */
export interface BesselLowPassOptions {
  /** Number of poles n, 1 to 10. */
  readonly order: number;
  /** Half-power frequency, Hz; positive. */
  readonly cutoffHz: number;
}

const needed: BesselLowPassOptions = Object.freeze({ order: Number.NaN, cutoffHz: Number.NaN });

/**
 * Bessel (Thomson) low-pass: the reverse Bessel polynomial, scaled so that |H(cutoffHz)|² = 1/2 exactly and |H(0)|² = 1.
 *
 * 1/|H|² = Σ_k c_k·(w f/cutoffHz)^(2k) with positive c_k = 4^k (2n−k)! (2n−2k)! (n!)² / (k! ((n−k)!)² ((2n)!)²), so
 * nothing cancels in the stop band. Tables also normalise it by delay or by asymptote; this one is by half power.
 *
 * @throws OutOfDomainError for an order out of range or a cutoff that is not positive and finite.
 * @see W. E. Thomson, Proc. IEE 96 (1949) 487; the magnitude series: A. Papoulis, The Fourier Integral, 1962.
 *
 * @example
 * ```ts
 * import { besselLowPass, noiseBandwidth } from "@quietband/core";
 * noiseBandwidth(besselLowPass({ order: 2, cutoffHz: 1 })).hz; // → 1.153594
 * ```
 */
export function besselLowPass(options: BesselLowPassOptions): Weighting {
  const { order, cutoffHz } = completeOptions("besselLowPass", needed, options);
  requireWhole("order", order, 1, 10);
  requirePositive("cutoffHz", cutoffHz, "Hz");
  const lossTerms = halfPowerTerms(order);
  const poles = atScale(cutoffHz, besselPoles(order));
  return makeWeighting({
    name: `Bessel low-pass, order ${order}, ${inName(cutoffHz)} Hz`,
    knots: [cutoffHz],
    lowExponent: 0,
    highExponent: 2 * order,
    rational: { gain: squaredSize(poles), zerosAtOrigin: 0, zeros: [], poles },
    powerGainAt(hz: number): number {
      const u = hz / cutoffHz;
      const square = u * u;
      let loss = lossTerms[order] as number;
      for (let k = order - 1; k >= 0; k -= 1) loss = loss * square + (lossTerms[k] as number);
      return 1 / loss;
    },
  });
}

/** Coefficients of 1/|H|² in (f/cutoff)²; they add up to 2. */
function halfPowerTerms(order: number): readonly number[] {
  const byDelay = [1];
  for (let k = 1; k <= order; k += 1) {
    // c_k/c_(k−1) = 4 (n−k+1)² / (k (2n−k+1) (2n−2k+2) (2n−2k+1))
    const rest = order - k + 1;
    const ratio = (4 * rest * rest) / (k * (2 * order - k + 1) * (2 * rest) * (2 * rest - 1));
    byDelay.push((byDelay[k - 1] as number) * ratio);
  }
  // Newton for Σ c_k s^k = 2 from above: the sum is convex in s and bounded below by its first two terms.
  let square = 1 / (byDelay[1] as number);
  for (let step = 0; step < 60; step += 1) {
    let value = 0;
    let slope = 0;
    for (let k = order; k >= 0; k -= 1) {
      slope = slope * square + value;
      value = value * square + (byDelay[k] as number);
    }
    const shift = (value - 2) / slope;
    square -= shift;
    if (Math.abs(shift) <= 1e-16 * square) break;
  }
  return byDelay.map((term, k) => term * square ** k);
}
