import { OutOfDomainError } from "@quietband/core";
import { refuseUnknownKeys } from "../convert/domain.js";
import { positiveExtent } from "./extent.js";
import { inkPlot } from "./ink-plot.js";
import { layoutLinePlot } from "./line-layout.js";
import type { PlotMark } from "./line-options.js";
import type { PlotLayout } from "./plot-layout.js";

/** What {@link runningNoisePlot} draws. */
export interface RunningNoisePlotOptions {
  readonly curves: readonly RunningNoiseCurve[];
  /** Unit of the RMS values. */
  readonly unit: string;
  /** The band edge that moves: toHz (more bandwidth, the default) or fromHz (watching longer). */
  readonly moving?: "toHz" | "fromHz" | undefined;
  /** Values worth a line of their own: a chosen edge (x, Hz) or a target (y, in `unit`). */
  readonly marks?: readonly PlotMark[] | undefined;
  readonly title?: string | undefined;
  readonly note?: string | undefined;
  /** Pixels, 400 to 4000; 760 unless given. */
  readonly width?: number | undefined;
  /** Pixels, 280 to 4000; 480 unless given. */
  readonly height?: number | undefined;
}

/** RMS over ascending band edges; as many values as edges. */
export interface RunningNoiseCurve {
  readonly label: string;
  /** Hz. */
  readonly edgesHz: readonly number[];
  /** In the plot's unit. */
  readonly rms: readonly number[];
}

/**
 * RMS noise against bandwidth as an SVG document. The frequency axis is logarithmic; the RMS axis too where the values
 * span more than a factor ten, else it is linear from zero. Same input, same text.
 *
 * @param options - see {@link RunningNoisePlotOptions}.
 * @returns the text of an SVG document.
 * @throws OutOfDomainError for no curve, lists of different length, no value above zero, an unknown option.
 *
 * @example
 * ```ts
 * import { runningNoisePlot } from "@quietband/figures";
 * const white = { label: "10 nV/√Hz", edgesHz: [1, 100, 1e4], rms: [10e-9, 100e-9, 1e-6] };
 * runningNoisePlot({ curves: [white], unit: "V" }).slice(0, 4); // → <svg
 * ```
 */
export function runningNoisePlot(options: RunningNoisePlotOptions): string {
  return inkPlot(layoutRunningNoisePlot(options));
}

/** Ratio of largest to smallest RMS from which the axis is logarithmic. */
const logFrom = 10;

/** Lays out the plot; nothing drawn yet. */
export function layoutRunningNoisePlot(options: RunningNoisePlotOptions): PlotLayout {
  refuseUnknownKeys(
    "runningNoisePlot",
    ["curves", "unit", "moving", "marks", "title", "note", "width", "height"],
    options,
  );
  const { curves, unit, moving = "toHz", ...rest } = options;
  const extent = positiveExtent(curves.flatMap(({ rms }) => rms));
  if (curves.length > 0 && extent === undefined)
    throw new OutOfDomainError(`runningNoisePlot needs an RMS above zero, in ${unit}, somewhere; got none.`);
  const scale = extent !== undefined && extent[1] > logFrom * extent[0] ? "log" : "linear";
  return layoutLinePlot("runningNoisePlot", {
    ...rest,
    lines: curves.map(({ label, edgesHz, rms }) => ({ label, x: edgesHz, y: rms })),
    x: { title: `${moving === "toHz" ? "upper" : "lower"} band edge`, unit: "Hz", scale: "log" },
    y: { title: "RMS noise", unit, scale },
  });
}
