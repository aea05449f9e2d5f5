import { OutOfDomainError } from "@quietband/core";
import { composePlot } from "./compose-plot.js";
import { airedLinear, airedLog, finiteExtent, positiveExtent } from "./extent.js";
import type { AxisPlan, Frame } from "./frame.js";
import { dropGuide, joinGuides, levelGuide } from "./guides.js";
import type { KeyEntry } from "./key.js";
import { checkLineOptions, type LinePlotAxis, type LinePlotOptions, type PlotSeries } from "./line-options.js";
import type { PlotLayout, PlotLine, PlotMarker } from "./plot-layout.js";
import { pictureSize } from "./plot-options.js";
import { distinctSeries, restStyle, type SeriesStyle, seriesStyle } from "./series-style.js";
import { evenTickLabel, tickLabel } from "./tick-label.js";
import { splitRuns, thinRun } from "./trace.js";

/** Lays out a line plot; `where` names the function in messages. */
export function layoutLinePlot(where: string, options: LinePlotOptions): PlotLayout {
  checkLineOptions(where, options);
  const { lines, marks = [], title = "", note = "" } = options;
  const named = lines.slice(0, distinctSeries);
  const rest = lines.slice(distinctSeries);
  const plan = {
    ...pictureSize(options),
    title,
    note,
    x: axisPlan(`x of ${where}`, options.x, valuesOn("x", options), "anywhere"),
    y: axisPlan(`y of ${where}`, options.y, valuesOn("y", options), "on zero"),
  };
  return composePlot(
    plan,
    { title: title || `${options.y.title} over ${options.x.title}`, description: describeLines(options) },
    (frame) => {
      const drawn = named.map((line, index) => seriesLine(line, seriesStyle(index), frame));
      const marked = drawn.map((line, index) => sparseMarkers(line, index, named.length));
      return {
        areas: [],
        lines: [...rest.map((line) => seriesLine(line, restStyle, frame)), ...drawn],
        markers: marked.flat(),
        guides: joinGuides(
          marks.map(({ axis, value, label }) => (axis === "x" ? dropGuide : levelGuide)(value, label, frame)),
        ),
        entries: named.flatMap((line, index) => lineEntry(line, index, drawn[index] as PlotLine, marked[index] ?? [])),
        unnamed: rest.length,
      };
    },
  );
}

function* valuesOn(axis: "x" | "y", { lines, marks = [] }: LinePlotOptions): Generator<number> {
  for (const line of lines) yield* line[axis];
  for (const mark of marks) if (mark.axis === axis) yield mark.value;
}

/** Air beside the first and last value, as a share of the span. */
const air = 0.04;

function axisPlan(
  what: string,
  { title, unit, scale }: LinePlotAxis,
  values: Iterable<number>,
  standing: "on zero" | "anywhere",
): AxisPlan {
  if (scale === "log") {
    const range = positiveExtent(values);
    if (range === undefined)
      throw new OutOfDomainError(`${what} is logarithmic and needs at least one finite value above zero; got none.`);
    return { kind: "log", domain: airedLog(range, air, 2), title, label: tickLabel(unit) };
  }
  // The zero of a level in dB is a convention, not an absence.
  const range = finiteExtent(standing === "on zero" && !unit.startsWith("dB") ? [0, ...values] : values);
  if (range === undefined) throw new OutOfDomainError(`${what} needs at least one finite value; got none.`);
  return { kind: "linear", domain: airedLinear(range, air), title, label: evenTickLabel(unit) };
}

function seriesLine({ x, y }: PlotSeries, look: SeriesStyle, frame: Frame): PlotLine {
  const pixels = x.map((value, index) => [frame.x.at(value), frame.y.at(y[index] as number)] as const);
  const width = look === restStyle ? 1 : 2;
  return { runs: splitRuns(pixels).map(thinRun), colour: look.colour, dash: look.dash, width };
}

/** A handful of markers on each of several lines, staggered, so that they are told apart in grey; none on a lone one. */
function sparseMarkers({ runs, colour }: PlotLine, index: number, count: number): readonly PlotMarker[] {
  const pixels = runs.flat();
  if (count < 2 && pixels.length > 1) return [];
  const shape = seriesStyle(index).marker;
  const places = pixels.length === 1 ? [0] : [0, 1, 2, 3].map((place) => (place + (index + 1) / (count + 1)) / 4);
  return places.map((place) => {
    const [x, y] = pixels[Math.round(place * (pixels.length - 1))] as readonly [number, number];
    return { x, y, shape, filled: true, colour, ring: false };
  });
}

function lineEntry(
  { label }: PlotSeries,
  index: number,
  { colour, dash, runs }: PlotLine,
  markers: readonly PlotMarker[],
): readonly KeyEntry[] {
  const level = runs.at(-1)?.at(-1)?.[1];
  if (label === "" || level === undefined) return [];
  const marker = markers.length > 0 ? { marker: { shape: seriesStyle(index).marker, filled: true } } : {};
  return [{ label, level, swatch: { colour, line: { dash, width: 2 }, ...marker } }];
}

function describeLines({ lines, x, y, marks = [] }: LinePlotOptions): string {
  const names = lines.slice(0, distinctSeries).map(({ label }) => label);
  const more = lines.length > distinctSeries ? ` and ${lines.length - distinctSeries} more` : "";
  const drawn = names.every((name) => name === "")
    ? `${lines.length} line${lines.length > 1 ? "s" : ""}`
    : names.join(", ");
  const marked = marks.length > 0 ? ` Marked: ${marks.map(({ label }) => label).join(", ")}.` : "";
  return `${y.title} in ${y.unit} (${y.scale}) over ${x.title} in ${x.unit} (${x.scale}): ${drawn}${more}.${marked}`;
}
