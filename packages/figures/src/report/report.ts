import type { Table, TableColumn } from "../show/table.js";

/** A number of a report: what it is, what it rests on, and what was assumed for it. */
export interface ReportEntry {
  readonly name: string;
  /** SI, in `unit`; a text where there is no number to give. */
  readonly value: number | string;
  /** Unit of the value; "" for pure numbers and texts. */
  readonly unit: string;
  /** What it is computed from, by which convention, how well it is known. */
  readonly basis: string;
  /** What was taken for it that nothing measured says. */
  readonly assumption?: string;
  /** Significant digits in text and Markdown; 4 unless given. JSON and CSV keep all. */
  readonly digits?: number;
}

/** A column of a report's table, and what its numbers rest on. */
export interface ReportColumn extends TableColumn {
  readonly basis?: string;
}

/** A table of a report. */
export interface ReportTable extends Table {
  readonly columns: readonly ReportColumn[];
  /** What was assumed for each row; an empty text where nothing was. */
  readonly assumptions?: readonly string[];
}

/** One part of a report. */
export interface ReportSection {
  readonly heading: string;
  readonly entries: readonly ReportEntry[];
  readonly table?: ReportTable;
  /** Sentences that a reader must see. */
  readonly notes: readonly string[];
}

/** A picture of a report. */
export interface ReportPlot {
  readonly title: string;
  /** An SVG document. */
  readonly svg: string;
}

/** A report: plain data, the same after a round trip through JSON. */
export interface NoiseReport {
  readonly title: string;
  readonly sections: readonly ReportSection[];
  readonly plots: readonly ReportPlot[];
  /** What the report does not cover, and where others decide. */
  readonly cautions: readonly string[];
}

/** The lines that end every report. */
export const standingCautions: readonly string[] = Object.freeze([
  "Not included unless a line says so: part-to-part spread of a typical curve, drift with temperature, pickup.",
  "A typical curve guarantees nothing; where a measurement is medical, or protects people or equipment, use guaranteed figures, the applicable codes and qualified review.",
]);
