import { makeWeighting } from "./make-weighting.js";
import { polesAndZeros } from "./poles-and-zeros.js";
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
  const poles = [f1, f1, f2, f3, f4, f4].map((hz) => ({ re: -hz, im: 0 }));
  return makeWeighting({ ...polesAndZeros({ poles, zerosAtOrigin: 4, atHz: 1000 }), name: "A weighting" });
}
