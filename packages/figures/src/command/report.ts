import { noiseBudget } from "../chain/noise-budget.js";
import { noiseReport } from "../report/noise-report.js";
import type { ReportPlot } from "../report/report.js";
import { reportCsv } from "../report/report-csv.js";
import { reportMarkdown } from "../report/report-markdown.js";
import { reportText } from "../report/report-text.js";
import { shareBars } from "../show/share-bars.js";
import { readChainInput } from "./chain-input.js";
import type { Command } from "./command.js";
import { short } from "./noise-figures.js";
import { UsageError } from "./usage-error.js";

/** A channel as a document for a review. */
export const reportCommand: Command = {
  name: "report",
  purpose: "a channel as a document for a review: text, Markdown, CSV or JSON",
  takes: "<chain>",
  options: [
    { name: "as", value: "FORM", help: "text (the default), markdown, csv or json" },
    { name: "output", value: "FILE", help: "where it goes; standard output unless given" },
    { name: "plot", value: "FILE", help: "ranked bars as SVG, beside the document; in Markdown embedded unless given" },
  ],
  example: {
    type: "quietband report fixtures/demo/strain-channel.json --as markdown --output strain.md",
    answers: "The budget of the invented strain channel with its ranking, assumptions and cautions, as one document.",
  },
  run(parsed, streams) {
    const form = parsed.one("as") ?? "text";
    const writer = writers[form];
    if (writer === undefined)
      throw new UsageError(
        `quietband report writes ${Object.keys(writers).join(", ")}; got --as ${form.slice(0, 40)}.`,
      );
    const { title, budget: chain } = readChainInput("report", parsed, streams);
    const budget = noiseBudget(chain);
    const rows = budget.shares.map(({ name, share, rms }) => ({ label: name, share, text: short(rms, budget.unit) }));
    const plot: ReportPlot = { title: `${title}: who makes the noise`, svg: shareBars({ rows, title }) };
    const plotFile = parsed.one("plot");
    if (plotFile !== undefined) streams.writeFile(plotFile, plot.svg);
    const text = writer(noiseReport({ title, budget, plots: [plot] }), plotFile);
    const output = parsed.one("output");
    if (output === undefined) streams.print(text);
    else streams.writeFile(output, text);
  },
};

type Writer = (report: ReturnType<typeof noiseReport>, plotFile: string | undefined) => string;

const writers: Readonly<Record<string, Writer>> = Object.freeze({
  text: reportText,
  markdown: (report, plotFile) => reportMarkdown(report, plotFile === undefined ? {} : { plotPath: () => plotFile }),
  csv: reportCsv,
  json: (report) => `${JSON.stringify(report, undefined, 2)}\n`,
});
