import { makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/** Poles of the network in rad/s, computed from the element values of Fig. 1a; one of each conjugate pair. */
const realPoles: readonly number[] = Object.freeze([25903.70104781628, 62675.1700584679]);
const pairs: readonly (readonly [number, number])[] = Object.freeze([
  [23615.53521363528, 36379.90893732929] as const,
  [18743.74669072136, 62460.15645250649] as const,
]);

/**
 * Programme weighting of audio noise (ITU-R BS.468-4), the network of its Fig. 1a, 0 dB at 1 kHz, +12.2 dB at 6.3 kHz.
 *
 * This is the response only. The recommendation reads it with a quasi-peak meter; through `bandNoise` it gives the true
 * quadrature sum, which for white noise reads lower. Say which one a figure is.
 *
 * @see Recommendation ITU-R BS.468-4 (1986).
 *
 * @example
 * ```ts
 * import { programmeWeighting } from "@quietband/core";
 * 10 * Math.log10(programmeWeighting().powerGainAt(6300)); // → 12.217
 * ```
 */
export function programmeWeighting(): Weighting {
  const turn = 2 * Math.PI;
  const poles = [
    ...realPoles.map((rate) => ({ re: -rate / turn, im: 0 })),
    ...pairs.flatMap(([re, im]) => [
      { re: -re / turn, im: im / turn },
      { re: -re / turn, im: -im / turn },
    ]),
  ];
  const squares = poles.filter(({ im }) => im > 0).map(({ re, im }) => ({ size: Math.hypot(re, im), re }));
  const shape = (hz: number): number => {
    let value = hz * hz;
    for (const rate of realPoles) value /= hz * hz + (rate / turn) ** 2;
    for (const { size, re } of squares) {
      const off = (size - hz) * (size + hz);
      value /= off * off + 4 * re * re * hz * hz;
    }
    return value;
  };
  const atOneKilohertz = shape(1000);
  return makeWeighting({
    name: "programme weighting",
    knots: poles.flatMap(({ re, im }) => [Math.hypot(re, im), Math.abs(im)]).filter((hz) => hz > 0),
    lowExponent: -2,
    highExponent: 10,
    rational: { gain: 1 / atOneKilohertz, zerosAtOrigin: 1, zeros: [], poles },
    powerGainAt: (hz: number) => shape(hz) / atOneKilohertz,
  });
}
