import { composePlot } from "./compose-plot.js";
import { describeDensity } from "./density-description.js";
import { densityRange, frequencyRange } from "./density-domain.js";
import { layoutMarks } from "./density-marks.js";
import { checkDensityOptions, type DensityPlotOptions } from "./density-options.js";
import { layoutSeries } from "./density-series.js";
import type { Frame } from "./frame.js";
import type { KeyEntry } from "./key.js";
import type { PlotArea, PlotLayout } from "./plot-layout.js";
import { pictureSize } from "./plot-options.js";
import { seriesStyle } from "./series-style.js";
import { tickLabel } from "./tick-label.js";

/** Lays out a density plot: every position in pixels, every text, nothing drawn yet. */
export function layoutDensityPlot(options: DensityPlotOptions): PlotLayout {
  const unit = checkDensityOptions(options);
  const { title = "", note = "" } = options;
  const frequencies = frequencyRange(options);
  const densities = densityRange(options, frequencies);
  const plan = {
    ...pictureSize(options),
    title,
    note,
    x: { kind: "log", domain: frequencies, title: "frequency", label: tickLabel("Hz") },
    y: {
      kind: "log",
      domain: densities,
      title: "noise density",
      label: tickLabel(`${unit}/√Hz`),
    },
  } as const;
  return composePlot(
    plan,
    { title: title || "Noise density", description: describeDensity(options, unit, frequencies) },
    (frame) => {
      const { lines, markers, entries, unnamed } = layoutSeries(options, frame);
      return {
        areas: intervalArea(options, frame),
        lines,
        markers,
        guides: layoutMarks(options, unit, frame, markers),
        entries: [...entries, ...intervalEntry(options)],
        unnamed,
      };
    },
  );
}

function intervalEntry({ interval }: DensityPlotOptions): readonly KeyEntry[] {
  return interval === undefined
    ? []
    : [{ label: interval.label, swatch: { colour: seriesStyle(0).colour, fill: true } }];
}

function intervalArea({ interval }: DensityPlotOptions, { x, y }: Frame): readonly PlotArea[] {
  if (interval === undefined) return [];
  const { frequencies, lower, upper } = interval;
  return [
    {
      x: frequencies.map((hz) => x.at(hz)),
      upper: upper.map((density) => y.at(density)),
      lower: lower.map((density) => y.at(density)),
      colour: seriesStyle(0).colour,
    },
  ];
}
