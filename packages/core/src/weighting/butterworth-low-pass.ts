import { requirePositive, requireWhole } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { wholePower } from "../numerics/whole-power.js";
import { butterworthPoles } from "./butterworth-poles.js";
import { atScale } from "./conjugates.js";
import { inName, makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/** What {@link butterworthLowPass} takes. */
export interface ButterworthLowPassOptions {
  /** Number of poles n, 1 to 12. */
  readonly order: number;
  /** Half-power frequency, Hz; positive. */
  readonly cutoffHz: number;
}

const needed: ButterworthLowPassOptions = Object.freeze({ order: Number.NaN, cutoffHz: Number.NaN });

/**
 * Butterworth low-pass, maximally flat: |H|² = 1/(1 + (f/cutoffHz)^(2n)).
 *
 * @throws OutOfDomainError for an order out of range or a cutoff that is not positive and finite.
 * @see S. Butterworth, Experimental Wireless 7 (1930) 536.
 *
 * @example
 * ```ts
 * import { butterworthLowPass, noiseBandwidth } from "@quietband/core";
 * noiseBandwidth(butterworthLowPass({ order: 4, cutoffHz: 100 })).hz; // → 102.617
 * ```
 */
export function butterworthLowPass(options: ButterworthLowPassOptions): Weighting {
  const { order, cutoffHz } = completeOptions("butterworthLowPass", needed, options);
  requireWhole("order", order, 1, 12);
  requirePositive("cutoffHz", cutoffHz, "Hz");
  return makeWeighting({
    name: `Butterworth low-pass, order ${order}, ${inName(cutoffHz)} Hz`,
    knots: [cutoffHz],
    lowExponent: 0,
    highExponent: 2 * order,
    saturating: { cutoffHz, order, numeratorOrder: 0 },
    rational: {
      gain: cutoffHz ** (2 * order),
      zerosAtOrigin: 0,
      zeros: [],
      poles: atScale(cutoffHz, butterworthPoles(order)),
    },
    powerGainAt(hz: number): number {
      return 1 / (1 + wholePower(hz / cutoffHz, 2 * order));
    },
  });
}
