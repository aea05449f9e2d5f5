import { gainTable } from "./gain-table.js";
import { makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/** Table 1 of ITU-T O.41 (10/94): Hz, dB re 800 Hz. */
const rows: readonly (readonly [number, number])[] = Object.freeze([
  [16.66, -85],
  [50, -63],
  [100, -41],
  [200, -21],
  [300, -10.6],
  [400, -6.3],
  [500, -3.6],
  [600, -2],
  [700, -0.9],
  [800, 0],
  [900, 0.6],
  [1000, 1],
  [1200, 0],
  [1400, -0.9],
  [1600, -1.7],
  [1800, -2.4],
  [2000, -3],
  [2500, -4.2],
  [3000, -5.6],
  [3500, -8.5],
  [4000, -15],
  [4500, -25],
  [5000, -36],
  [6000, -43],
]);

/**
 * Telephone-circuit (psophometric) weighting, 0 dB at 800 Hz: the table of ITU-T O.41, dB straight against log f between its
 * rows, not defined outside 16.66 Hz to 6 kHz.
 *
 * @see Recommendation ITU-T O.41 (10/94), Table 1.
 *
 * @example
 * ```ts
 * import { telephoneWeighting } from "@quietband/core";
 * 10 * Math.log10(telephoneWeighting().powerGainAt(1000)); // → 1.000
 * ```
 */
export function telephoneWeighting(): Weighting {
  return makeWeighting({
    ...gainTable(rows.map(([frequencyHz, gainDb]) => ({ frequencyHz, gainDb }))),
    name: "telephone weighting",
  });
}
