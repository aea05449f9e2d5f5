import { requirePositive, requireWhole } from "../ground/domain.js";
import { wholePower } from "../numerics/whole-power.js";
import { butterworthPoles } from "./butterworth-poles.js";
import { inName, makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/**
 * Butterworth high-pass: |H|² = 1/(1 + (cutoffHz/f)^(2n)).
 *
 * @param options - `order` n, 1 to 12; `cutoffHz`, the half-power frequency.
 * @throws OutOfDomainError for an order out of range or a cutoff that is not positive and finite.
 *
 * @example
 * ```ts
 * import { butterworthHighPass } from "@quietband/core";
 * butterworthHighPass({ order: 2, cutoffHz: 10 }).powerGainAt(20); // → 0.941176
 * ```
 */
export function butterworthHighPass({
  order,
  cutoffHz,
}: {
  readonly order: number;
  readonly cutoffHz: number;
}): Weighting {
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
      poles: butterworthPoles(order).map(({ re, im }) => ({ re: re * cutoffHz, im: im * cutoffHz })),
    },
    powerGainAt(hz: number): number {
      return hz === 0 ? 0 : 1 / (1 + wholePower(cutoffHz / hz, 2 * order));
    },
  });
}
