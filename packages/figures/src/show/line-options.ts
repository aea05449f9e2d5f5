import { OutOfDomainError } from "@quietband/core";
import { refuseUnknownKeys } from "../convert/domain.js";

/** One line: as many x as y, x ascending. */
export interface PlotSeries {
  readonly label: string;
  readonly x: readonly number[];
  readonly y: readonly number[];
}

/** What an axis shows. */
export interface LinePlotAxis {
  /** What is shown, without unit: the ticks carry it. */
  readonly title: string;
  readonly unit: string;
  readonly scale: "linear" | "log";
}

/** A value worth a line of its own across the plot. */
export interface PlotMark {
  readonly axis: "x" | "y";
  readonly value: number;
  readonly label: string;
}

/** What `linePlot` draws. */
export interface LinePlotOptions {
  readonly lines: readonly PlotSeries[];
  readonly x: LinePlotAxis;
  readonly y: LinePlotAxis;
  readonly marks?: readonly PlotMark[] | undefined;
  readonly title?: string | undefined;
  readonly note?: string | undefined;
  /** Pixels, 400 to 4000; 760 unless given. */
  readonly width?: number | undefined;
  /** Pixels, 280 to 4000; 480 unless given. */
  readonly height?: number | undefined;
}

/** Refuses what cannot be drawn; `where` names the function in the message. */
export function checkLineOptions(where: string, options: LinePlotOptions): void {
  refuseUnknownKeys(where, ["lines", "x", "y", "marks", "title", "note", "width", "height"], options);
  if (options.lines.length === 0) throw new OutOfDomainError(`${where} needs at least one line to draw; got none.`);
  for (const { label, x, y } of options.lines) {
    if (x.length === y.length && x.length > 0) continue;
    throw new OutOfDomainError(
      `${where} needs as many y as x, and at least one, in each line; "${label}" has ${x.length} x and ${y.length} y.`,
    );
  }
}
