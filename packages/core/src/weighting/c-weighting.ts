import { makeWeighting } from "./make-weighting.js";
import { polesAndZeros } from "./poles-and-zeros.js";
import { soundPoles } from "./sound-poles.js";
import type { Weighting } from "./weighting.js";

/**
 * C weighting of sound levels, exactly 0 dB at 1 kHz: |H|² = g · f⁴/((f² + f₁²)² (f² + f₄²)²).
 *
 * Poles and frequencies as in {@link aWeighting}.
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
  const poles = [f1, f1, f4, f4].map((hz) => ({ re: -hz, im: 0 }));
  return makeWeighting({ ...polesAndZeros({ poles, zerosAtOrigin: 2, atHz: 1000 }), name: "C weighting" });
}
