import { requirePositive, requireWhole } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { wholePower } from "../numerics/whole-power.js";
import { butterworthPoles } from "./butterworth-poles.js";
import { atScale } from "./conjugates.js";
import { inName, makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/** What {@link butterworthHighPass} takes. */
export interface ButterworthHighPassOptions {
  /** Number of poles n, 1 to 12. */
  readonly order: number;
  /** Half-power frequency, Hz; positive. */
  readonly cutoffHz: number;
}

const needed: ButterworthHighPassOptions = Object.freeze({ order: Number.NaN, cutoffHz: Number.NaN });

/**
 * Butterworth high-pass, maximally flat: |H|² = 1/(1 + (cutoffHz/f)^(2n)).
 *
 * @throws OutOfDomainError for an order out of range or a cutoff that is not positive and finite.
 * @see S. Butterworth, Experimental Wireless 7 (1930) 536.
 *
 * @example
 * ```ts
 * import { butterworthHighPass } from "@quietband/core";
 * butterworthHighPass({ order: 2, cutoffHz: 10 }).powerGainAt(20); // → 0.941176
 * ```
 */
export function butterworthHighPass(options: ButterworthHighPassOptions): Weighting {
  const { order, cutoffHz } = completeOptions("butterworthHighPass", needed, options);
  requireWhole("order", order, 1, 12);
  requirePositive("cutoffHz", cutoffHz, "Hz");
  return makeWeighting({
    name: `Butterworth high-pass, order ${order}, ${inName(cutoffHz)} Hz`,
    knots: [cutoffHz],
    lowExponent: -2 * order,
    highExponent: 0,
    saturating: { cutoffHz, order, numeratorOrder: order },
    rational: {
      gain: 1,
      zerosAtOrigin: order,
      zeros: [],
      poles: atScale(cutoffHz, butterworthPoles(order)),
    },
    powerGainAt(hz: number): number {
      return 1 / (1 + wholePower(cutoffHz / hz, 2 * order));
    },
  });
}
