import { OutOfDomainError } from "@quietband/core";
import { refuseUnknownKeys, requireFinite } from "../convert/domain.js";
import type { Box } from "./box.js";
import { margin, type TextLine, textLine, textSize } from "./frame.js";
import { picture, textInk } from "./ink-plot.js";
import { pictureWidth } from "./plot-options.js";
import { ink, seriesStyle } from "./series-style.js";
import { type SvgElement, svgElement } from "./svg.js";
import { lineHeight, textWidth, wrapText } from "./text-measure.js";

/** What {@link shareBars} draws. */
export interface ShareBarsOptions {
  readonly rows: readonly ShareRow[];
  readonly title?: string | undefined;
  readonly note?: string | undefined;
  /** Pixels, 400 to 4000; 760 unless given. The height follows from the rows. */
  readonly width?: number | undefined;
}

/** One contribution. */
export interface ShareRow {
  readonly label: string;
  /** Share of the total, 1 for all of it; negative where correlation takes away. */
  readonly share: number;
  /** The contribution itself, as it is to be printed: "16.93 nV". */
  readonly text: string;
}

/** A row with its places. */
interface PlacedShare {
  readonly label: readonly TextLine[];
  readonly value: TextLine;
  readonly bar: Box;
  /** Takes away: drawn hollow, left of the zero line. */
  readonly negative: boolean;
}

/** The picture as plain data, in pixels. */
export interface ShareBarsLayout {
  readonly title: string;
  readonly description: string;
  readonly frame: { readonly width: number; readonly height: number };
  readonly zero: number;
  readonly rows: readonly PlacedShare[];
  readonly texts: readonly TextLine[];
}

/**
 * Contributions as ranked bars, largest first, as an SVG document: a length is compared at a glance, a slice of pie is
 * not. Bars are scaled to the largest share; every bar carries its share in per cent and its value. Of more than two
 * dozen rows the smallest are put together into one line of text. Same input, same text.
 *
 * @param options - see {@link ShareBarsOptions}.
 * @returns the text of an SVG document.
 * @throws OutOfDomainError for no rows, a share that is not finite, an unknown option.
 *
 * @example
 * ```ts
 * import { shareBars } from "@quietband/figures";
 * const rows = [{ label: "bridge", share: 0.1, text: "5.6 nV" }, { label: "amplifier", share: 0.9, text: "16.9 nV" }];
 * const svg = shareBars({ rows });
 * svg.indexOf("amplifier") < svg.indexOf("bridge"); // → true
 * ```
 */
export function shareBars(options: ShareBarsOptions): string {
  const layout = layoutShareBars(options);
  const { zero, rows, texts } = layout;
  const first = rows[0] as PlacedShare;
  const last = rows.at(-1) as PlacedShare;
  return picture(layout, [
    ...rows.map(({ bar, negative }) => barInk(bar, negative)),
    svgElement("line", {
      x1: zero,
      y1: first.bar.y - 4,
      x2: zero,
      y2: last.bar.y + last.bar.height + 4,
      stroke: ink.frame,
    }),
    ...rows.flatMap(({ label, value }) => [...label, value].map(textInk)),
    ...texts.map(textInk),
  ]);
}

const mostRows = 24;
const barHeight = 14;
const rowGap = 9;
const gap = 10;

/** Lays out the bars; nothing drawn yet. */
export function layoutShareBars(options: ShareBarsOptions): ShareBarsLayout {
  refuseUnknownKeys("shareBars", ["rows", "title", "note", "width"], options);
  const { rows, title = "", note = "" } = options;
  if (rows.length === 0) throw new OutOfDomainError("shareBars needs at least one row; got none.");
  for (const { label, share } of rows) requireFinite(`share of "${label}"`, share);
  const width = pictureWidth(options.width);
  const ranked = rows.toSorted((a, b) => Math.abs(b.share) - Math.abs(a.share));
  const shown = ranked.slice(0, mostRows);
  const inner = width - 2 * margin;
  const titleLines = wrapText(title, { size: textSize.title, width: inner, maxLines: 2, bold: true });
  const texts: TextLine[] = titleLines.map((text, index) =>
    textLine({
      text,
      x: margin,
      top: margin + index * textSize.title * lineHeight,
      size: textSize.title,
      bold: true,
      colour: ink.title,
    }),
  );
  const columns = shareColumns(shown, inner);
  const placed: PlacedShare[] = [];
  let top = margin + titleLines.length * textSize.title * lineHeight + 12;
  for (const row of shown) {
    const next = placeRow(row, columns, top);
    placed.push(next);
    top = Math.max(next.bar.y + barHeight, ...next.label.map(({ box }) => box.y + box.height)) + rowGap;
  }
  if (ranked.length > shown.length) {
    const others = ranked.slice(mostRows);
    const together = others.reduce((sum, { share }) => sum + share, 0);
    const text = `and ${others.length} more, together ${percent(together)}`;
    texts.push(textLine({ text, x: columns.barLeft, top, colour: ink.faint }));
    top += textSize.label * lineHeight + rowGap;
  }
  for (const text of wrapText(note, { size: textSize.note, width: inner, maxLines: 6 })) {
    texts.push(textLine({ text, x: margin, top, size: textSize.note, colour: ink.faint }));
    top += textSize.note * lineHeight;
  }
  return {
    title: title || "Shares of the noise power",
    description: `${describe(ranked)} ${note}`.trimEnd(),
    frame: { width, height: Math.ceil(top + margin - rowGap / 2) },
    zero: columns.zero,
    rows: placed,
    texts,
  };
}

interface ShareColumns {
  readonly labelWidth: number;
  readonly barLeft: number;
  readonly zero: number;
  /** Pixels of a share of 1. */
  readonly scale: number;
}

/** Labels take what they need up to two fifths, values what they need, bars the rest. */
function shareColumns(rows: readonly ShareRow[], inner: number): ShareColumns {
  const widest = (texts: readonly string[]): number =>
    Math.max(...texts.map((text) => textWidth(text, textSize.label)));
  const labelWidth = Math.min(inner * 0.4, widest(rows.map(({ label }) => label)) + 1);
  const valueWidth = Math.min(inner * 0.35, widest(rows.map(valueText)) + 1);
  const barLeft = margin + labelWidth + gap;
  const room = Math.max(40, inner - labelWidth - valueWidth - 2 * gap);
  const most = Math.max(0, ...rows.map(({ share }) => share));
  const least = Math.min(0, ...rows.map(({ share }) => share));
  const scale = most === least ? 0 : room / (most - least);
  return { labelWidth, barLeft, zero: barLeft - least * scale, scale };
}

function placeRow(row: ShareRow, { labelWidth, barLeft, zero, scale }: ShareColumns, top: number): PlacedShare {
  const step = textSize.label * lineHeight;
  const lines = wrapText(row.label, { size: textSize.label, width: labelWidth, maxLines: 2 });
  const label = lines.map((text, index) =>
    textLine({ text, x: barLeft - gap, top: top + index * step, anchor: "end" }),
  );
  const length = Math.abs(row.share) * scale;
  const bar = {
    x: row.share < 0 ? zero - length : zero,
    y: top + (step - barHeight) / 2,
    width: length,
    height: barHeight,
  };
  const value = textLine({ text: valueText(row), x: Math.max(zero, bar.x + bar.width) + gap / 2 + 2, top });
  return { label, value, bar, negative: row.share < 0 };
}

function barInk(bar: Box, negative: boolean): SvgElement {
  const { colour } = seriesStyle(0);
  const look = negative ? { fill: ink.paper, "stroke-dasharray": "3 2" } : { fill: colour };
  return svgElement("rect", { ...bar, ...look, stroke: colour });
}

function valueText({ share, text }: ShareRow): string {
  return text === "" ? percent(share) : `${percent(share)} · ${text}`;
}

/** A share in per cent to a tenth; what is smaller says so. */
function percent(share: number): string {
  if (share === 0) return "0 %";
  if (Math.abs(share) < 0.0005) return `${share < 0 ? "> −" : "< "}0.1 %`;
  return `${(100 * share).toFixed(1).replace("-", "−")} %`;
}

function describe(ranked: readonly ShareRow[]): string {
  const spoken = ranked.slice(0, 12).map((row) => `${row.label} ${valueText(row)}`);
  const more = ranked.length > spoken.length ? `, and ${ranked.length - spoken.length} more` : "";
  return `Ranked shares: ${spoken.join(", ")}${more}.`;
}
