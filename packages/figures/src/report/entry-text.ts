import { writeQuantity } from "@quietband/core";
import type { ReportEntry } from "./report.js";

/** Units that take no SI prefix: they are written as they are. */
const plainUnits: ReadonlySet<string> = new Set(["", "dB", "bit", "LSB", "ppm", "%"]);

/** The value of an entry as people read it: the one place where a report's numbers are rounded. */
export function entryText({ value, unit, digits = 4 }: ReportEntry): string {
  if (typeof value === "string") return value;
  if (!plainUnits.has(unit)) return writeQuantity(value, unit, { digits });
  return `${Number(value.toPrecision(digits))}${unit === "" ? "" : ` ${unit}`}`.replace("-", "−");
}
