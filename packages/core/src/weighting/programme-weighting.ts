import { withConjugates } from "./conjugates.js";
import { makeWeighting } from "./make-weighting.js";
import { polesAndZeros } from "./poles-and-zeros.js";
import type { ComplexHz, Weighting } from "./weighting.js";

/**
 * Poles of the network in Hz from the element values of Fig. 1a, one of each conjugate pair: fixtures/reference/make-programme-poles.py.
 * Published ones in rad/s move the gain by 2e-14.
 */
const upperPoles: readonly ComplexHz[] = Object.freeze([
  { re: -4122.702066134761, im: 0 },
  { re: -3758.5291630107304, im: 5790.042336608951 },
  { re: -9975.063123930293, im: 0 },
  { re: -2983.1599378906703, im: 9940.842645709556 },
]);

/**
 * Programme weighting of audio noise: the network of ITU-R BS.468-4, 0 dB at 1 kHz and +12.2 dB at 6.3 kHz.
 *
 * This is the response only. The recommendation reads it with a quasi-peak meter; through `bandNoise` it gives the true
 * quadrature sum, which for white noise reads lower. Say which one a figure is.
 *
 * @see Recommendation ITU-R BS.468-4 (1986), Fig. 1a.
 *
 * @example
 * ```ts
 * import { programmeWeighting } from "@quietband/core";
 * 10 * Math.log10(programmeWeighting().powerGainAt(6300)); // → 12.217
 * ```
 */
export function programmeWeighting(): Weighting {
  const poles = withConjugates(upperPoles);
  return makeWeighting({ ...polesAndZeros({ poles, zerosAtOrigin: 1, atHz: 1000 }), name: "programme weighting" });
}
