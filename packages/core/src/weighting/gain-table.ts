import { MalformedDataError, OutOfDomainError } from "../ground/errors.js";
import type { PowerLawPiece } from "../numerics/power-law.js";
import { logRatio } from "../numerics/power-law-integral.js";
import { makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/** One row of a {@link gainTable}. */
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
  requireRows(rows);
  const table = rows.map(({ frequencyHz, gainDb }) => ({ frequencyHz, gainDb }));
  const pieces = table.slice(1).map((high, index) => pieceBetween(table[index] as GainTableRow, high));
  const frequencies = Float64Array.from(table, ({ frequencyHz }) => frequencyHz);
  const first = frequencies[0] as number;
  const last = frequencies.at(-1) as number;
  return makeWeighting({
    name: `gain table, ${table.length} rows`,
    support: [first, last],
    knots: [...frequencies],
    lowExponent: exponentOf(pieces[0]),
    highExponent: exponentOf(pieces.at(-1)),
    pieces,
    powerGainAt(hz: number): number {
      if (!(hz >= first && hz <= last))
        throw new OutOfDomainError(
          `The gain table is defined from ${first} Hz to ${last} Hz; got ${hz} Hz; give rows that reach so far.`,
        );
      let below = 0;
      let above = frequencies.length - 1;
      while (above - below > 1) {
        const middle = (below + above) >> 1;
        if ((frequencies[middle] as number) <= hz) below = middle;
        else above = middle;
      }
      // By the share of the way, not by the slope: a step of 40 dB within a part in 1e4 keeps its digits.
      const low = table[below] as GainTableRow;
      const high = table[above] as GainTableRow;
      const share = logRatio(low.frequencyHz, hz) / logRatio(low.frequencyHz, high.frequencyHz);
      return 10 ** ((low.gainDb + share * (high.gainDb - low.gainDb)) / 10);
    },
  });
}

function exponentOf(piece: PowerLawPiece | undefined): number {
  return piece?.terms[0]?.exponent ?? 0;
}

function requireRows(rows: readonly GainTableRow[]): void {
  if (!Array.isArray(rows)) throw new MalformedDataError("A gain table needs a list of rows; got none.");
  if (rows.length < 2) throw new MalformedDataError(`A gain table needs at least two rows; got ${rows.length}.`);
  let before = 0;
  for (const [index, { frequencyHz, gainDb }] of (rows as readonly GainTableRow[]).entries()) {
    if (!(frequencyHz > before && frequencyHz < Number.POSITIVE_INFINITY && Number.isFinite(gainDb)))
      throw new MalformedDataError(
        `Row ${index + 1} of a gain table needs a finite frequencyHz above ${before} Hz and a finite gainDb; got ${frequencyHz} Hz and ${gainDb} dB.`,
        { index },
      );
    before = frequencyHz;
  }
}

/** Anchored at the end that holds most of its integral. */
function pieceBetween(low: GainTableRow, high: GainTableRow): PowerLawPiece {
  const exponent = ((low.gainDb - high.gainDb) * Math.LN10) / 10 / logRatio(low.frequencyHz, high.frequencyHz);
  const anchor = exponent > 1 ? low : high;
  const term = { at: anchor.frequencyHz, level: 10 ** (anchor.gainDb / 10), exponent };
  return { from: low.frequencyHz, to: high.frequencyHz, terms: [term] };
}
