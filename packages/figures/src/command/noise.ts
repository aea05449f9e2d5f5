import { bandNoise, cascade, polyline, readBand, writeQuantity } from "@quietband/core";
import type { Command } from "./command.js";
import { beyondOptions, provenanceLines, readBeyond, readCurveInput } from "./curve-input.js";
import { figureLines, figureOptions, inColumns, noiseFigures } from "./noise-figures.js";
import { readThrough, throughKinds } from "./through.js";
import { UsageError } from "./usage-error.js";

/** Noise of a curve in a band, through a filter, as the figures a review asks for. */
export const noiseCommand: Command = {
  name: "noise",
  purpose: "noise of a curve in a band: RMS, peak-to-peak, dB, bits",
  takes: "<curve>",
  options: [
    { name: "band", value: "FROM:TO", help: "the band, for instance 0.1Hz:10Hz; inf where a filter ends it" },
    {
      name: "through",
      value: "FILTER",
      help: `a filter in words, for instance "Butterworth low-pass, order 2, 5 Hz"; may be repeated; known are: ${throughKinds().join("; ")}`,
      repeats: true,
    },
    ...beyondOptions,
    ...figureOptions,
    { name: "json", value: "", help: "everything as JSON" },
  ],
  example: {
    type: "quietband noise R1.csv --band 0.1Hz:10Hz --range 8.192V --bits 24",
    answers: "How much noise the points of R1.csv leave between 0.1 Hz and 10 Hz, and how many bits that is.",
  },
  run(parsed, streams) {
    const typed = parsed.one("band");
    if (typed === undefined) throw new UsageError("quietband noise needs a band: --band 0.1Hz:10Hz.");
    const { fromHz, toHz } = readBand(typed);
    const { curve, name } = readCurveInput("noise", parsed, streams);
    const weighting = readThrough(parsed.all("through"));
    const spectrum = polyline(curve, { beyond: readBeyond(parsed) });
    const noise = bandNoise(spectrum, { fromHz, toHz, weighting });
    const figures = noiseFigures(noise, parsed);
    if (parsed.has("json")) {
      streams.print(
        `${JSON.stringify({ curve: name, source: curve.source, through: weighting?.name, noise, figures }, undefined, 2)}\n`,
      );
      return;
    }
    const through = weighting === undefined ? "" : ` through ${cascade(weighting).name}`;
    const { below, above } = noise.outsidePoints;
    const outside =
      below + above > 0 ? [`  ${percent(below)} of the power lies below the points, ${percent(above)} above`] : [];
    streams.print(
      [
        `${name}, ${edge(fromHz)} to ${edge(toHz)}${through}`,
        ...provenanceLines(curve),
        "",
        ...inColumns(figureLines(noise, figures, "straight lines through the points")),
        ...outside,
        ...noise.notes.map((note) => `  ${note}`),
        "  not included: part-to-part spread of a typical curve",
        "",
      ].join("\n"),
    );
  },
};

function edge(hz: number): string {
  return hz === Number.POSITIVE_INFINITY ? "∞" : writeQuantity(hz, "Hz");
}

function percent(share: number): string {
  return `${Number((100 * share).toPrecision(2))} %`;
}
