import { OutOfDomainError, type Spectrum } from "@quietband/core";
import type { DensityPlotOptions } from "./density-options.js";
import { airedLog, type Extent, joinExtents, positiveExtent } from "./extent.js";

/** Frequencies, Hz, that the picture shows: points, interval, band, and a corner that is not far off. */
export function frequencyRange(options: DensityPlotOptions): Extent {
  const { band, cornerHz, fromHz, toHz } = options;
  const points = pointsRange(options);
  const asked = positiveExtent([band?.fromHz, band?.toHz, fromHz, toHz].map((hz) => hz ?? 0));
  const data = joinExtents(points ?? bendsRange(options), asked);
  if (data === undefined)
    throw new OutOfDomainError(
      "densityPlot cannot tell which frequencies to show: the models are defined everywhere and bend nowhere; give fromHz and toHz.",
    );
  const near = cornerHz !== undefined && cornerHz >= data[0] / 10 && cornerHz <= data[1] * 10;
  const range = (near ? joinExtents(data, [cornerHz, cornerHz]) : undefined) ?? data;
  const [low, high] = points === undefined ? airedLog(range, 0.25, 100) : airedLog(range, 0.03, 2);
  return [fromHz ?? low, toHz ?? high];
}

function pointsRange({ curves = [], models = [], interval }: DensityPlotOptions): Extent | undefined {
  let range = positiveExtent(interval?.frequencies ?? []);
  for (const { points } of curves) range = joinExtents(range, positiveExtent(points.map(({ frequency }) => frequency)));
  for (const { spectrum } of models) range = joinExtents(range, positiveExtent(spectrum.pointsSpan ?? []));
  return range;
}

/** What models without points say of the frequencies where they are interesting. */
function bendsRange({ models = [] }: DensityPlotOptions): Extent | undefined {
  let range: Extent | undefined;
  for (const { support, knots } of models.map(({ spectrum }) => spectrum))
    range = joinExtents(range, positiveExtent([...support, ...knots]));
  return range;
}

/** A model that falls for ever does not squeeze the rest flat: it may take the axis down by this factor. */
const modelReach = 1000;

/** Densities, unit/√Hz, that the picture shows over a range of frequencies. */
export function densityRange(options: DensityPlotOptions, [fromHz, toHz]: Extent): Extent {
  const { curves = [], models = [], interval, floor } = options;
  const shown = (hz: number): boolean => hz >= fromHz && hz <= toHz;
  const points = curves.flatMap((curve) => curve.points.filter(({ frequency }) => shown(frequency)));
  let range = positiveExtent(
    points.flatMap(({ density, uncertainty }) => [density * Math.exp(uncertainty), density * Math.exp(-uncertainty)]),
  );
  const inside = (densities: readonly number[]): readonly number[] =>
    densities.filter((_, index) => shown(interval?.frequencies[index] as number));
  range = joinExtents(range, positiveExtent([...inside(interval?.lower ?? []), ...inside(interval?.upper ?? [])]));
  const levels = positiveExtent(models.flatMap(({ spectrum }) => samples(spectrum, [fromHz, toHz])));
  if (levels !== undefined) {
    const [least, most] =
      range === undefined ? [levels[1] / modelReach ** 2, levels[1]] : [range[0] / modelReach, range[1] * modelReach];
    const within = (level: number): number => Math.min(Math.max(level, least), most);
    range = joinExtents(range, [within(levels[0]), within(levels[1])]);
  }
  if (floor !== undefined && range !== undefined && floor >= range[0] / 10 && floor <= range[1] * 10)
    range = joinExtents(range, [floor, floor]);
  if (range === undefined)
    throw new OutOfDomainError(
      `densityPlot found no density above zero between ${fromHz} Hz and ${toHz} Hz; show frequencies where curves or models are defined.`,
    );
  return airedLog(range, 0.06, 3);
}

/** Frequencies of a spectrum's support inside a range; undefined where they do not meet. */
export function supportWithin({ support }: Spectrum, [fromHz, toHz]: Extent): Extent | undefined {
  const low = Math.max(fromHz, support[0]);
  const high = Math.min(toHz, support[1]);
  return low < high ? [low, high] : undefined;
}

function samples(spectrum: Spectrum, range: Extent): readonly number[] {
  const within = supportWithin(spectrum, range);
  if (within === undefined) return [];
  const [low, high] = within;
  const even = Array.from({ length: 101 }, (_, index) =>
    Math.min(high, low * Math.exp((Math.log(high / low) * index) / 100)),
  );
  const bends = spectrum.knots.filter((hz) => hz > low && hz < high).slice(0, 2000);
  return [...even, ...bends].map((hz) => Math.sqrt(spectrum.powerDensityAt(hz)));
}
