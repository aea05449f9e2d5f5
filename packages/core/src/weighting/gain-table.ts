import { MalformedDataError, OutOfDomainError } from "../ground/errors.js";
import { type PowerLawPiece, termAt } from "../numerics/power-law.js";
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
  const pieces = rows.slice(1).map((high, index) => pieceBetween(rows[index] as GainTableRow, high));
  const upperEdges = Float64Array.from(pieces, (piece) => piece.to);
  const terms = pieces.map((piece) => piece.terms[0] as PowerLawPiece["terms"][number]);
  const support = [(pieces[0] as PowerLawPiece).from, upperEdges.at(-1) as number] as const;
  return makeWeighting({
    name: `gain table, ${rows.length} rows`,
    support,
    knots: [...upperEdges],
    lowExponent: (terms[0] as (typeof terms)[number]).exponent,
    highExponent: (terms.at(-1) as (typeof terms)[number]).exponent,
    pieces,
    powerGainAt(hz: number): number {
      if (!(hz >= support[0] && hz <= support[1]))
        throw new OutOfDomainError(
          `The gain table is defined from ${support[0]} Hz to ${support[1]} Hz; got ${hz} Hz; give rows that reach so far.`,
        );
      let low = 0;
      let high = upperEdges.length - 1;
      while (low < high) {
        const middle = (low + high) >> 1;
        if ((upperEdges[middle] as number) < hz) low = middle + 1;
        else high = middle;
      }
      return termAt(terms[low] as (typeof terms)[number], hz);
    },
  });
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
