import type { Box } from "./box.js";
import { margin, type TextLine, textLine, textSize } from "./frame.js";
import { ink, type MarkerShape } from "./series-style.js";
import { lineHeight, textWidth, wrapText } from "./text-measure.js";

/** The sample beside a label. */
export interface Swatch {
  readonly colour: string;
  readonly line?: { readonly dash: readonly number[]; readonly width: number };
  readonly marker?: { readonly shape: MarkerShape; readonly filled: boolean };
  readonly ring?: boolean;
  readonly fill?: boolean;
  readonly bar?: boolean;
}

/** One entry wanted in the key. */
export interface KeyEntry {
  readonly label: string;
  readonly swatch: Swatch;
  /** A series has the pixel height of its end, to stand beside it; an explanation of a mark has none. */
  readonly level?: number;
}

/** An entry with its place. */
export interface PlacedKeyEntry {
  readonly label: string;
  readonly swatch: Swatch;
  readonly swatchBox: Box;
  readonly lines: readonly TextLine[];
  readonly box: Box;
}

const swatchWidth = 26;
const gap = 6;
const lineStep = textSize.label * lineHeight;
const entryGap = 4;

/** So many labels may come with a last one that counts the rest. */
const manyLabels = 8;

/** Pixels the key takes right of the plot: what the longest label needs, but no more than a third of the picture. */
export function keyGutter(labels: readonly string[], width: number): number {
  if (labels.length === 0) return 12;
  const most = Math.min(280, width / 3) - swatchWidth - gap - margin;
  // of many series some may only be counted
  const counted = labels.length < manyLabels ? [] : ["and 100 more"];
  const longest = Math.max(...[...labels, ...counted].map((label) => textWidth(label, textSize.label)));
  return margin + swatchWidth + gap + Math.min(most, longest + 1);
}

/**
 * Stacks the entries right of the plot, each as near to the height of what it names as the others allow. Long labels
 * wrap to three lines while there is room, then to two, then to one. Series that find no room, and the `unnamed` ones
 * that asked for none, are counted in a last entry.
 */
export function layoutKey(entries: readonly KeyEntry[], unnamed: number, column: Box): readonly PlacedKeyEntry[] {
  const textX = column.x + swatchWidth + gap;
  const width = column.x + column.width - textX;
  const wrap = (entry: KeyEntry, maxLines: number): WrappedEntry => {
    const lines = wrapText(entry.label, { size: textSize.label, width, maxLines });
    return { entry, lines, height: Math.max(1, lines.length) * lineStep + entryGap };
  };
  const wrappings = [3, 2, 1].map((maxLines) => entries.map((entry) => wrap(entry, maxLines)));
  const room = (left: number): number => column.height - (left > 0 ? lineStep + entryGap : 0);
  const fitting = wrappings.find((wrapped) => total(wrapped) <= room(unnamed));
  const chosen = fitting ?? (wrappings[2] ?? []).slice(0, Math.max(0, Math.floor(room(1) / (lineStep + entryGap))));
  const isSeries = ({ level }: KeyEntry): boolean => level !== undefined;
  const left = unnamed + entries.filter(isSeries).length - chosen.filter(({ entry }) => isSeries(entry)).length;
  const ordered = chosen.toSorted((a, b) => (a.entry.level ?? Number.MAX_VALUE) - (b.entry.level ?? Number.MAX_VALUE));
  const tops = stackTops(ordered, column.y, column.y + room(left));
  const placed = ordered.map((wrapped, index) => placeEntry(wrapped, column.x, textX, tops[index] as number));
  if (left === 0) return placed;
  const swatch = { colour: ink.rest, ...(left === unnamed ? { line: { dash: [], width: 1 } } : {}) };
  return [
    ...placed,
    placeEntry(wrap({ label: `and ${left} more`, swatch }, 1), column.x, textX, column.y + room(left)),
  ];
}

interface WrappedEntry {
  readonly entry: KeyEntry;
  readonly lines: readonly string[];
  readonly height: number;
}

function total(wrapped: readonly WrappedEntry[]): number {
  return wrapped.reduce((sum, { height }) => sum + height, 0);
}

/** Downwards so that none covers the one above, then upwards so that none leaves the column. */
function stackTops(wrapped: readonly WrappedEntry[], top: number, bottom: number): readonly number[] {
  const tops: number[] = [];
  let free = top;
  for (const { entry, height } of wrapped) {
    const wanted = entry.level === undefined ? free : entry.level - lineStep / 2;
    free = Math.max(wanted, free);
    tops.push(free);
    free += height;
  }
  let limit = bottom;
  for (let index = wrapped.length - 1; index >= 0; index -= 1) {
    limit = Math.min(tops[index] as number, limit - (wrapped[index] as WrappedEntry).height);
    tops[index] = limit;
  }
  return tops;
}

function placeEntry({ entry, lines, height }: WrappedEntry, x: number, textX: number, top: number): PlacedKeyEntry {
  const texts = lines.map((text, index) => textLine({ text, x: textX, top: top + index * lineStep }));
  const right = Math.max(textX, ...texts.map(({ box }) => box.x + box.width));
  return {
    label: entry.label,
    swatch: entry.swatch,
    swatchBox: { x, y: top, width: swatchWidth, height: lineStep },
    lines: texts,
    box: { x, y: top, width: right - x, height: height - entryGap },
  };
}
