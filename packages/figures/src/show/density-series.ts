import type { Curve, CurvePoint, Spectrum } from "@quietband/core";
import { supportWithin } from "./density-domain.js";
import type { DensityModel, DensityPlotOptions } from "./density-options.js";
import type { Frame } from "./frame.js";
import type { KeyEntry, Swatch } from "./key.js";
import { markerRadius, type Pixel, type PlotLine, type PlotMarker } from "./plot-layout.js";
import { distinctSeries, ink, restStyle, type SeriesStyle, seriesStyle } from "./series-style.js";
import { thinRun, traceRuns } from "./trace.js";

/** Lines and points of all series, and what the key says of them. */
export interface DensitySeries {
  readonly lines: readonly PlotLine[];
  readonly markers: readonly PlotMarker[];
  readonly entries: readonly KeyEntry[];
  /** Series too many to be told apart, drawn faint and only counted in the key. */
  readonly unnamed: number;
}

/** Lays out curves and models in a frame; the first ones get a look of their own, the rest go faint behind them. */
export function layoutSeries(options: DensityPlotOptions, frame: Frame): DensitySeries {
  const { curves = [], models = [] } = options;
  const looks = seriesLooks(curves.length, models.length);
  const points = curves.slice(0, looks.curves.length).reduce((sum, curve) => sum + curve.points.length, 0);
  const detail = {
    markers: points <= mostMarkers,
    bars: points <= mostBars,
    joined: models.length === 0,
    caps: looks.curves.length === 1 ? 4 : 0,
  };
  const suspects = new Set(options.suspected ?? []);
  const rest = curves.slice(looks.curves.length).map((curve) => faintLine(curve, frame));
  const restModels = models.slice(looks.models.length).flatMap((model) => modelLines(model, restStyle, frame).lines);
  const drawnModels = looks.models.map((look, index) => modelSeries(models[index] as DensityModel, look, frame));
  const drawnCurves = looks.curves.map((look, index) =>
    curveSeries(curves[index] as Curve, {
      look,
      frame,
      detail,
      suspects,
      unnamed: curves.length === 1 ? "points" : `curve ${index + 1}`,
    }),
  );
  const drawn = [...drawnCurves, ...drawnModels];
  return {
    lines: [...rest, ...restModels, ...drawn.flatMap(({ lines }) => lines)],
    markers: drawn.flatMap(({ markers }) => markers),
    entries: [...drawn.flatMap(({ entry }) => entry ?? []), ...explanations(drawn, curves)],
    unnamed: curves.length + models.length - drawn.length,
  };
}

/** More points than this are a line to the eye; more bars than this are a smear. */
const mostMarkers = 600;
const mostBars = 200;

/** One curve with models keeps a neutral ink, as many curves as models pair up in colour, others count on. */
function seriesLooks(
  curves: number,
  models: number,
): { readonly curves: readonly SeriesStyle[]; readonly models: readonly SeriesStyle[] } {
  const paired = curves === models;
  const namedModels = Math.min(models, paired || curves === 0 ? distinctSeries : Math.ceil(distinctSeries / 2));
  const namedCurves = Math.min(curves, paired || models === 0 ? distinctSeries : distinctSeries - namedModels);
  const neutral = curves === 1 && models > 0;
  const curveLooks = Array.from({ length: namedCurves }, (_, index) => seriesStyle(index));
  const shift = paired || neutral ? 0 : namedCurves;
  return {
    curves: neutral ? [{ ...seriesStyle(0), colour: ink.title }] : curveLooks,
    models: Array.from({ length: namedModels }, (_, index) => seriesStyle(index + shift)),
  };
}

interface DrawnSeries {
  readonly lines: readonly PlotLine[];
  readonly markers: readonly PlotMarker[];
  /** None for a series that is nowhere in the picture. */
  readonly entry: KeyEntry | undefined;
  readonly beyond: boolean;
}

interface CurveWork {
  readonly look: SeriesStyle;
  readonly frame: Frame;
  readonly detail: {
    readonly markers: boolean;
    readonly bars: boolean;
    readonly joined: boolean;
    readonly caps: number;
  };
  readonly suspects: ReadonlySet<number>;
  /** What a curve without a label is called. */
  readonly unnamed: string;
}

function curveSeries(curve: Curve, work: CurveWork): DrawnSeries {
  const { look, frame, detail } = work;
  const pixels = curve.points.map(({ frequency, density }) => [frame.x.at(frequency), frame.y.at(density)] as const);
  const line = { dash: look.dash, width: 1.6 };
  const isLine = detail.joined || !detail.markers;
  const swatch: Swatch = {
    colour: look.colour,
    ...(isLine ? { line } : {}),
    ...(detail.markers ? { marker: { shape: look.marker, filled: true } } : {}),
  };
  const label = curve.label === "" ? work.unnamed : curve.label;
  const visible = curve.points.filter(({ frequency }) => isShown(frequency, frame));
  const end = visible.at(-1);
  return {
    lines: isLine ? [{ runs: [thinRun(pixels)], colour: look.colour, ...line }] : [],
    markers: detail.markers ? visible.map((point) => pointMarker(point, work)) : [],
    entry: end === undefined ? undefined : { label, swatch, level: levelInside(frame.y.at(end.density), frame) },
    beyond: false,
  };
}

function pointMarker(point: CurvePoint, { look, frame, detail, suspects }: CurveWork): PlotMarker {
  const { density, uncertainty } = point;
  const spread = Math.exp(uncertainty);
  const bar = { top: frame.y.at(density * spread), bottom: frame.y.at(density / spread), caps: detail.caps };
  return {
    x: frame.x.at(point.frequency),
    y: frame.y.at(density),
    shape: look.marker,
    filled: point.inFit,
    colour: look.colour,
    ...(bar.bottom - bar.top > 2 * markerRadius + 1 && detail.bars ? { bar } : {}),
    ring: suspects.has(point.frequency),
  };
}

function faintLine(curve: Curve, frame: Frame): PlotLine {
  const run = thinRun(
    curve.points.map(({ frequency, density }) => [frame.x.at(frequency), frame.y.at(density)] as const),
  );
  return { runs: [run], colour: ink.rest, dash: [], width: 1 };
}

function modelSeries(model: DensityModel, look: SeriesStyle, frame: Frame): DrawnSeries {
  const { lines, level, beyond } = modelLines(model, look, frame);
  const label = model.label === "" ? "model" : model.label;
  const swatch = { colour: look.colour, line: { dash: look.dash, width: 2 } };
  const entry = level === undefined ? undefined : { label, swatch, level: levelInside(level, frame) };
  return { lines, markers: [], entry, beyond };
}

/** The model over the picture: as it is where points support it, dotted beyond them. */
function modelLines(
  { spectrum }: DensityModel,
  look: SeriesStyle,
  frame: Frame,
): { readonly lines: readonly PlotLine[]; readonly level: number | undefined; readonly beyond: boolean } {
  const range = supportWithin(spectrum, frame.x.domain);
  if (range === undefined) return { lines: [], level: undefined, beyond: false };
  const [low, high] = range;
  const [from, to] = spectrum.pointsSpan ?? range;
  const inside = [Math.max(low, from), Math.min(high, to)] as const;
  const stretches: readonly { readonly range: readonly [number, number]; readonly dotted: boolean }[] = [
    { range: [low, Math.min(high, from)], dotted: true },
    { range: inside, dotted: false },
    { range: [Math.max(low, to), high], dotted: true },
  ];
  const drawn = stretches.filter(({ range: [start, end] }) => start < end);
  const lines = drawn.map(({ range: stretch, dotted }) => ({
    runs: traceSpectrum(spectrum, stretch, frame),
    colour: look.colour,
    dash: dotted ? beyondDash : look.dash,
    width: look === restStyle ? 1 : 2,
  }));
  return { lines, level: lines.at(-1)?.runs.at(-1)?.at(-1)?.[1], beyond: drawn.some(({ dotted }) => dotted) };
}

const beyondDash: readonly number[] = Object.freeze([1.5, 4]);

function traceSpectrum(
  spectrum: Spectrum,
  [from, to]: readonly [number, number],
  frame: Frame,
): readonly (readonly Pixel[])[] {
  const edges = [from, ...spectrum.knots.filter((hz) => hz > from && hz < to), to];
  return traceRuns({ edges, pixelAt: (hz) => [frame.x.at(hz), frame.y.at(Math.sqrt(spectrum.powerDensityAt(hz)))] });
}

function explanations(drawn: readonly DrawnSeries[], curves: readonly Curve[]): readonly KeyEntry[] {
  const markers = drawn.flatMap((series) => series.markers);
  const marker = { shape: "circle" as const };
  const entries: KeyEntry[] = [];
  if (markers.some(({ filled }) => !filled))
    entries.push({ label: "left out of the fit", swatch: { colour: ink.text, marker: { ...marker, filled: false } } });
  if (markers.some(({ ring }) => ring))
    entries.push({ label: "suspected misreading", swatch: { colour: ink.alarm, ring: true } });
  if (markers.some(({ bar }) => bar !== undefined)) {
    const assumed = curves.some(({ uncertaintyIs }) => uncertaintyIs === "assumed");
    const label = `± one standard uncertainty${assumed ? " (assumed)" : ""}`;
    entries.push({ label, swatch: { colour: ink.text, bar: true, marker: { ...marker, filled: true } } });
  }
  if (drawn.some(({ beyond }) => beyond))
    entries.push({ label: "beyond the points", swatch: { colour: ink.text, line: { dash: beyondDash, width: 2 } } });
  return entries;
}

function isShown(hz: number, { x }: Frame): boolean {
  return hz >= x.domain[0] && hz <= x.domain[1];
}

function levelInside(y: number, { plot }: Frame): number {
  return Math.max(plot.y, Math.min(y, plot.y + plot.height));
}
