import { OutOfDomainError } from "@quietband/core";
import type { ReferenceUseRow } from "../chain/reference-noise-by-use.js";
import { refuseUnknownKeys } from "../convert/domain.js";
import { inkPlot } from "./ink-plot.js";
import { layoutLinePlot } from "./line-layout.js";
import type { PlotSeries } from "./line-options.js";
import type { PlotLayout } from "./plot-layout.js";

/** What {@link referenceUsePlot} draws. */
export interface ReferenceUsePlotOptions {
  /** One reference, drawn in its parts, or several, of which the totals are drawn. */
  readonly references: readonly ReferenceByUse[];
  /** A use worth a line of its own, as a share from 0 to 1: 0.5 for half scale. */
  readonly markShare?: number | undefined;
  readonly title?: string | undefined;
  readonly note?: string | undefined;
  /** Pixels, 400 to 4000; 760 unless given. */
  readonly width?: number | undefined;
  /** Pixels, 280 to 4000; 480 unless given. */
  readonly height?: number | undefined;
}

/** One reference's noise against the use of the range, from `referenceNoiseByUse`. */
export interface ReferenceByUse {
  readonly label: string;
  readonly rows: readonly ReferenceUseRow[];
}

/**
 * What a reference costs against the use of the range, as an SVG document: its own noise, all other noise, and both together,
 * from nothing at zero input to full scale. Of several references the totals are drawn. Same input, same text.
 *
 * @param options - see {@link ReferenceUsePlotOptions}.
 * @returns the text of an SVG document.
 * @throws OutOfDomainError for no reference or no rows, a share to mark outside 0..1, an unknown option.
 *
 * @example
 * ```ts
 * import { whiteFlicker } from "@quietband/core";
 * import { referenceNoiseByUse, referenceUsePlot } from "@quietband/figures";
 * const rows = referenceNoiseByUse({
 *   spectrum: whiteFlicker({ floor: 100e-9, cornerHz: 0 }),
 *   referenceVolts: 2.5,
 *   input: { kind: "dc" },
 *   otherRms: 5e-6,
 *   fromHz: 0,
 *   toHz: 10e3,
 * });
 * referenceUsePlot({ references: [{ label: "2.5 V reference", rows }] }).includes("everything else"); // → true
 * ```
 */
export function referenceUsePlot(options: ReferenceUsePlotOptions): string {
  return inkPlot(layoutReferenceUsePlot(options));
}

/** Lays out the plot; nothing drawn yet. */
export function layoutReferenceUsePlot(options: ReferenceUsePlotOptions): PlotLayout {
  refuseUnknownKeys("referenceUsePlot", ["references", "markShare", "title", "note", "width", "height"], options);
  const { references, markShare, ...rest } = options;
  const empty = references.find(({ rows }) => rows.length === 0);
  if (references.length === 0 || empty !== undefined)
    throw new OutOfDomainError(
      `referenceUsePlot needs at least one reference with at least one row; got ${empty === undefined ? "none" : `no rows of "${empty.label}"`}.`,
    );
  if (markShare !== undefined && !(markShare >= 0 && markShare <= 1))
    throw new OutOfDomainError(`markShare must be a share of full scale from 0 to 1; got ${markShare}.`);
  const [only, ...others] = references;
  const lines = others.length === 0 && only !== undefined ? partsOf(only) : references.map(totalOf);
  return layoutLinePlot("referenceUsePlot", {
    ...rest,
    lines,
    x: { title: "input over reference voltage", unit: "%", scale: "linear" },
    y: { title: "noise at the converter's input, RMS", unit: "V", scale: "linear" },
    ...(markShare !== undefined && {
      marks: [{ axis: "x", value: 100 * markShare, label: `${Number((100 * markShare).toPrecision(4))} % used` }],
    }),
  });
}

/** The reference, what else there is, and both together; the reference alone where there is nothing else. */
function partsOf(reference: ReferenceByUse): readonly PlotSeries[] {
  const { label, rows } = reference;
  const others = rows.map(({ rms, totalRms }) => Math.sqrt(Math.max((totalRms - rms) * (totalRms + rms), 0)));
  const alone = seriesOf(
    label,
    rows,
    rows.map(({ rms }) => rms),
  );
  if (others.every((rms) => rms === 0)) return [alone];
  return [seriesOf("together", rows, totalsOf(rows)), alone, seriesOf("everything else", rows, others)];
}

function totalOf({ label, rows }: ReferenceByUse): PlotSeries {
  return seriesOf(label, rows, totalsOf(rows));
}

function totalsOf(rows: readonly ReferenceUseRow[]): readonly number[] {
  return rows.map(({ totalRms }) => totalRms);
}

function seriesOf(label: string, rows: readonly ReferenceUseRow[], y: readonly number[]): PlotSeries {
  return { label, x: rows.map(({ share }) => 100 * share), y };
}
