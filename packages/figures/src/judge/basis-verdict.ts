import type { FigureView } from "./figure-views.js";
import type { Reconciler } from "./reconcile.js";

/** A stated figure against one way it may have come about. */
export interface BasisVerdict {
  readonly basis: FigureView["basis"] | "density";
  /** What the curve gives; between the filters where it is not known which was used. */
  readonly predicted: number;
  /** stated / predicted. */
  readonly ratio: number;
  /** 20·log10(stated/predicted). */
  readonly differenceDb: number;
  /** Relative standard uncertainties (k = 1) of the comparison; `total` is their root of squares. */
  readonly tolerance: FigureTolerance;
  /** k·total with 95 % coverage, of ln(stated/predicted). */
  readonly expanded: { readonly k: number; readonly coverageProbability: 0.95; readonly relative: number };
  /** |ln ratio| over the expanded uncertainty: above 1 they differ. */
  readonly differenceOverExpanded: number;
  /** A factor between stated and predicted that would have been seen with 95 % probability. */
  readonly smallestFactorSeen: number;
  readonly verdict: "agrees" | "stated lower" | "stated higher";
  /** What would make the two agree, each taken alone; empty where they do. */
  readonly reconcilers: readonly Reconciler[];
}

/** What a comparison rests on. */
export interface FigureTolerance {
  readonly points: number;
  readonly rounding: number;
  /** Spread of the stated number of records. */
  readonly records: number;
  /** Half of what the two filters differ by; 0 where the filter is known. */
  readonly filter: number;
  readonly total: number;
}

const coverage = 1.959963984540054;
/** A difference this many standard uncertainties beyond the limit is seen in 95 % of cases. */
const seen = 1.6448536269514722;

/** Compares a stated value with a predicted one. */
export function compareWith(
  basis: BasisVerdict["basis"],
  stated: number,
  predicted: number,
  parts: Omit<FigureTolerance, "total">,
): BasisVerdict {
  const total = Math.hypot(parts.points, parts.rounding, parts.records, parts.filter);
  const difference = Math.log(stated / predicted);
  const relative = coverage * total;
  const apart = difference < 0 ? "stated lower" : "stated higher";
  return Object.freeze({
    basis,
    predicted,
    ratio: stated / predicted,
    differenceDb: (20 / Math.LN10) * difference,
    tolerance: Object.freeze({ ...parts, total }),
    expanded: Object.freeze({ k: coverage, coverageProbability: 0.95, relative }),
    differenceOverExpanded: Math.abs(difference) / relative,
    smallestFactorSeen: Math.exp((coverage + seen) * total),
    verdict: Math.abs(difference) <= relative ? "agrees" : apart,
    reconcilers: Object.freeze([]),
  });
}

/** Compares with a basis as the one or two filters show it. */
export function judgeBasis(
  views: readonly [FigureView, ...FigureView[]],
  stated: number,
  rounding: number,
): BasisVerdict {
  const [first] = views;
  const logs = views.map(({ predicted }) => Math.log(predicted));
  const [least, most] = [Math.min(...logs), Math.max(...logs)];
  return compareWith(first.basis, stated, Math.exp(0.5 * (least + most)), {
    points: Math.max(...views.map(({ noise }) => noise.standardUncertainty ?? 0)),
    rounding,
    records: Math.max(...views.map(({ spread }) => spread)),
    filter: 0.5 * (most - least),
  });
}
