import { escapeMarkdown, markdownTable } from "../show/markdown-table.js";
import { entryText } from "./entry-text.js";
import type { NoiseReport, ReportPlot, ReportSection } from "./report.js";
import { tableNotes } from "./table-notes.js";

/** Where the plots of a Markdown report are. */
export interface ReportMarkdownOptions {
  /** Path of a plot's file beside the report; embedded as a data URI unless given. */
  readonly plotPath?: ((plot: ReportPlot, index: number) => string) | undefined;
}

/**
 * A report as Markdown: a table a section, plots embedded or beside.
 *
 * @param report - from `noiseReport`.
 * @param options - `plotPath`, for plots that are written to files.
 * @returns the text of a Markdown file.
 *
 * @example
 * ```ts
 * import { noiseReport, reportMarkdown } from "@quietband/figures";
 * const entries = [{ name: "RMS", value: 1.2e-6, unit: "V", basis: "measured" }];
 * const report = noiseReport({ title: "Bench", sections: [{ heading: "Noise", entries, notes: [] }] });
 * reportMarkdown(report).split("\n")[6]; // → | RMS | 1.200 µV | measured |  |
 * ```
 */
export function reportMarkdown(report: NoiseReport, { plotPath }: ReportMarkdownOptions = {}): string {
  const { title, sections, plots, cautions } = report;
  return [
    `# ${escapeMarkdown(title)}`,
    ...sections.flatMap((section) => ["", `## ${escapeMarkdown(section.heading)}`, "", ...sectionLines(section)]),
    ...plots.flatMap((plot, index) => [
      "",
      `![${escapeMarkdown(plot.title)}](${plotPath?.(plot, index) ?? `data:image/svg+xml;base64,${base64(plot.svg)}`})`,
    ]),
    "",
    "## Cautions",
    "",
    ...cautions.map((caution) => `- ${escapeMarkdown(caution)}`),
    "",
  ].join("\n");
}

function sectionLines({ entries, table, notes }: ReportSection): string[] {
  const figures = markdownTable({
    columns: [
      { heading: "figure" },
      { heading: "value", align: "right" },
      { heading: "rests on" },
      { heading: "assumed" },
    ],
    rows: entries.map((entry) => [entry.name, entryText(entry), entry.basis, entry.assumption ?? ""]),
  });
  const said = [...(table === undefined ? [] : tableNotes(table)), ...notes];
  return [
    ...(entries.length === 0 ? [] : [figures]),
    ...(table === undefined ? [] : [...(entries.length === 0 ? [] : [""]), markdownTable(table)]),
    ...(said.length === 0 ? [] : ["", ...said.map((note) => `- ${escapeMarkdown(note)}`)]),
  ];
}

/** UTF-8 in base64, in browsers and Node alike. */
function base64(text: string): string {
  const bytes = new TextEncoder().encode(text);
  let binary = "";
  // in pieces: a call takes some 1e5 arguments at most
  for (let at = 0; at < bytes.length; at += 8192) binary += String.fromCodePoint(...bytes.subarray(at, at + 8192));
  return btoa(binary);
}
