import { layoutDensityPlot } from "./density-layout.js";
import type { DensityPlotOptions } from "./density-options.js";
import { inkPlot } from "./ink-plot.js";

/**
 * A noise density over frequency, both logarithmic, as an SVG document: points with their standard uncertainty, models
 * with floor and corner, the band of interest shaded. The same input gives the same text.
 *
 * Everything is told apart without colour: markers, dashes, and labels beside the lines. Of many curves the first ones
 * are labelled, as many as fit and can be told apart; the rest are drawn faint and counted.
 *
 * @param options - see {@link DensityPlotOptions}; all curves and models in one unit.
 * @returns the text of an SVG document.
 * @throws OutOfDomainError for nothing to draw, mixed units, an unknown option, a band or interval out of order, or
 * models whose frequency range nothing bounds.
 *
 * @example
 * ```ts
 * import { whiteFlicker } from "@quietband/core";
 * import { densityPlot } from "@quietband/figures";
 * const model = { spectrum: whiteFlicker({ floor: 70e-9, cornerHz: 60 }), label: "floor 70 nV/√Hz, corner 60 Hz" };
 * const svg = densityPlot({ models: [model], band: { fromHz: 0.1, toHz: 10 }, floor: 70e-9, cornerHz: 60 });
 * svg.slice(0, 4); // → <svg
 * ```
 */
export function densityPlot(options: DensityPlotOptions): string {
  return inkPlot(layoutDensityPlot(options));
}
