import { runningNoise, type Spectrum, type Weighting } from "@quietband/core";
import type { Candidate } from "../chain/candidate.js";
import { candidateSpectrum } from "../chain/candidate-spectrum.js";
import { type ComparisonPath, namedCandidates } from "../chain/compare-curves.js";
import { refuseUnknownKeys } from "../convert/domain.js";
import { layoutDensityPlot } from "./density-layout.js";
import { hertzText } from "./density-words.js";
import { layoutRunningNoisePlot } from "./running-noise-plot.js";
import { inkStack, type StackedLayout, stackPlots } from "./stacked-picture.js";

/** What {@link candidatesPlot} takes besides the candidates: the path of `compareCurves`, and how the picture looks. */
export interface CandidatesPlotOptions extends ComparisonPath {
  /** Resistance of the source, Ω, as in `compareCurves`. */
  readonly sourceOhms?: number | undefined;
  readonly title?: string | undefined;
  readonly note?: string | undefined;
  /** Pixels, 400 to 4000; 760 unless given. */
  readonly width?: number | undefined;
  /** Pixels of each of the two plots, 280 to 4000; 400 unless given. */
  readonly height?: number | undefined;
}

/**
 * Candidates in one picture: their densities above, with the band shaded, and below their RMS noise from the lower band edge
 * up to each frequency, through the path's weighting. Who is loud where, and what it adds up to. Same input, same text.
 *
 * @param candidates - as `compareCurves` takes them; of more than a dozen the first are named and the rest drawn faint, so
 *   give them ranked.
 * @param options - band, weighting and source as in `compareCurves`; title, note and size.
 * @returns the text of an SVG document.
 * @throws OutOfDomainError for whatever `compareCurves` refuses, and for sizes out of range.
 *
 * @example
 * ```ts
 * import { whiteFlicker } from "@quietband/core";
 * import { candidatesPlot } from "@quietband/figures";
 * const parts = [
 *   { name: "low floor", spectrum: whiteFlicker({ floor: 3e-9, cornerHz: 100 }) },
 *   { name: "low corner", spectrum: whiteFlicker({ floor: 7e-9, cornerHz: 0.02 }) },
 * ];
 * candidatesPlot(parts, { fromHz: 0.1, toHz: 1e3 }).includes("low corner"); // → true
 * ```
 */
export function candidatesPlot(candidates: readonly Candidate[], options: CandidatesPlotOptions): string {
  return inkStack(layoutCandidatesPlot(candidates, options));
}

const optionNames: readonly (keyof CandidatesPlotOptions)[] = [
  ...(["fromHz", "toHz", "weighting", "kelvin", "celsius", "sourceOhms"] as const),
  ...(["title", "note", "width", "height"] as const),
];

/** Lays out both plots; nothing drawn yet. */
export function layoutCandidatesPlot(candidates: readonly Candidate[], options: CandidatesPlotOptions): StackedLayout {
  refuseUnknownKeys("candidatesPlot", optionNames, options);
  const { fromHz, toHz, weighting, title = "Candidates", note, width, height = 400 } = options;
  const models = namedCandidates(candidates).map(({ name, candidate }) => ({
    label: name,
    spectrum: candidateSpectrum(candidate, options),
  }));
  const [low, high] = shownBand(
    models.map(({ spectrum }) => spectrum),
    options,
  );
  const unit = models[0]?.spectrum.unit ?? "V";
  const size = { width, height };
  const density = layoutDensityPlot({
    models,
    band: { fromHz, toHz },
    fromHz: Math.min(low, ...ends(models, 0)),
    toHz: Math.max(high, ...ends(models, 1)),
    title,
    ...size,
  });
  const edgesHz = edgesBetween(low, high);
  const running = layoutRunningNoisePlot({
    curves: models.map(({ label, spectrum }) => ({
      label,
      edgesHz,
      rms: runningNoise(spectrum, { fromHz, edgesHz, weighting }).rms,
    })),
    unit,
    title: `RMS from ${hertzText(fromHz)} up to an edge${through(weighting)}`,
    note,
    ...size,
  });
  return stackPlots(title, [density, running]);
}

function through(weighting: Weighting | undefined): string {
  return weighting === undefined ? "" : `, through ${weighting.name}`;
}

/** Where the points of the candidates begin or end. */
function ends(models: readonly { readonly spectrum: Spectrum }[], end: 0 | 1): readonly number[] {
  return models.flatMap(({ spectrum }) => spectrum.pointsSpan?.[end] ?? []).filter((hz) => hz > 0 && hz < Infinity);
}

/** How far a picture follows a band that ends at 0 Hz or at infinity: this factor beyond the last frequency where anything bends. */
const beyondBends = 30;

/** The band as far as a logarithmic axis can show it: a filter ends it, where there is one. */
function shownBand(
  spectra: readonly Spectrum[],
  { fromHz, toHz, weighting }: ComparisonPath,
): readonly [number, number] {
  const drawable = (hz: number): boolean => hz > 0 && hz < Number.POSITIVE_INFINITY;
  const filter = (weighting?.knots ?? []).filter(drawable);
  const bends = filter.length > 0 ? filter : spectra.flatMap(({ knots }) => knots.filter(drawable));
  const known = [...bends, fromHz, toHz].filter(drawable);
  const all = known.length > 0 ? known : [1];
  const supported = Math.min(...[...spectra, ...(weighting === undefined ? [] : [weighting])].map(topOf));
  return [
    fromHz > 0 ? fromHz : Math.min(...all) / beyondBends,
    toHz < Number.POSITIVE_INFINITY ? toHz : Math.min(Math.max(...all) * beyondBends, supported),
  ];
}

function topOf({ support }: Spectrum | Weighting): number {
  return support[1];
}

/** Thirty edges a decade, the last one exact. */
function edgesBetween(low: number, high: number): readonly number[] {
  const steps = Math.min(600, Math.max(2, Math.ceil(30 * Math.log10(high / low))));
  const ratio = Math.log(high / low);
  return Array.from({ length: steps }, (_, k) => (k === steps - 1 ? high : low * Math.exp((ratio * (k + 1)) / steps)));
}
