import type { Axis } from "./axis.js";
import type { Box } from "./box.js";
import { type Frame, textSize } from "./frame.js";
import type { LabelRequest } from "./place-labels.js";
import type { PlotLine, PlotShade } from "./plot-layout.js";
import { ink } from "./series-style.js";
import { lineHeight, textWidth } from "./text-measure.js";

/** Lines and shades that point something out, with the labels that name it. */
export interface Guides {
  readonly shades: readonly PlotShade[];
  readonly lines: readonly PlotLine[];
  readonly labels: readonly LabelRequest[];
}

/** Height of a label's box. */
export const labelHeight: number = textSize.label * lineHeight;

const clear = 5;

/** A horizontal line at a value; beyond the picture only its label remains, at the edge it lies beyond. */
export function levelGuide(value: number, text: string, { plot, y }: Frame): Guides {
  const width = textWidth(text, textSize.label);
  const right = plot.x + plot.width;
  const bottom = plot.y + plot.height;
  const columns = [right - width - 6, plot.x + plot.width * 0.6 - width / 2, plot.x + 6, plot.x + plot.width / 3];
  if (isOnAxis(value, y)) {
    const at = y.at(value);
    const run = [[plot.x, at] as const, [right, at] as const];
    return { shades: [], lines: [guideLine(run)], labels: [guideLabel(text, columns, [at + 3, at - labelHeight - 2])] };
  }
  const row = value < y.domain[0] ? bottom - labelHeight - 3 : plot.y + 3;
  return { shades: [], lines: [], labels: [guideLabel(text, columns, [row])] };
}

/** A vertical line at a value, down from `top` pixels; beyond the picture an arrow says on which side. */
export function dropGuide(value: number, text: string, { plot, x }: Frame, top: number = plot.y): Guides {
  const bottom = plot.y + plot.height;
  const rows = [
    bottom - labelHeight - 3,
    bottom - 2 * labelHeight - 6,
    plot.y + plot.height * 0.6,
    plot.y + plot.height * 0.4,
    plot.y + labelHeight + 3,
  ];
  if (isOnAxis(value, x)) {
    const at = x.at(value);
    const run = [[at, Math.max(plot.y, Math.min(top, bottom))] as const, [at, bottom] as const];
    const columns = [at + clear, at - textWidth(text, textSize.label) - clear];
    return { shades: [], lines: [guideLine(run)], labels: [guideLabel(text, columns, rows)] };
  }
  const before = value < x.domain[0];
  const shown = before ? `← ${text}` : `${text} →`;
  const column = before ? plot.x + clear : plot.x + plot.width - textWidth(shown, textSize.label) - clear;
  return { shades: [], lines: [], labels: [guideLabel(shown, [column], rows)] };
}

/** A shaded stretch between two values, named at its top. */
export function stretchGuide([from, to]: readonly [number, number], text: string, { plot, x }: Frame): Guides {
  const edge = (value: number): number => x.at(Math.min(Math.max(value, x.domain[0]), x.domain[1]));
  const [left, right] = [edge(from), edge(to)];
  if (right <= left) return { shades: [], lines: [], labels: [] };
  const edges = [from, to].filter((value) => isOnAxis(value, x)).map((value) => x.at(value));
  const width = textWidth(text, textSize.label);
  const middle = (left + right - width) / 2;
  const columns = [middle, left + clear, right - width - clear, right + clear, left - width - clear];
  const bottom = plot.y + plot.height;
  const rows = [plot.y + 3, bottom - labelHeight - 3, bottom - 2 * labelHeight - 6];
  const box = { x: left, y: plot.y, width: right - left, height: plot.height };
  return { shades: [{ box, edges }], lines: [], labels: [guideLabel(text, columns, rows)] };
}

/** All guides as one. */
export function joinGuides(guides: readonly Guides[]): Guides {
  return {
    shades: guides.flatMap(({ shades }) => shades),
    lines: guides.flatMap(({ lines }) => lines),
    labels: guides.flatMap(({ labels }) => labels),
  };
}

function guideLabel(text: string, columns: readonly number[], rows: readonly number[]): LabelRequest {
  const width = textWidth(text, textSize.label);
  const places: readonly Box[] = rows.flatMap((y) => columns.map((x) => ({ x, y, width, height: labelHeight })));
  return { text, size: textSize.label, colour: ink.guide, places };
}

function guideLine(run: readonly (readonly [number, number])[]): PlotLine {
  return { runs: [run], colour: ink.guide, dash: [4, 3], width: 1 };
}

function isOnAxis(value: number, { domain }: Axis): boolean {
  return value >= domain[0] && value <= domain[1];
}
