import { writeCurve } from "@quietband/core";
import { readPicks } from "../pick/read-picks.js";
import type { Command } from "./command.js";
import { UsageError } from "./usage-error.js";

/** A curve off a plot: axes and picked pixels, or a vector path, become the table that the other commands read. */
export const readCommand: Command = {
  name: "read",
  purpose: "a curve off a plot, from picked pixels or a vector path, as the table that the others read",
  takes: "<picks>",
  options: [
    { name: "output", value: "FILE", help: "where the table goes; standard output unless given" },
    { name: "json", value: "", help: "curve and calibration as JSON" },
  ],
  example: {
    type: "quietband read fixtures/demo/R1-picks.json | quietband noise - --band 0.1Hz:10Hz",
    answers: "The curve of the invented part R1 as it was picked off its plot, and its noise between 0.1 Hz and 10 Hz.",
  },
  run(parsed, streams) {
    const [path, ...more] = parsed.files;
    if (path === undefined || more.length > 0)
      throw new UsageError(`quietband read takes one picks file, or - for standard input; got ${parsed.files.length}.`);
    const { curve, calibration, pointsRead } = readPicks(path === "-" ? streams.readInput() : streams.readFile(path));
    if (parsed.has("json")) {
      const { residuals, worst, tickErrorPixels } = calibration;
      const shown = { curve, pointsRead, calibration: { residuals, worst, tickErrorPixels } };
      streams.print(`${JSON.stringify(shown, undefined, 2)}\n`);
      return;
    }
    const output = parsed.one("output");
    if (output === undefined) streams.print(writeCurve(curve));
    else streams.writeFile(output, writeCurve(curve));
  },
};
