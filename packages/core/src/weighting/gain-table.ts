import { MalformedDataError } from "../ground/errors.js";
import { termAt } from "../numerics/power-law.js";
import { logRatio } from "../numerics/power-law-integral.js";
import { makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/** One row of a gain table. */
export interface GainTableRow {
  /** Hz, positive, ascending from row to row. */
  readonly frequencyHz: number;
  /** Power gain in dB. */
  readonly gainDb: number;
}

/**
 * A measured or published response: power gain 10^(gainDb/10), dB straight against log f between the rows, not defined beyond
 * them. A table is power laws on intervals, so power-law spectra integrate through it exactly.
 *
 * @param rows - at least two, frequencies positive and ascending.
 * @throws MalformedDataError for fewer than two rows, or a row out of order or not finite, with its index.
 *
 * @example
 * ```ts
 * import { gainTable } from "@quietband/core";
 * const measured = gainTable([{ frequencyHz: 10, gainDb: 0 }, { frequencyHz: 1000, gainDb: -40 }]);
 * measured.powerGainAt(100); // → 0.010000
 * ```
 */
export function gainTable(rows: readonly GainTableRow[]): Weighting {
  if (rows.length < 2) throw new MalformedDataError(`A gain table needs at least two rows; got ${rows.length}.`);
  for (const [index, { frequencyHz, gainDb }] of rows.entries()) {
    const before = rows[index - 1]?.frequencyHz ?? 0;
    if (!(frequencyHz > before && frequencyHz < Number.POSITIVE_INFINITY && Number.isFinite(gainDb)))
      throw new MalformedDataError(
        `Row ${index + 1} of a gain table needs a finite frequency above ${before} Hz and a finite gain in dB; got ${frequencyHz} Hz, ${gainDb} dB.`,
        { index },
      );
  }
  const edges = rows.map(({ frequencyHz }) => frequencyHz);
  const pieces = rows.slice(1).map((high, index) => {
    const low = rows[index] as GainTableRow;
    const exponent = ((low.gainDb - high.gainDb) * Math.LN10) / 10 / logRatio(low.frequencyHz, high.frequencyHz);
    const anchor = exponent > 1 ? low : high;
    const term = Object.freeze({ at: anchor.frequencyHz, level: 10 ** (anchor.gainDb / 10), exponent });
    return Object.freeze({ from: low.frequencyHz, to: high.frequencyHz, terms: Object.freeze([term]) });
  });
  const [first, last] = [edges[0] as number, edges.at(-1) as number];
  return makeWeighting({
    name: `gain table, ${rows.length} rows`,
    support: [first, last],
    knots: edges,
    lowExponent: 0,
    highExponent: 0,
    pieces: Object.freeze(pieces),
    powerGainAt(hz: number): number {
      let low = 0;
      let high = pieces.length - 1;
      while (low < high) {
        const middle = (low + high) >> 1;
        if ((pieces[middle]?.to ?? 0) < hz) low = middle + 1;
        else high = middle;
      }
      const term = pieces[low]?.terms[0];
      if (term === undefined || !(hz >= first && hz <= last))
        throw new MalformedDataError(`The gain table is defined from ${first} Hz to ${last} Hz; got ${hz} Hz.`);
      return termAt(term, hz);
    },
  });
}
