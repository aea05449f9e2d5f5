import { MalformedDataError, writeQuantity } from "@quietband/core";
import { checkStatedFigure, type StatedFigureCheck } from "../judge/check-stated-figure.js";
import type { Command } from "./command.js";
import { beyondOptions, provenanceLines, readBeyond, readCurveInput } from "./curve-input.js";
import { inColumns, short, signed } from "./noise-figures.js";
import { readThrough } from "./through.js";
import { plainNumber, quantityOption } from "./typed-values.js";

/** Stated figures beside what the curve of the same part gives. */
export const checkCommand: Command = {
  name: "check",
  purpose: "whether a stated low-frequency figure agrees with the part's own curve",
  takes: "<curve>",
  options: [
    {
      name: "figure",
      value: "WORDS",
      help: 'for instance "7 µV peak-to-peak, 0.1 Hz to 10 Hz"; the "# stated:" lines of the curve unless given; may be repeated',
      repeats: true,
    },
    { name: "of", value: "VOLTS", help: "what a figure in ppm is of" },
    { name: "factor", value: "N", help: "peak-to-peak / RMS that the figure rests on; 6.6 by common practice" },
    {
      name: "through",
      value: "FILTER",
      help: "the filter the figure was measured through, where it is known; may be repeated",
      repeats: true,
    },
    ...beyondOptions,
    { name: "json", value: "", help: "everything as JSON" },
  ],
  example: {
    type: 'quietband check R1.csv --figure "7 µV peak-to-peak, 0.1 Hz to 10 Hz"',
    answers: "What the points of R1.csv give for that band, the difference in dB, and what the comparison rests on.",
  },
  run(parsed, streams) {
    const { curve, name } = readCurveInput("check", parsed, streams);
    const typed = parsed.all("figure");
    const stated =
      typed.length > 0 ? typed : curve.source.filter(({ key }) => key === "stated").map(({ value }) => value);
    if (stated.length === 0)
      throw new MalformedDataError(
        'The curve states no figure ("# stated: ..."); give one with --figure "7 µV peak-to-peak, 0.1 Hz to 10 Hz".',
      );
    const options = {
      beyond: readBeyond(parsed),
      factor: plainNumber(parsed, "factor"),
      weighting: readThrough(parsed.all("through")),
      relativeTo: quantityOption(parsed, "of", curve.unit),
    };
    const checks = stated.map((text) => checkStatedFigure(curve, text, options));
    if (parsed.has("json")) {
      streams.print(`${JSON.stringify({ curve: name, source: curve.source, checks }, undefined, 2)}\n`);
      return;
    }
    streams.print(
      [name, ...provenanceLines(curve), "", ...checks.flatMap((check) => [...checkLines(check, curve.unit), ""])].join(
        "\n",
      ),
    );
  },
};

/** One comparison in lines. */
function checkLines(check: StatedFigureCheck, signalUnit: string): string[] {
  const unit = check.figure.kind === "density" ? `${signalUnit}/√Hz` : signalUnit;
  const { points, rounding, unknownMeasurement } = check.tolerance;
  const percent = (share: number): string => `${(100 * share).toFixed(1)} %`;
  const parts = [`points ${percent(points)}`, `rounding ${percent(rounding)}`];
  if (unknownMeasurement > 0) parts.push(`unknown filter and records ${percent(unknownMeasurement)}`);
  const basis = check.peakToPeak?.convention ?? (check.figure.kind === "rms" ? "RMS of the band" : "at that frequency");
  return [
    `Stated: ${check.figure.text}`,
    ...inColumns([
      {
        name: "stated",
        value: short(check.stated, unit),
        basis: `last digit ± ${writeQuantity(check.figure.halfUnit * (check.stated / check.figure.value), unit, { digits: 1 })}`,
      },
      { name: "from the curve", value: short(check.predicted, unit), basis },
      {
        name: "difference",
        value: `${signed(check.differenceDb, 2)} dB`,
        basis: `within a factor of ${check.withinFactor.toFixed(2)}`,
      },
      { name: "rests on", value: percent(check.tolerance.total), basis: `${parts.join(", ")} (k = 1)` },
      {
        name: "claim",
        value: check.claim,
        basis: `${percent(check.shareInsidePoints)} of the power inside the points`,
      },
    ]),
    ...check.notes.map((note) => `  ${note}`),
  ];
}
