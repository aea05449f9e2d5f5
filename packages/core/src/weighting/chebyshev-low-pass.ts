import { requireBetween, requirePositive, requireWhole } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { atScale, squaredSize, withConjugates } from "./conjugates.js";
import { inName, makeWeighting } from "./make-weighting.js";
import type { ComplexHz, Weighting } from "./weighting.js";

/** What {@link chebyshevLowPass} takes. */
export interface ChebyshevLowPassOptions {
  /** Number of poles n, 1 to 12. */
  readonly order: number;
  /** Ripple of the pass band, dB; above 0, at most 30. */
  readonly rippleDb: number;
  /** End of the ripple band, Hz, where the gain leaves it for good; not the half-power frequency. */
  readonly edgeHz: number;
}

const needed: ChebyshevLowPassOptions = Object.freeze({
  order: Number.NaN,
  rippleDb: Number.NaN,
  edgeHz: Number.NaN,
});

/**
 * Chebyshev I low-pass: |H|² = 1/(1 + ε² T_n(f/edgeHz)²), ε² = 10^(rippleDb/10) − 1.
 *
 * Peak gain 1; an even order starts at −rippleDb. Other tables are normalised to dc or to the half-power frequency: this one
 * by its ripple edge.
 *
 * @throws OutOfDomainError for an order out of range, a ripple outside (0, 30] dB, an edge that is not positive and finite.
 * @see H. J. Blinchikoff, A. I. Zverev, Filtering in the Time and Frequency Domains, 1976, section 3.3.
 *
 * @example
 * ```ts
 * import { chebyshevLowPass, noiseBandwidth } from "@quietband/core";
 * const filter = chebyshevLowPass({ order: 3, rippleDb: 0.1, edgeHz: 1 });
 * filter.powerGainAt(1); // → 0.977237
 * noiseBandwidth(filter, { relativeTo: "peak" }).hz; // → 1.441787
 * ```
 */
export function chebyshevLowPass(options: ChebyshevLowPassOptions): Weighting {
  const { order, rippleDb, edgeHz } = completeOptions("chebyshevLowPass", needed, options);
  requireWhole("order", order, 1, 12);
  requireBetween("rippleDb", rippleDb, [0, 30], { low: true, unit: "dB" });
  requirePositive("edgeHz", edgeHz, "Hz");
  const ripplePower = Math.expm1((rippleDb * Math.LN10) / 10);
  const poles = atScale(edgeHz, chebyshevPoles(order, ripplePower));
  const dcGain = order % 2 === 0 ? 1 / (1 + ripplePower) : 1;
  return makeWeighting({
    name: `Chebyshev low-pass, order ${order}, ${inName(rippleDb)} dB, ${inName(edgeHz)} Hz`,
    knots: [edgeHz, ...poles.flatMap(({ re, im }) => [im, im - re])],
    lowExponent: 0,
    highExponent: 2 * order,
    rational: { gain: dcGain * squaredSize(poles), zerosAtOrigin: 0, zeros: [], poles },
    powerGainAt(hz: number): number {
      const polynomial = chebyshevPolynomial(order, hz / edgeHz);
      return 1 / (1 + ripplePower * polynomial * polynomial);
    },
  });
}

/** T_n by its recurrence, which loses digits neither at the edge, as acos would, nor in the stop band, as cosh would. */
function chebyshevPolynomial(order: number, u: number): number {
  let before = 1;
  let value = u;
  for (let n = 2; n <= order && value < 1e200; n += 1) [before, value] = [value, 2 * u * value - before];
  return value;
}

/** −sinh(a) sin θ + i cosh(a) cos θ, a = asinh(1/ε)/n, θ = π(2k − 1)/(2n). */
function chebyshevPoles(order: number, ripplePower: number): ComplexHz[] {
  const a = Math.asinh(1 / Math.sqrt(ripplePower)) / order;
  const upper = Array.from({ length: Math.ceil(order / 2) }, (_, index) => {
    const angle = (Math.PI * (2 * index + 1)) / (2 * order);
    const real = 2 * index + 1 === order;
    return { re: -Math.sinh(a) * Math.sin(angle), im: real ? 0 : Math.cosh(a) * Math.cos(angle) };
  });
  return withConjugates(upper);
}
