import { requirePositive, requireWhole } from "../ground/domain.js";
import { inName, makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/**
 * n equal poles in a row: |H|² = (1 + (2^(1/n) − 1)·(f/cutoffHz)²)^−n.
 *
 * A bench filter that is quoted by its poles is a `cascade` of first orders instead: n poles at f_p have their half-power
 * frequency at f_p·√(2^(1/n) − 1).
 *
 * @param options - `order` 1 to 100, `cutoffHz`, the half-power frequency of the whole.
 * @throws OutOfDomainError for an order out of range or a cutoff that is not positive and finite.
 *
 * @example
 * ```ts
 * import { identicalPoles, noiseBandwidth } from "@quietband/core";
 * noiseBandwidth(identicalPoles({ order: 3, cutoffHz: 1 })).hz; // → 1.155395
 * ```
 */
export function identicalPoles({ order, cutoffHz }: { readonly order: number; readonly cutoffHz: number }): Weighting {
  requireWhole("order", order, 1, 100);
  requirePositive("cutoffHz", cutoffHz, "Hz");
  const poleHz = cutoffHz / Math.sqrt(Math.expm1(Math.LN2 / order));
  return makeWeighting({
    name: `${order} identical poles, ${inName(cutoffHz)} Hz`,
    knots: [cutoffHz, poleHz],
    lowExponent: 0,
    highExponent: 2 * order,
    rational: {
      gain: poleHz ** (2 * order),
      zerosAtOrigin: 0,
      zeros: [],
      poles: Array.from({ length: order }, () => ({ re: -poleHz, im: 0 })),
    },
    powerGainAt(hz: number): number {
      const u = hz / poleHz;
      return Math.exp(-order * Math.log1p(u * u));
    },
  });
}
