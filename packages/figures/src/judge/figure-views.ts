import {
  type BandNoise,
  type Beyond,
  bandNoise,
  type Curve,
  polyline,
  type Spectrum,
  type Weighting,
} from "@quietband/core";
import { expectedPeakToPeak } from "../convert/expected-peak-to-peak.js";
import { peakToPeak } from "../convert/peak-to-peak.js";
import type { FigureBasis, KnownMeasurement } from "./check-options.js";
import type { StatedFigure } from "./read-stated-figure.js";
import { usualFilter } from "./usual-filter.js";

/** One way a stated figure may have come about, and what the curve gives for it. */
export interface FigureView {
  readonly basis: FigureBasis | "rms";
  readonly filter: "brick wall" | "usual filter" | "as given";
  /** RMS of the band through that filter. */
  readonly noise: BandNoise;
  /** What the figure would be, in the curve's unit. */
  readonly predicted: number;
  /** predicted / RMS. */
  readonly multipleOfRms: number;
  /** Relative spread from record to record; 0 for a convention. */
  readonly spread: number;
  readonly words: string;
}

/** A spectrum in a band through a filter: what a view integrates. */
export interface FilteredBand {
  readonly filter: FigureView["filter"];
  readonly spectrum: Spectrum;
  readonly band: { readonly fromHz: number; readonly toHz: number; readonly weighting?: Weighting | undefined };
}

/** The filters that may have stood before the meter: the one that is known, or either of two. */
export function filteredBands(
  curve: Curve,
  { fromHz, toHz, kind }: Pick<StatedFigure, "fromHz" | "toHz" | "kind">,
  { weighting, beyond }: KnownMeasurement,
): readonly FilteredBand[] {
  const spectrum = polyline(curve, { beyond });
  const brickWall: FilteredBand = { filter: "brick wall", spectrum, band: { fromHz, toHz } };
  if (weighting === "brick wall") return [brickWall];
  if (weighting !== undefined) return [{ filter: "as given", spectrum, band: { fromHz, toHz, weighting } }];
  // an RMS of a band is a computed figure; real filters belong to what was measured low down
  if (kind !== "peak-to-peak" || fromHz === 0 || toHz === Number.POSITIVE_INFINITY) return [brickWall];
  const skirts = polyline(curve, { beyond: withSkirts(beyond) });
  const whole = { fromHz: 0, toHz: Number.POSITIVE_INFINITY, weighting: usualFilter(fromHz, toHz) };
  return [brickWall, { filter: "usual filter", spectrum: skirts, band: whole }];
}

/** The skirts of a real filter reach beyond any points: there the curve goes on as 1/f below and flat above unless told. */
function withSkirts(beyond: Beyond | undefined): Beyond {
  const sides = typeof beyond === "object" ? beyond : { below: beyond, above: beyond };
  const told = (side: typeof sides.below) => (side === "refuse" ? undefined : side);
  return { below: told(sides.below) ?? 1, above: told(sides.above) ?? "hold" };
}

/** What the curve gives for one basis through one filter. */
export function viewOf(
  basis: FigureView["basis"],
  { filter, spectrum, band }: FilteredBand,
  known: KnownMeasurement,
): FigureView {
  const noise = bandNoise(spectrum, band);
  const base = { basis, filter, noise };
  if (basis === "rms")
    return Object.freeze({ ...base, predicted: noise.rms, multipleOfRms: 1, spread: 0, words: `RMS, ${filter}` });
  if (basis === "convention") {
    const { peakToPeak: predicted, convention } = peakToPeak(noise.rms, { factor: known.factor });
    const multipleOfRms = predicted / noise.rms;
    return Object.freeze({ ...base, predicted, multipleOfRms, spread: 0, words: `${convention}, ${filter}` });
  }
  const { recordSeconds, records, sampleRateHz } = known;
  const range = expectedPeakToPeak(spectrum, { ...band, recordSeconds, records, sampleRateHz });
  return Object.freeze({
    ...base,
    predicted: range.mean,
    multipleOfRms: range.multipleOfRms,
    spread: range.relativeSpread,
    words: `${records === 1 ? "one record" : `largest of ${records} records`} of ${recordSeconds} s, ${filter}`,
  });
}
