import type { Axis, AxisRequest } from "./axis.js";
import type { Box } from "./box.js";
import { linearAxis } from "./linear-axis.js";
import { logAxis } from "./log-axis.js";
import { ink } from "./series-style.js";
import { ascent, lineHeight, textWidth, wrapText } from "./text-measure.js";

/** One line of text with its anchor point on the baseline and the box it takes. */
export interface TextLine {
  readonly text: string;
  readonly x: number;
  readonly y: number;
  readonly size: number;
  readonly anchor: "start" | "middle" | "end";
  readonly colour: string;
  readonly bold: boolean;
  readonly box: Box;
}

/** An axis as a plot asks for it. */
export interface AxisPlan {
  readonly kind: "log" | "linear";
  readonly domain: readonly [number, number];
  /** What the axis shows, without unit: the ticks carry it. */
  readonly title: string;
  readonly label: AxisRequest["label"];
}

/** What a frame is made from. */
export interface FramePlan {
  readonly width: number;
  readonly height: number;
  readonly title: string;
  readonly note: string;
  readonly x: AxisPlan;
  readonly y: AxisPlan;
  /** Pixels kept free right of the plot, for the key. */
  readonly gutter: number;
}

/** Title, note, axes and the rectangle between them. */
export interface Frame {
  readonly width: number;
  readonly height: number;
  readonly plot: Box;
  readonly x: Axis;
  readonly y: Axis;
  readonly texts: readonly TextLine[];
}

/** Sizes of text in pixels. */
export const textSize: Readonly<Record<"title" | "label" | "note", number>> = Object.freeze({
  title: 16,
  label: 12,
  note: 11,
});

/** Space between the picture's edge and anything in it. */
export const margin = 16;

/** A tick label may stand at the very top of the axis, half of it above the plot. */
const axisTitleGap = 10;

/** The plot area never gets lower than this: notes are cut first. */
const leastPlotHeight = 110;

/** Lays out everything around the data; the order is vertical first, because tick labels decide the left edge. */
export function layoutFrame(plan: FramePlan): Frame {
  const { width, height } = plan;
  const inner = width - 2 * margin;
  const titleLines = wrapText(plan.title, { size: textSize.title, width: inner, maxLines: 2, bold: true });
  const titleHeight = titleLines.length * textSize.title * lineHeight;
  const labelLine = textSize.label * lineHeight;
  const top = margin + titleHeight + (titleLines.length > 0 ? 6 : 0) + labelLine + axisTitleGap;
  const belowPlot = 8 + 2 * labelLine;
  const noteLine = textSize.note * lineHeight;
  const noteRoom = height - top - belowPlot - margin - 10 - leastPlotHeight;
  const maxLines = Math.max(0, Math.min(4, Math.floor(noteRoom / noteLine)));
  const noteLines = wrapText(plan.note, { size: textSize.note, width: inner, maxLines });
  const noteHeight = noteLines.length * noteLine + (noteLines.length > 0 ? 10 : 0);
  const bottom = height - margin - noteHeight - belowPlot;
  const y = makeAxis(plan.y, width / 4, [bottom, top], () => labelLine + 8);
  const left = margin + 8 + Math.max(0, ...y.ticks.map((tick) => textWidth(tick.label, textSize.label)));
  const right = width - margin - plan.gutter;
  const x = makeAxis(plan.x, width / 4, [left, right], (label) => textWidth(label, textSize.label) + 14);
  const texts = [
    ...titleLines.map((text, index) =>
      textLine({
        text,
        x: margin,
        top: margin + index * textSize.title * lineHeight,
        size: textSize.title,
        bold: true,
        colour: ink.title,
      }),
    ),
    textLine({ text: oneLine(plan.y.title, inner), x: margin, top: top - labelLine - axisTitleGap, colour: ink.faint }),
    textLine({
      text: oneLine(plan.x.title, right - margin),
      x: right,
      top: bottom + 8 + labelLine,
      anchor: "end",
      colour: ink.faint,
    }),
    ...y.ticks.map((tick) => textLine({ text: tick.label, x: left - 8, top: tick.at - labelLine / 2, anchor: "end" })),
    ...x.ticks.map((tick) => tickLabelBelow(tick.label, tick.at, bottom + 8, width)),
    ...noteLines.map((text, index) =>
      textLine({
        text,
        x: margin,
        top: height - margin - (noteLines.length - index) * noteLine,
        size: textSize.note,
        colour: ink.faint,
      }),
    ),
  ];
  return { width, height, plot: { x: left, y: top, width: right - left, height: bottom - top }, x, y, texts };
}

/** A line of text from the top of its box. */
export function textLine(line: {
  readonly text: string;
  readonly x: number;
  readonly top: number;
  readonly size?: number;
  readonly anchor?: TextLine["anchor"];
  readonly colour?: string;
  readonly bold?: boolean;
}): TextLine {
  const { text, x, top, size = textSize.label, anchor = "start", colour = ink.text, bold = false } = line;
  const width = textWidth(text, size, bold);
  const shift = { start: 0, middle: width / 2, end: width }[anchor];
  const box = { x: x - shift, y: top, width, height: size * lineHeight };
  return { text, x, y: top + size * ascent, size, anchor, colour, bold, box };
}

function makeAxis(plan: AxisPlan, widest: number, range: readonly [number, number], room: AxisRequest["room"]): Axis {
  // A unit may be a whole sentence: it must not push the plot off the paper.
  const label: AxisRequest["label"] = (value, largest) => oneLine(plan.label(value, largest), widest);
  const request = { domain: plan.domain, range, label, room };
  return plan.kind === "log" ? logAxis(request) : linearAxis(request);
}

/** A text that must stand on one line, cut where it is longer than that. */
function oneLine(text: string, width: number): string {
  return wrapText(text, { size: textSize.label, width, maxLines: 1 })[0] ?? "";
}

/** Centred under its tick, but never beyond the picture's edge. */
function tickLabelBelow(text: string, at: number, top: number, width: number): TextLine {
  const half = textWidth(text, textSize.label) / 2;
  const x = Math.max(half + 2, Math.min(at, width - half - 2));
  return textLine({ text, x, top, anchor: "middle" });
}
