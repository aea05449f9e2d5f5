import { type Curve, OutOfDomainError, polyline, writeQuantity } from "@quietband/core";
import { type BasisVerdict, compareWith, judgeBasis } from "./basis-verdict.js";
import { type CheckOptions, type KnownMeasurement, knownMeasurement } from "./check-options.js";
import { type FigureView, filteredBands, viewOf } from "./figure-views.js";
import { readStatedFigure, type StatedFigure } from "./read-stated-figure.js";
import { reconcile } from "./reconcile.js";

/** A stated figure beside what its own curve gives. */
export interface StatedFigureCheck {
  readonly figure: StatedFigure;
  /** The stated value in the curve's unit (per √Hz for a density). */
  readonly stated: number;
  /** Unit of `stated` and of everything predicted. */
  readonly unit: string;
  /** Every way the figure may have come about, side by side: convention and record, brick wall and real filter. */
  readonly views: readonly FigureView[];
  /** The comparison with each basis, that which agrees best first. */
  readonly bases: readonly [BasisVerdict, ...BasisVerdict[]];
  /** "agrees" where one basis does; otherwise what the nearest one says. */
  readonly verdict: BasisVerdict["verdict"];
  /** The verdict as a sentence. */
  readonly summary: string;
  /** Share of the band's power that rests on points. */
  readonly shareInsidePoints: number;
  readonly notes: readonly string[];
}

/**
 * Compares a stated figure with the curve of the same part.
 *
 * A peak-to-peak figure is either a factor times the RMS or what a record showed, behind a brick wall or a real filter (first
 * order at the lower edge, second order at the upper: common, not standard); what is not known is looked at both ways.
 * Points, spread of the records, rounding (half a digit over √3) and the unknown filter (half of the difference) add in
 * quadrature, and |ln(stated/predicted)| beyond 1.96 of that is a difference (95 % coverage). Part-to-part spread is not in it.
 *
 * @param curve - the part's noise-density curve.
 * @param figure - a {@link StatedFigure} or its words.
 * @param options - what is known: `basis`, `factor`, `weighting`, `recordSeconds`, `records`, `sampleRateHz`, `relativeTo`, and
 *   `beyond` where the band reaches beyond the points.
 * @returns all views, a verdict for each basis with difference, expanded uncertainty, their ratio, the smallest factor that
 *   would have been seen, and what would reconcile them.
 * @throws OutOfDomainError for a figure in another unit than the curve; as `bandNoise` for a band beyond the points.
 * @see JCGM 100:2008, 4.3.7 and 6.2; the record view by `expectedPeakToPeak`.
 *
 * @example
 * ```ts
 * import { readCurve } from "@quietband/core";
 * import { checkStatedFigure } from "@quietband/figures";
 * const curve = readCurve("f [Hz], e_n [nV/√Hz]\n0.1, 1000\n1, 316\n10, 100\n100, 75\n1000, 70");
 * const check = checkStatedFigure(curve, "2.0 µV peak-to-peak, 0.1 Hz to 10 Hz");
 * check.verdict; // → stated lower
 * check.bases[0].basis; // → record
 * check.bases[0].ratio; // → 0.523
 * ```
 */
export function checkStatedFigure(
  curve: Curve,
  figure: StatedFigure | string,
  options: CheckOptions = {},
): StatedFigureCheck {
  const known = knownMeasurement(options);
  const read = typeof figure === "string" ? readStatedFigure(figure) : figure;
  const stated = read.value * scaleOf(read, curve.unit, options.relativeTo);
  const rounding = read.halfUnit / read.value / Math.sqrt(3);
  if (read.kind === "density") return checkDensity(curve, read, { stated, rounding, known });
  const filtered = filteredBands(curve, read, known);
  const kinds: readonly FigureView["basis"][] = read.kind === "rms" ? ["rms"] : known.bases;
  const views = kinds.flatMap((basis) => filtered.map((band) => viewOf(basis, band, known)));
  const bases = kinds.map((basis) => {
    const own = views.filter((view) => view.basis === basis) as [FigureView, ...FigureView[]];
    const judged = judgeBasis(own, stated, rounding);
    if (judged.verdict === "agrees" || filtered[0] === undefined) return judged;
    const reconcilers = reconcile(curve, stated, own[0], { filtered: filtered[0], known, target: judged.predicted });
    return Object.freeze({ ...judged, reconcilers });
  });
  const [first] = views;
  const outside = first === undefined ? 0 : first.noise.outsidePoints.below + first.noise.outsidePoints.above;
  return assembled({ figure: read, stated, unit: curve.unit, views, bases, outside, known });
}

function checkDensity(
  curve: Curve,
  figure: StatedFigure,
  { stated, rounding, known }: { readonly stated: number; readonly rounding: number; readonly known: KnownMeasurement },
): StatedFigureCheck {
  const spectrum = polyline(curve, { beyond: known.beyond });
  const predicted = Math.sqrt(spectrum.powerDensityAt(figure.fromHz));
  const points = nearestUncertainty(curve, figure.fromHz);
  const judged = compareWith("density", stated, predicted, { points, rounding, records: 0, filter: 0 });
  const [low, high] = spectrum.pointsSpan ?? spectrum.support;
  const outside = figure.fromHz < low || figure.fromHz > high ? 1 : 0;
  return assembled({ figure, stated, unit: `${curve.unit}/√Hz`, views: [], bases: [judged], outside, known });
}

function assembled(given: {
  readonly figure: StatedFigure;
  readonly stated: number;
  readonly unit: string;
  readonly views: readonly FigureView[];
  readonly bases: readonly BasisVerdict[];
  readonly outside: number;
  readonly known: KnownMeasurement;
}): StatedFigureCheck {
  const { figure, stated, unit, views, outside, known } = given;
  const bases = given.bases.toSorted(
    (one, other) => one.differenceOverExpanded - other.differenceOverExpanded,
  ) as unknown as readonly [BasisVerdict, ...BasisVerdict[]];
  const notes = new Set(views.flatMap(({ noise }) => noise.notes));
  if (outside > 0.01)
    notes.add(
      `${Math.round(100 * outside)} % of the band's power lies beyond the points and rests on what is assumed there.`,
    );
  if (figure.kind === "peak-to-peak" && known.weighting === undefined)
    notes.add(
      "The filter is not known: brick wall and first order below with second order above (common, not standard) are both looked at.",
    );
  notes.add("Not included: part-to-part spread of a typical curve.");
  return Object.freeze({
    figure,
    stated,
    unit,
    views: Object.freeze(views),
    bases: Object.freeze(bases),
    verdict: bases[0].verdict,
    summary: summaryOf(bases, known, unit, outside),
    shareInsidePoints: 1 - outside,
    notes: Object.freeze([...notes]),
  });
}

function summaryOf(bases: readonly BasisVerdict[], known: KnownMeasurement, unit: string, outside: number): string {
  const sentences = bases.map((one) => {
    const than = `${basisWords(one.basis, known)}, ${writeQuantity(one.predicted, unit, { digits: 3 })}`;
    if (one.verdict === "agrees") return `agrees with ${than}`;
    const factor = Math.max(one.ratio, 1 / one.ratio);
    const by = factor < 1.5 ? `${(100 * Math.abs(one.ratio - 1)).toFixed(0)} %` : `a factor ${factor.toFixed(1)}`;
    return `${one.verdict === "stated lower" ? "lower" : "higher"} than ${than}, by ${by}`;
  });
  const rest =
    outside > 0.1 ? `; ${Math.round(100 * outside)} % of the power rests on an assumption beyond the points` : "";
  return `${sentences.join("; ")}${rest}`;
}

function basisWords(basis: BasisVerdict["basis"], { factor = 6.6, recordSeconds, records }: KnownMeasurement): string {
  if (basis === "convention") return `${factor} × RMS`;
  if (basis === "rms") return "the RMS of the band";
  if (basis === "density") return "the curve there";
  return `the range of ${records === 1 ? "one record" : `the largest of ${records} records`} of ${recordSeconds} s`;
}

function scaleOf({ unit, text }: StatedFigure, curveUnit: string, relativeTo: number | undefined): number {
  if (unit === curveUnit) return 1;
  if (unit === "1" && relativeTo !== undefined && relativeTo > 0) return relativeTo;
  const hint = unit === "1" ? "say what the ratio is of with relativeTo" : "give figure and curve in one unit";
  throw new OutOfDomainError(`The figure "${text.slice(0, 60)}" is in ${unit}, the curve in ${curveUnit}; ${hint}.`);
}

function nearestUncertainty({ points }: Curve, hz: number): number {
  const near = points.toSorted(
    (one, other) => Math.abs(Math.log(one.frequency / hz)) - Math.abs(Math.log(other.frequency / hz)),
  );
  return near[0]?.uncertainty ?? 0;
}
