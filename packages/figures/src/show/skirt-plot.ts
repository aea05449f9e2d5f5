import { OutOfDomainError, type Spectrum, writeQuantity } from "@quietband/core";
import { skirtInBin } from "../chain/skirt-in-bin.js";
import { refuseUnknownKeys, requirePositive } from "../convert/domain.js";
import { inkPlot } from "./ink-plot.js";
import { layoutLinePlot } from "./line-layout.js";
import type { PlotSeries } from "./line-options.js";
import type { PlotLayout } from "./plot-layout.js";

/** What {@link skirtPlot} draws. */
export interface SkirtPlotOptions {
  readonly references: readonly SkirtReference[];
  readonly toneHz: number;
  /** Width of a bin, Hz: rate over length of a transform, times the window's noise bandwidth; 1 Hz unless given. */
  readonly binHz?: number | undefined;
  /** How far from the tone the picture goes, Hz; a hundred bins, but no more than up to 0 Hz, unless given. */
  readonly spanHz?: number | undefined;
  readonly title?: string | undefined;
  readonly note?: string | undefined;
  /** Pixels, 400 to 4000; 760 unless given. */
  readonly width?: number | undefined;
  /** Pixels, 280 to 4000; 480 unless given. */
  readonly height?: number | undefined;
}

/** A reference whose skirt is drawn. */
export interface SkirtReference {
  readonly label: string;
  /** Its noise, V²/Hz. */
  readonly spectrum: Spectrum;
  readonly referenceVolts: number;
}

/**
 * The skirt that reference noise makes around a tone, as an SVG document: power in each bin over the power of the tone, in
 * dB, against the offset from the tone. It is the same for a tone of any amplitude, so it looks like noise of the signal.
 * The bins beside the tone are left out as far as they would touch it. Same input, same text.
 *
 * @param options - see {@link SkirtPlotOptions}.
 * @returns the text of an SVG document.
 * @throws OutOfDomainError for no reference, values that are not positive, a span of less than two bins or beyond the tone, an
 *   unknown option; the errors of `bandNoise` where a reference's points do not reach the offsets.
 *
 * @example
 * ```ts
 * import { whiteFlicker } from "@quietband/core";
 * import { skirtPlot } from "@quietband/figures";
 * const spectrum = whiteFlicker({ floor: 100e-9, cornerHz: 10 });
 * const svg = skirtPlot({ references: [{ label: "2.5 V reference", spectrum, referenceVolts: 2.5 }], toneHz: 1e3 });
 * svg.includes("noise in 1 Hz over the tone"); // → true
 * ```
 */
export function skirtPlot(options: SkirtPlotOptions): string {
  return inkPlot(layoutSkirtPlot(options));
}

const optionNames: readonly (keyof SkirtPlotOptions)[] = [
  ...(["references", "toneHz", "binHz", "spanHz", "title", "note", "width", "height"] as const),
];

/** Lays out the plot; nothing drawn yet. */
export function layoutSkirtPlot(options: SkirtPlotOptions): PlotLayout {
  refuseUnknownKeys("skirtPlot", optionNames, options);
  const { references, toneHz, binHz = 1, spanHz, title, ...rest } = options;
  requirePositive("toneHz", toneHz, "Hz");
  requirePositive("binHz", binHz, "Hz");
  if (references.length === 0) throw new OutOfDomainError("skirtPlot needs at least one reference; got none.");
  const span = spanHz ?? Math.min(100 * binHz, toneHz - 0.5 * binHz);
  if (!(span >= 2 * binHz && span + 0.5 * binHz <= toneHz))
    throw new OutOfDomainError(
      `spanHz must be from two bins, ${2 * binHz} Hz, up to the tone less half a bin, ${toneHz - 0.5 * binHz} Hz; got ${span}.`,
    );
  const offsets = offsetsUpTo(span, binHz);
  const bin = writeQuantity(binHz, "Hz");
  return layoutLinePlot("skirtPlot", {
    ...rest,
    title: title ?? `Skirt around a tone of ${writeQuantity(toneHz, "Hz")}`,
    lines: references.map((reference) => skirtOf(reference, toneHz, binHz, offsets)),
    x: { title: "offset from the tone", unit: "Hz", scale: "linear" },
    y: { title: `noise in ${bin} over the tone`, unit: "dB", scale: "linear" },
    marks: [{ axis: "x", value: 0, label: "tone" }],
  });
}

/** Offsets of bins on one side, closer together near the tone, where a 1/f skirt bends. */
function offsetsUpTo(span: number, binHz: number): readonly number[] {
  const steps = 60;
  const ratio = Math.log(span / binHz);
  return Array.from({ length: steps + 1 }, (_, k) => (k === steps ? span : binHz * Math.exp((ratio * k) / steps)));
}

function skirtOf(
  { label, spectrum, referenceVolts }: SkirtReference,
  toneHz: number,
  binHz: number,
  offsets: readonly number[],
): PlotSeries {
  const levelAt = (offsetHz: number): number =>
    // the ratio is the same at every amplitude
    -skirtInBin({ spectrum, referenceVolts, toneHz, amplitude: referenceVolts, offsetHz, binHz }).snrDb;
  const below = offsets.map((offset) => -offset).toReversed();
  return {
    label,
    x: [...below, 0, ...offsets],
    // no bin holds the tone: the line breaks there
    y: [...below.map(levelAt), Number.NaN, ...offsets.map(levelAt)],
  };
}
