import { requirePositive, requireWhole } from "../ground/domain.js";
import { wholePower } from "../numerics/whole-power.js";
import { butterworthPoles } from "./butterworth-poles.js";
import { inName, makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/**
 * Butterworth low-pass, maximally flat: |H|² = 1/(1 + (f/cutoffHz)^(2n)) (Butterworth 1930).
 *
 * @param options - `order` n, 1 to 12; `cutoffHz`, the half-power frequency.
 * @throws OutOfDomainError for an order out of range or a cutoff that is not positive and finite.
 *
 * @example
 * ```ts
 * import { butterworthLowPass, noiseBandwidth } from "@quietband/core";
 * noiseBandwidth(butterworthLowPass({ order: 4, cutoffHz: 100 })).hz; // → 102.617
 * ```
 */
export function butterworthLowPass({
  order,
  cutoffHz,
}: {
  readonly order: number;
  readonly cutoffHz: number;
}): Weighting {
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
      poles: butterworthPoles(order).map(({ re, im }) => ({ re: re * cutoffHz, im: im * cutoffHz })),
    },
    powerGainAt(hz: number): number {
      return 1 / (1 + wholePower(hz / cutoffHz, 2 * order));
    },
  });
}
