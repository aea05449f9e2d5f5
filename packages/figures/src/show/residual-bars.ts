import { OutOfDomainError } from "@quietband/core";
import { oneLine, padText, terminalWidth } from "./terminal-width.js";

/** One residual. */
export interface ResidualRow {
  /** What it belongs to: "100 Hz". */
  readonly label: string;
  /** Point over model, dB: positive where the point lies above. */
  readonly residualDb: number;
  /** A remark at the end of the line: "left out", "misread?". */
  readonly remark?: string | undefined;
}

/**
 * Residuals as a picture in characters, one line each: label, dB, a bar left or right of the model's line, a remark.
 * The longest bar is the largest residual; the last line gives the scale.
 *
 * @param rows - residuals in the order to be shown; finite.
 * @param options - `width`: columns of the widest bar to one side, 4 to 60; 16 unless given.
 * @returns lines joined by newlines, without a newline at the end.
 * @throws OutOfDomainError for no rows, a residual that is not finite, a width out of range.
 *
 * @example
 * ```ts
 * import { residualBars } from "@quietband/figures";
 * const rows = [{ label: "1 Hz", residualDb: 0.4 }, { label: "10 Hz", residualDb: -0.2 }];
 * residualBars(rows, { width: 4 }).split("\n")[1]; // → 10 Hz   −0.20 dB     ██│
 * ```
 */
export function residualBars(rows: readonly ResidualRow[], { width = 16 }: { readonly width?: number } = {}): string {
  if (rows.length === 0) throw new OutOfDomainError("residualBars needs at least one residual; got none.");
  if (!(Number.isInteger(width) && width >= 4 && width <= 60))
    throw new OutOfDomainError(`width of residualBars must be a whole number of columns from 4 to 60; got ${width}.`);
  for (const { label, residualDb } of rows)
    if (!Number.isFinite(residualDb))
      throw new OutOfDomainError(`The residual at ${label} must be a finite number of dB; got ${residualDb}.`);
  const labels = rows.map(({ label }) => oneLine(label));
  const values = rows.map(({ residualDb }) => `${signed(residualDb)} dB`);
  const widest = (texts: readonly string[]): number => Math.max(...texts.map(terminalWidth));
  const [labelWidth, valueWidth] = [widest(labels), widest(values)];
  const largest = Math.max(...rows.map(({ residualDb }) => Math.abs(residualDb)));
  const lines = rows.map(({ residualDb, remark = "" }, index) => {
    const cells = largest === 0 ? 0 : Math.round((width * Math.abs(residualDb)) / largest);
    const bar = "█".repeat(cells);
    const left = padText(residualDb < 0 ? bar : "", width, true);
    const right = padText(residualDb > 0 ? bar : "", width, false);
    const label = padText(labels[index] as string, labelWidth, true);
    return `${label}   ${padText(values[index] as string, valueWidth, true)}   ${left}│${right}   ${oneLine(remark)}`.trimEnd();
  });
  const edge = `${largest.toFixed(2)} dB`;
  const scale = `${" ".repeat(labelWidth + valueWidth + 6)}${padText(`−${edge}`, width, false)}│${padText(`+${edge}`, width, true)}`;
  return largest === 0 ? lines.join("\n") : [...lines, scale].join("\n");
}

function signed(value: number): string {
  const text = Math.abs(value).toFixed(2);
  if (Number(text) === 0) return text;
  return value < 0 ? `−${text}` : `+${text}`;
}
