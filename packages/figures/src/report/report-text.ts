import { padText, terminalWidth } from "../show/terminal-width.js";
import { textTable } from "../show/text-table.js";
import { entryText } from "./entry-text.js";
import type { NoiseReport, ReportSection } from "./report.js";
import { tableNotes } from "./table-notes.js";

/**
 * A report as plain text, for a terminal or a mail; plots are only named.
 *
 * @param report - from `noiseReport`.
 * @returns lines joined by newlines, with one at the end.
 *
 * @example
 * ```ts
 * import { noiseReport, reportText } from "@quietband/figures";
 * const entries = [{ name: "RMS", value: 1.2e-6, unit: "V", basis: "measured" }];
 * const report = noiseReport({ title: "Bench", sections: [{ heading: "Noise", entries, notes: [] }] });
 * reportText(report).split("\n")[3]?.trim(); // → RMS   1.200 µV   measured
 * ```
 */
export function reportText({ title, sections, plots, cautions }: NoiseReport): string {
  return [
    title,
    ...sections.flatMap((section) => ["", section.heading, ...sectionLines(section)]),
    ...(plots.length === 0 ? [] : ["", "Plots", ...plots.map((plot) => `  ${plot.title}`)]),
    "",
    "Cautions",
    ...cautions.map((caution) => `  ${caution}`),
    "",
  ].join("\n");
}

function sectionLines({ entries, table, notes }: ReportSection): string[] {
  const values = entries.map(entryText);
  const [nameWidth, valueWidth] = [
    Math.max(0, ...entries.map(({ name }) => terminalWidth(name))),
    Math.max(0, ...values.map(terminalWidth)),
  ];
  const lines = entries.map(({ name, basis, assumption }, index) => {
    const rests = assumption === undefined ? basis : `${basis}; assumed: ${assumption}`;
    return `  ${padText(name, nameWidth, false)}   ${padText(values[index] as string, valueWidth, true)}   ${rests}`.trimEnd();
  });
  const tableLines =
    table === undefined
      ? []
      : [
          "",
          ...textTable(table)
            .split("\n")
            .map((line) => `  ${line}`),
        ];
  const said = [...(table === undefined ? [] : tableNotes(table)), ...notes];
  return [...lines, ...tableLines, ...(said.length === 0 ? [] : ["", ...said.map((note) => `  ${note}`)])];
}
