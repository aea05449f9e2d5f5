import { requirePositive, requireWhole } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { wholePower } from "../numerics/whole-power.js";
import { inName, makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/** What {@link identicalPoles} takes. */
export interface IdenticalPolesOptions {
  /** Number of poles n, 1 to 100. */
  readonly order: number;
  /** Half-power frequency of the whole, Hz; positive. */
  readonly cutoffHz: number;
}

const needed: IdenticalPolesOptions = Object.freeze({ order: Number.NaN, cutoffHz: Number.NaN });

/**
 * n equal poles in a row: |H|² = (1 + (2^(1/n) − 1)·(f/cutoffHz)²)^−n.
 *
 * A bench filter that is quoted by its poles is a `cascade` of first orders instead: n poles at f_p have their half-power
 * frequency at f_p·√(2^(1/n) − 1).
 *
 * @throws OutOfDomainError for an order out of range or a cutoff that is not positive and finite.
 *
 * @example
 * ```ts
 * import { identicalPoles, noiseBandwidth } from "@quietband/core";
 * noiseBandwidth(identicalPoles({ order: 3, cutoffHz: 1 })).hz; // → 1.155395
 * ```
 */
export function identicalPoles(options: IdenticalPolesOptions): Weighting {
  const { order, cutoffHz } = completeOptions("identicalPoles", needed, options);
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
      const square = u * u;
      // The power multiplies the rounding of 1 + u² by n, the logarithm that of a large ln u²: each where it is harmless.
      return square < 1 ? Math.exp(-order * Math.log1p(square)) : 1 / wholePower(1 + square, order);
    },
  });
}
