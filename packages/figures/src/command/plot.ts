import { densityInterval, type FittedCurve, fitCurve, polyline, readBand, runningNoise } from "@quietband/core";
import type { DensityInterval } from "../show/density-options.js";
import { densityPlot } from "../show/density-plot.js";
import { runningNoisePlot } from "../show/running-noise-plot.js";
import type { Command } from "./command.js";
import { beyondOptions, readBeyond, readCurveInput } from "./curve-input.js";
import { modelText } from "./fit.js";
import { quantityOption } from "./typed-values.js";
import { UsageError } from "./usage-error.js";

/** A curve and its model as a picture, or its noise against bandwidth. */
export const plotCommand: Command = {
  name: "plot",
  purpose: "a curve with its model, or its noise against bandwidth, as SVG",
  takes: "<curve>",
  options: [
    { name: "output", value: "FILE", help: "where the SVG goes; standard output unless given" },
    { name: "band", value: "FROM:TO", help: "band to shade, or to run over" },
    { name: "running", value: "", help: "RMS against the upper edge of the band" },
    { name: "from", value: "HZ", help: "fit only points from here up" },
    { name: "to", value: "HZ", help: "fit only points up to here" },
    ...beyondOptions,
    { name: "title", value: "WORDS", help: "heading of the picture" },
  ],
  example: {
    type: "quietband plot R1.csv --to 1kHz --band 0.1Hz:10Hz --output R1.svg",
    answers: "The points of R1.csv with their uncertainty, the model through those up to 1 kHz, and the band shaded.",
  },
  run(parsed, streams) {
    const { curve, name } = readCurveInput("plot", parsed, streams);
    const typed = parsed.one("band");
    const band = typed === undefined ? undefined : readBand(typed);
    const title = parsed.one("title") ?? name;
    const note = curve.source.map(({ key, value }) => (key === "" ? value : `${key}: ${value}`)).join("; ");
    let svg: string;
    if (parsed.has("running")) {
      if (band === undefined)
        throw new UsageError("quietband plot --running needs the band to run over: --band 0.1Hz:1kHz.");
      const edgesHz = edgesBetween(band.fromHz, band.toHz);
      const running = runningNoise(polyline(curve, { beyond: readBeyond(parsed) }), { fromHz: band.fromHz, edgesHz });
      svg = runningNoisePlot({ curves: [{ label: name, edgesHz, rms: running.rms }], unit: curve.unit, title, note });
    } else {
      const fit = fitCurve(curve, {
        fromHz: quantityOption(parsed, "from", "Hz"),
        toHz: quantityOption(parsed, "to", "Hz"),
        beyond: "segments",
      });
      svg = densityPlot({
        curves: [curve],
        models: [{ spectrum: fit, label: modelText(fit) }],
        band,
        floor: fit.floor,
        cornerHz: fit.cornerHz === 0 ? undefined : fit.cornerHz,
        interval: { ...intervalOf(fit), label: "95 % of the model" },
        suspected: fit.misreadings.map(({ frequency }) => frequency),
        title,
        note,
      });
    }
    const path = parsed.one("output");
    if (path === undefined) streams.print(svg);
    else streams.writeFile(path, svg);
  },
};

/** Where the model lies with 95 % coverage, over the points it was fitted to. */
function intervalOf(fit: FittedCurve): Pick<DensityInterval, "frequencies" | "lower" | "upper"> {
  const degreesOfFreedom = fit.chiSquarePerDegree > 1 ? fit.degreesOfFreedom : undefined;
  const { frequencies, lower, upper } = densityInterval(fit, { degreesOfFreedom });
  return { frequencies, lower, upper };
}

/** Forty edges a decade, the last one exact. */
function edgesBetween(fromHz: number, toHz: number): number[] {
  if (!(fromHz > 0 && toHz < Number.POSITIVE_INFINITY))
    throw new UsageError("quietband plot --running needs a band with finite edges above 0 Hz.");
  const steps = Math.max(2, Math.ceil(40 * Math.log10(toHz / fromHz)));
  return Array.from({ length: steps }, (_, k) =>
    k === steps - 1 ? toHz : fromHz * (toHz / fromHz) ** ((k + 1) / steps),
  );
}
