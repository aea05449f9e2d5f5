import { inkPlot } from "./ink-plot.js";
import { layoutLinePlot } from "./line-layout.js";
import type { LinePlotOptions } from "./line-options.js";

/**
 * Lines over a common axis as an SVG document: anything against anything, each axis linear or logarithmic. What a
 * report draws besides densities: reference noise against input, a skirt, a two-sample deviation. Same input, same text.
 *
 * On a linear axis that shows only values of one sign the axis starts at zero, but for levels in dB. On a logarithmic axis
 * zero and negative values interrupt the line.
 *
 * @param options - see {@link LinePlotOptions}.
 * @returns the text of an SVG document.
 * @throws OutOfDomainError for no line, lists of different length, nothing that can be shown, an unknown option.
 *
 * @example
 * ```ts
 * import { linePlot } from "@quietband/figures";
 * const svg = linePlot({
 *   lines: [{ label: "10 µV reference noise", x: [0, 2.5], y: [0, 10e-6] }],
 *   x: { title: "input", unit: "V", scale: "linear" },
 *   y: { title: "noise seen, RMS", unit: "V", scale: "linear" },
 * });
 * svg.includes("noise seen, RMS"); // → true
 * ```
 */
export function linePlot(options: LinePlotOptions): string {
  return inkPlot(layoutLinePlot("linePlot", options));
}
