import { fitModel } from "./fit-model.js";
import type { FitModelName, ResolvedExponent } from "./fit-options.js";
import type { FitPoints } from "./fit-points.js";
import { type RefinedFit, refine } from "./refine.js";

/** One model that was tried, for the table of alternatives. */
export interface FitAlternative {
  readonly model: FitModelName;
  readonly chiSquare: number;
  readonly parameters: number;
  /** Small-sample information criterion over that of the chosen model: positive is worse. */
  readonly criterionDifference: number;
  readonly verdict: "chosen" | "not needed" | "not supported" | "worse";
  /** Why, where it is not supported by the points. */
  readonly reason?: string;
}

/** A model with its evidence. */
export interface Tried {
  readonly fit: RefinedFit;
  readonly unsupported: string | undefined;
}

/**
 * By how much the criterion must fall for a second and for a third term. Bare AICc keeps a needless term in one curve of eight;
 * with these it is refused in more than 99 % of white and of flicker curves, and a clear corner is kept, with nothing
 * added, in more than 99 % (2000 curves each, fit-curve.slow.test.ts). Three kinds of third term are tried, hence more.
 */
export const extraTermMargins: Readonly<Record<"second" | "third", number>> = Object.freeze({ second: 6, third: 9 });

/** Share of the power that a term must carry at some point to count as seen. */
const leastShare = 0.01;

/** Fits the named model; what was fitted once is not fitted again. */
export type Trials = (name: FitModelName) => Tried;

export function trialsOf(exponent: ResolvedExponent, points: FitPoints, trust?: Float64Array): Trials {
  const known = new Map<FitModelName, Tried>();
  return (name) => {
    const before = known.get(name);
    if (before !== undefined) return before;
    const fit = refine(fitModel(name, exponent), points, { trust });
    const tried = { fit, unsupported: whyUnsupported(fit, points) };
    known.set(name, tried);
    return tried;
  };
}

/** From one term up: a further term must pay for itself. */
export function chooseModel(
  trial: Trials,
  points: FitPoints,
  excluded: readonly FitModelName[] = [],
): { readonly chosen: Tried; readonly alternatives: readonly FitAlternative[] } {
  const single: readonly [Tried, Tried] = [trial("floor"), trial("flicker")];
  const double = [trial("floorAndFlicker")];
  const triple =
    points.x.length >= 8
      ? (["floorFlickerRandomWalk", "floorFlickerLorentzian", "floorFlickerRise"] as const)
          .filter((name) => !excluded.includes(name))
          .map(trial)
      : [];
  const all = [...single, ...double, ...triple];
  const spread = spreadOf(all);
  const criterion = ({ fit }: Tried): number => informationCriterion(fit, points.x.length, spread);
  const best = (among: readonly Tried[]): Tried | undefined =>
    among
      .filter(({ unsupported }) => unsupported === undefined)
      .toSorted((one, other) => criterion(one) - criterion(other))[0];
  let chosen = best(single) ?? single[0];
  for (const [step, margin] of [
    [double, extraTermMargins.second],
    [triple, extraTermMargins.third],
  ] as const) {
    const richer = best(step);
    if (richer !== undefined && criterion(richer) < criterion(chosen) - margin) chosen = richer;
  }
  return {
    chosen,
    alternatives: all.map((tried) => {
      const difference = criterion(tried) - criterion(chosen);
      return Object.freeze({
        model: tried.fit.model.name,
        chiSquare: tried.fit.chiSquare,
        parameters: tried.fit.model.parameters.length + 1,
        criterionDifference: difference,
        verdict: verdictOf(tried, chosen, difference),
        ...(tried.unsupported !== undefined && { reason: tried.unsupported }),
      });
    }),
  };
}

function verdictOf(tried: Tried, chosen: Tried, difference: number): FitAlternative["verdict"] {
  if (tried === chosen) return "chosen";
  if (tried.unsupported !== undefined) return "not supported";
  const richer = tried.fit.model.parameters.length > chosen.fit.model.parameters.length;
  const margin = tried.fit.model.parameters.length > 2 ? extraTermMargins.third : extraTermMargins.second;
  return richer && Math.abs(difference) < margin ? "not needed" : "worse";
}

/** AICc with known uncertainties: χ²/s² + 2k + 2k(k + 1)/(n − k − 1) (Hurvich and Tsai 1989). */
function informationCriterion({ chiSquare, model }: RefinedFit, count: number, spread: number): number {
  const k = model.parameters.length + 1;
  const room = count - k - 1;
  return chiSquare / spread + 2 * k + (room > 0 ? (2 * k * (k + 1)) / room : 1e6);
}

/** Variance of the points over that stated, from the model that leaves least: never below 1. */
function spreadOf(all: readonly Tried[]): number {
  const perDegree = all.filter(({ fit }) => fit.degrees > 0).map(({ fit }) => fit.chiSquare / fit.degrees);
  return Math.max(1, Math.min(...perDegree));
}

/** Why the points do not fix the parameters of a model; undefined where they do. */
function whyUnsupported(
  { model, parameters, covariance, converged }: RefinedFit,
  { x }: FitPoints,
): string | undefined {
  const asked = model.parameters.length + 1 - (model.exponent.kind === "prior" && model.exponentAt >= 0 ? 1 : 0);
  if (x.length <= asked && model.parameters.length > 0) return `${x.length} points do not fix ${asked} parameters`;
  if (!converged || covariance === undefined) return "the points do not fix all its parameters";
  const exponent = model.exponentAt >= 0 ? (parameters[model.exponentAt] as number) : 1;
  if (!(exponent > 0.1 && exponent < 5)) return `its exponent ran to ${exponent.toPrecision(3)}`;
  if (model.name === "floor" || model.name === "flicker") return undefined;
  const slopes = new Float64Array(model.parameters.length);
  let [mostFloor, mostRest] = [0, 0];
  for (const at of x) {
    const floorShare = Math.exp(-model.shapeAt(at, parameters, slopes));
    mostFloor = Math.max(mostFloor, floorShare);
    mostRest = Math.max(mostRest, 1 - floorShare);
  }
  if (mostFloor < leastShare) return "no point shows the floor: the corner lies above the points";
  return mostRest < leastShare ? "no point shows the 1/f part: the corner lies below the points" : undefined;
}
