import { requirePositive, requireWhole } from "../ground/domain.js";
import { turnsOf } from "../numerics/turns.js";
import { wholePower } from "../numerics/whole-power.js";
import { inName, makeWeighting } from "./make-weighting.js";
import { evenSinePower } from "./waves.js";
import type { Weighting } from "./weighting.js";

/** What {@link sincDecimator} takes. */
export interface SincDecimatorOptions {
  /** Number of averages in a row, 1 to 6. */
  readonly order: number;
  /** Samples each average takes, M, at least 2. */
  readonly ratio: number;
  /** Rate of the modulator, Hz. */
  readonly modulatorRateHz: number;
}

/**
 * The sinc^N filter of a delta-sigma converter: |H|² = |sin(πfM/f_m)/(M sin(πf/f_m))|^(2N), which repeats at f_m.
 *
 * Zeros at multiples of f_m/M, except at multiples of f_m, where it passes everything again: a band may run through many
 * modulator rates.
 *
 * @throws OutOfDomainError for an order or ratio out of range or a rate that is not positive and finite.
 *
 * @example
 * ```ts
 * import { noiseBandwidth, sincDecimator } from "@quietband/core";
 * noiseBandwidth(sincDecimator({ order: 3, ratio: 256, modulatorRateHz: 1.024e6 })).hz; // → 1100.00
 * ```
 */
export function sincDecimator({ order, ratio, modulatorRateHz }: SincDecimatorOptions): Weighting {
  requireWhole("order", order, 1, 6);
  requireWhole("ratio", ratio, 2, 2 ** 30);
  requirePositive("modulatorRateHz", modulatorRateHz, "Hz");
  const lobeHz = modulatorRateHz / ratio;
  return makeWeighting({
    name: `sinc decimator, order ${order}, ratio ${ratio}, ${inName(modulatorRateHz)} Hz`,
    knots: [lobeHz],
    lowExponent: 0,
    highExponent: 0,
    repeatsHz: modulatorRateHz,
    lobes: {
      lobeHz,
      peaksEveryHz: [modulatorRateHz],
      parts: [
        {
          envelopeAt(hz: number): number {
            const below = ratio * Math.sin(Math.PI * (offset(hz, modulatorRateHz) / modulatorRateHz));
            return 1 / wholePower(below * below, order);
          },
          waves: evenSinePower(order, ratio / modulatorRateHz),
        },
      ],
    },
    powerGainAt(hz: number): number {
      const turns = offset(hz, modulatorRateHz) / modulatorRateHz;
      if (turns === 0) return 1;
      const fine = turnsOf(turns, ratio);
      const quotient = Math.sin(Math.PI * fine) / (ratio * Math.sin(Math.PI * turns));
      return wholePower(quotient * quotient, order);
    },
  });
}

/** Distance from the nearest multiple of the rate, exact. */
function offset(hz: number, rate: number): number {
  const rest = hz % rate;
  return rest > 0.5 * rate ? rest - rate : rest;
}
