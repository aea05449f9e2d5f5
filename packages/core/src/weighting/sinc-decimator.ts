import { requirePositive, requireWhole } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { averageEnvelope, averageGain } from "./average-gain.js";
import { inName, makeLobed } from "./make-weighting.js";
import { turnsAtRate } from "./turns-at-rate.js";
import { evenSinePower } from "./waves.js";
import type { Weighting } from "./weighting.js";

/** What {@link sincDecimator} takes. */
export interface SincDecimatorOptions {
  /** Number of averages in a row N, 1 to 12. */
  readonly order: number;
  /** Samples each average takes M, 2 to 2³⁰. */
  readonly ratio: number;
  /** Rate of the modulator f_m, Hz; positive. */
  readonly modulatorRateHz: number;
}

const needed: SincDecimatorOptions = Object.freeze({
  order: Number.NaN,
  ratio: Number.NaN,
  modulatorRateHz: Number.NaN,
});

/**
 * The sinc^N filter of a delta-sigma converter: |H|² = |sin(πfM/f_m)/(M sin(πf/f_m))|^(2N), which repeats at f_m.
 *
 * Zeros at multiples of f_m/M, except at multiples of f_m, where it passes everything again: a band may run through many
 * modulator rates.
 *
 * @throws OutOfDomainError for an order or ratio out of range or a rate that is not positive and finite.
 * @see E. B. Hogenauer, IEEE Trans. Acoustics, Speech, Signal Processing 29 (1981) 155.
 *
 * @example
 * ```ts
 * import { noiseBandwidth, sincDecimator } from "@quietband/core";
 * noiseBandwidth(sincDecimator({ order: 3, ratio: 256, modulatorRateHz: 1.024e6 })).hz; // → 1100.01
 * ```
 */
export function sincDecimator(options: SincDecimatorOptions): Weighting {
  const { order, ratio, modulatorRateHz } = completeOptions("sincDecimator", needed, options);
  requireWhole("order", order, 1, 12);
  requireWhole("ratio", ratio, 2, 2 ** 30);
  requirePositive("modulatorRateHz", modulatorRateHz, "Hz");
  const lobeHz = modulatorRateHz / ratio;
  return makeLobed({
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
          envelopeAt: (hz: number) => averageEnvelope(turnsAtRate(hz, modulatorRateHz), ratio, order),
          waves: evenSinePower(order, ratio / modulatorRateHz),
        },
      ],
    },
    powerGainAt: (hz: number) => averageGain(turnsAtRate(hz, modulatorRateHz), ratio, order),
  });
}
