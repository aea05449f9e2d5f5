import { makeWeighting } from "./make-weighting.js";
import { soundPoles } from "./sound-poles.js";
import type { Weighting } from "./weighting.js";

/**
 * A weighting of sound levels, exactly 0 dB at 1 kHz: |H|² = g · f⁸/((f² + f₁²)² (f² + f₂²)(f² + f₃²)(f² + f₄²)²).
 *
 * Its poles come from the relations that define them, not from the printed roundings. The standard's table holds at the exact
 * base-10 frequencies, not at the nominal labels: at "16 kHz" they differ by 0.28 dB.
 *
 * @see IEC 61672-1:2013, annex E.
 *
 * @example
 * ```ts
 * import { aWeighting } from "@quietband/core";
 * 10 * Math.log10(aWeighting().powerGainAt(100)); // → -19.1428
 * ```
 */
export function aWeighting(): Weighting {
  const [f1, f2, f3, f4] = soundPoles;
  const shape = (hz: number): number => {
    const x = hz * hz;
    const ends = (x / (x + f1 * f1)) * (f4 ** 2 / (x + f4 * f4));
    return ends * ends * (x / (x + f2 * f2)) * (x / (x + f3 * f3));
  };
  const atOneKilohertz = shape(1000);
  return makeWeighting({
    name: "A weighting",
    knots: [f1, f2, f3, f4],
    lowExponent: -8,
    highExponent: 4,
    rational: {
      gain: f4 ** 4 / atOneKilohertz,
      zerosAtOrigin: 4,
      zeros: [],
      poles: [f1, f1, f2, f3, f4, f4].map((hz) => ({ re: -hz, im: 0 })),
    },
    powerGainAt: (hz: number) => shape(hz) / atOneKilohertz,
  });
}
