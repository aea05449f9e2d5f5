import { makeWeighting } from "./make-weighting.js";
import { soundPoles } from "./sound-poles.js";
import type { Weighting } from "./weighting.js";

/**
 * C weighting of sound levels, exactly 0 dB at 1 kHz: |H|² = g · f⁴/((f² + f₁²)² (f² + f₄²)²).
 *
 * @see IEC 61672-1:2013, annex E.
 *
 * @example
 * ```ts
 * import { cWeighting } from "@quietband/core";
 * 10 * Math.log10(cWeighting().powerGainAt(10000)); // → -4.4055
 * ```
 */
export function cWeighting(): Weighting {
  const [f1, , , f4] = soundPoles;
  const shape = (hz: number): number => {
    const x = hz * hz;
    const ends = (x / (x + f1 * f1)) * (f4 ** 2 / (x + f4 * f4));
    return ends * ends;
  };
  const atOneKilohertz = shape(1000);
  return makeWeighting({
    name: "C weighting",
    knots: [f1, f4],
    lowExponent: -4,
    highExponent: 4,
    rational: {
      gain: f4 ** 4 / atOneKilohertz,
      zerosAtOrigin: 2,
      zeros: [],
      poles: [f1, f1, f4, f4].map((hz) => ({ re: -hz, im: 0 })),
    },
    powerGainAt: (hz: number) => shape(hz) / atOneKilohertz,
  });
}
