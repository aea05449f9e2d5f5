import { noiseBudget } from "../chain/noise-budget.js";
import { shareBars } from "../show/share-bars.js";
import { textTable } from "../show/text-table.js";
import { readChainInput } from "./chain-input.js";
import type { Command } from "./command.js";
import { inColumns, short } from "./noise-figures.js";

/** All sources of a channel together: the total, who makes it, and what halving one would buy. */
export const budgetCommand: Command = {
  name: "budget",
  purpose: "all noise of a channel described in a file, ranked by what it contributes",
  takes: "<chain>",
  options: [
    { name: "output", value: "FILE", help: "ranked bars as SVG" },
    { name: "json", value: "", help: "everything as JSON" },
  ],
  example: {
    type: "quietband budget fixtures/demo/strain-channel.json",
    answers: "Which part of the invented strain channel decides its noise, and what a better one would buy.",
  },
  run(parsed, streams) {
    const { title, budget } = readChainInput("budget", parsed, streams);
    const result = noiseBudget(budget);
    const output = parsed.one("output");
    const rows = result.shares.map(({ name, share, rms }) => ({ label: name, share, text: short(rms, result.unit) }));
    if (output !== undefined) streams.writeFile(output, shareBars({ rows, title }));
    if (parsed.has("json")) {
      streams.print(`${JSON.stringify({ title, budget: result }, undefined, 2)}\n`);
      return;
    }
    const { standardUncertainty, peakToPeak } = result;
    const known = standardUncertainty === undefined ? "" : `± ${(100 * standardUncertainty).toFixed(1)} % (k = 1), `;
    const table = textTable({
      columns: [
        { heading: "source" },
        { heading: "RMS" },
        { heading: "share" },
        { heading: "so far" },
        { heading: "total if halved" },
      ],
      rows: result.shares.map(({ name, rms, share, cumulativeShare, totalIfHalved }) => [
        name,
        short(rms, result.unit),
        percent(share),
        percent(cumulativeShare),
        short(totalIfHalved, result.unit),
      ]),
    });
    streams.print(
      [
        title,
        "",
        ...inColumns([
          { name: "RMS", value: short(result.rms, result.unit), basis: `${known}referred to ${result.referredTo}` },
          {
            name: "peak-to-peak",
            value: short(peakToPeak.total, result.unit),
            basis: `${peakToPeak.factor} × RMS of the random part, tones added`,
          },
        ]),
        `  part-to-part spread: ${result.partSpread.text}`,
        "",
        table,
        "",
        ...result.shares.flatMap(({ name, notes }) => notes.map((note) => `  ${name}: ${note}`)),
        ...result.notes.map((note) => `  ${note}`),
        ...(result.target === undefined ? [] : [`  ${result.target.text}`]),
        "",
      ].join("\n"),
    );
  },
};

function percent(share: number): string {
  return `${Number((100 * share).toPrecision(3))} %`;
}
