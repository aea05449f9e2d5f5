import type { Curve } from "../curve/curve.js";
import { OutOfDomainError } from "../ground/errors.js";
import { completeOptions } from "../ground/options.js";
import { coverageFactor } from "../numerics/coverage-factor.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import { requireBump, withBump } from "./bump.js";
import { chooseModel, type FitAlternative, type Tried, trialsOf } from "./choose.js";
import { type FitModelName, type FitOptions, resolveExponent } from "./fit-options.js";
import { choosePoints, type FitPoints, type LeftOutPoint } from "./fit-points.js";
import { fittedSpectrum } from "./fitted-spectrum.js";
import { type FitFinding, judgeFit } from "./judge.js";
import { findMisreadings, type Misreading } from "./misreadings.js";
import type { RefinedFit } from "./refine.js";

/** A point of the curve against the model. */
export interface FitResidual {
  readonly frequency: number;
  /** Point over model in dB: positive where the point lies above. */
  readonly residualDb: number;
  readonly inFit: boolean;
  readonly line?: number;
}

/** A fitted curve is a spectrum that also knows how it came about. */
export interface FittedCurve extends Spectrum {
  readonly model: FitModelName;
  /** White floor, unit/√Hz; undefined for a model without one. */
  readonly floor: number | undefined;
  /** Hz where the 1/f part equals the floor; 0 for a floor alone, undefined without a floor. */
  readonly cornerHz: number | undefined;
  /** Exponent of the 1/f part of the power density; undefined for a floor alone. */
  readonly exponent: number | undefined;
  /** k = 1, widened by √(χ²/degree) above 1: relative for floor and corner, absolute for the exponent. */
  readonly standardErrors: {
    readonly floor: number | undefined;
    readonly cornerHz: number | undefined;
    readonly exponent: number | undefined;
  };
  /** From standard error to a 95 % interval, and why by that factor. */
  readonly coverage: { readonly probability: 0.95; readonly k: number; readonly basis: string };
  readonly chiSquarePerDegree: number;
  readonly degreesOfFreedom: number;
  /** Every point of the curve, also those left out. */
  readonly residualsDb: readonly FitResidual[];
  /** Models that were tried, when the choice was left to the fit. */
  readonly alternatives: readonly FitAlternative[];
  readonly leftOut: readonly LeftOutPoint[];
  /** Points that the others contradict grossly; still in the fit unless misreadings: 'downweight'. */
  readonly misreadings: readonly Misreading[];
  /** What a reader must know, with a code for scripts; the messages are among `notes` too. */
  readonly findings: readonly FitFinding[];
}

const fitDefaults: FitOptions = Object.freeze({
  model: "auto",
  exponent: undefined,
  fromHz: 0,
  toHz: Number.POSITIVE_INFINITY,
  misreadings: "report",
  bump: undefined,
  beyond: "refuse",
});

const modelNames: readonly string[] = Object.freeze([
  "auto",
  "floor",
  "flicker",
  "floorAndFlicker",
  "floorFlickerRandomWalk",
  "floorFlickerLorentzian",
  "floorFlickerRise",
]);

/**
 * Fits a model to a curve: weighted least squares on log density, parameters in logarithms, the scale eliminated.
 *
 * S(f) = floor² · (1 + (cornerHz/f)^exponent), or with fewer or more terms: 'auto' takes the simplest model that the points
 * support, and an extra term only where the small-sample information criterion falls by a margin. The exponent is by default
 * one more observation, 1 ± 0.15.
 *
 * @param curve - points with their uncertainties (5 % assumed where none is stated).
 * @param options - model, exponent, range of points, misreadings, how it goes on beyond the points (see {@link FitOptions}).
 * @returns a spectrum over the fitted points that carries floor, corner, exponent, standard errors, residuals, alternatives and
 *   findings; band noise of it carries its uncertainty.
 * @throws OutOfDomainError for a range with fewer than two points, an exponent out of (0, 4], unknown options.
 * @see Marquardt 1963; Golub and Pereyra 1973 (variable projection); Hurvich and Tsai 1989 (AICc).
 *
 * @example
 * ```ts
 * import { curveFromPoints, fitCurve } from "@quietband/core";
 * const points = [1, 3, 10, 30, 100, 300, 1000, 3000].map((frequency) => ({
 *   frequency,
 *   density: 8e-9 * Math.sqrt(1 + 40 / frequency),
 * }));
 * const fit = fitCurve(curveFromPoints(points, { unit: "V" }));
 * fit.floor; // → 8.000e-9
 * fit.cornerHz; // → 40.00
 * ```
 */
export function fitCurve(curve: Curve, options: FitOptions = {}): FittedCurve {
  const { model, exponent, fromHz, toHz, misreadings, bump, beyond } = completeOptions<FitOptions>(
    "fitCurve",
    fitDefaults,
    options,
  );
  requireOneOf("model", modelNames, model);
  requireOneOf("misreadings", ["report", "downweight"], misreadings);
  requireMeaning(model, exponent);
  const resolved = resolveExponent(exponent);
  const points = choosePoints(curve, fromHz, toHz, requireBump(curve, bump));
  const plain = trialsOf(resolved, points);
  const suspected = findMisreadings(plain, points);
  const trust = misreadings === "downweight" && suspected.length > 0 ? trustWithout(points, suspected) : undefined;
  const trial = trust === undefined ? plain : trialsOf(resolved, points, trust);
  const { chosen, alternatives } =
    model === "auto" || model === undefined
      ? chooseModel(trial, points, bump === undefined ? [] : ["floorFlickerLorentzian"])
      : { chosen: trial(model), alternatives: [] };
  const used = chosen.fit;
  const degrees = used.degrees - (trust === undefined ? 0 : suspected.length);
  const perDegree = degrees > 0 ? used.chiSquare / degrees : 0;
  const covariance = widened(used.covariance, Math.max(1, perDegree));
  const plainSpectrum = fittedSpectrum(curve, points, used, covariance, beyond ?? "refuse");
  const spectrum = bump === undefined ? plainSpectrum : withBump(plainSpectrum, curve, bump);
  const residualsDb = residualsOf(curve, points, used);
  const found = suspected.map(({ misreading }) => misreading);
  const findings = judgeFit({
    curve,
    points,
    chosen,
    alternatives,
    residuals: used.residuals,
    misreadings: found,
    downweighted: trust !== undefined,
  });
  return Object.freeze({
    ...spectrum,
    ...figuresOf(used, covariance),
    model: used.model.name,
    coverage: coverageOf(perDegree, degrees),
    chiSquarePerDegree: perDegree,
    degreesOfFreedom: degrees,
    residualsDb,
    alternatives: Object.freeze(alternatives),
    leftOut: Object.freeze(points.leftOut),
    misreadings: Object.freeze(found),
    findings: Object.freeze(findings),
    notes: Object.freeze([...(spectrum.notes ?? []), ...findings.map(({ message }) => message)]),
  });
}

/** A floor has no exponent: who gives both means something else. */
function requireMeaning(model: FitOptions["model"], exponent: FitOptions["exponent"]): void {
  if (model !== "floor" || exponent === undefined) return;
  throw new OutOfDomainError(
    "The model 'floor' has no 1/f part, so exponent says nothing; leave it out, or name the model floorAndFlicker.",
  );
}

function requireOneOf(name: string, known: readonly string[], value: string | undefined): void {
  if (known.includes(value ?? "")) return;
  throw new OutOfDomainError(`${name} must be one of ${known.join(", ")}; got ${String(value)}.`);
}

function trustWithout(points: FitPoints, suspected: readonly { readonly index: number }[]): Float64Array {
  const trust = new Float64Array(points.x.length).fill(1);
  for (const { index } of suspected) trust[index] = 0;
  return trust;
}

/** coverageFactor(0.95, Infinity), which takes longer than a fit. */
const normalFactor = 1.959963984540054;

/** Known uncertainties take the normal factor; a scatter estimated from the residuals takes Student's. */
function coverageOf(perDegree: number, degrees: number): FittedCurve["coverage"] {
  const estimated = perDegree > 1;
  return Object.freeze({
    probability: 0.95,
    k: estimated ? coverageFactor(0.95, degrees) : normalFactor,
    basis: estimated
      ? `Student's factor for ${degrees} degrees of freedom: the scatter is estimated from the residuals`
      : "normal factor: the points scatter no more than their uncertainty says",
  });
}

function widened(covariance: RefinedFit["covariance"], factor: number): RefinedFit["covariance"] {
  return covariance?.map((row) => Object.freeze(row.map((value) => value * factor)));
}

function figuresOf(
  { model, scale, parameters }: Tried["fit"],
  covariance: RefinedFit["covariance"],
): Pick<FittedCurve, "floor" | "cornerHz" | "exponent" | "standardErrors"> {
  const errorAt = (index: number): number | undefined =>
    covariance === undefined || index < 0 ? undefined : Math.sqrt(covariance[index + 1]?.[index + 1] ?? Number.NaN);
  const corner = model.parameters.indexOf("ln corner");
  const exponentOf = (): number | undefined => {
    if (model.name === "floor") return undefined;
    if (model.exponentAt >= 0) return parameters[model.exponentAt];
    return model.exponent.kind === "fixed" ? model.exponent.value : undefined;
  };
  const hasFloor = model.name !== "flicker";
  const scaleError = covariance === undefined ? undefined : Math.sqrt(covariance[0]?.[0] ?? Number.NaN);
  return {
    floor: hasFloor ? Math.exp(0.5 * scale) : undefined,
    cornerHz: model.name === "floor" ? 0 : corner >= 0 ? Math.exp(parameters[corner] as number) : undefined,
    exponent: exponentOf(),
    standardErrors: Object.freeze({
      floor: hasFloor && scaleError !== undefined ? 0.5 * scaleError : undefined,
      cornerHz: errorAt(corner),
      exponent: errorAt(model.exponentAt),
    }),
  };
}

function residualsOf(
  curve: Curve,
  points: FitPoints,
  { model, scale, parameters }: RefinedFit,
): readonly FitResidual[] {
  const fitted = new Set(points.points.map(({ frequency }) => frequency));
  const slopes = new Float64Array(model.parameters.length);
  return Object.freeze(
    curve.points.map(({ frequency, density, line }) => {
      const expected = 0.5 * (scale + model.shapeAt(Math.log(frequency), parameters, slopes));
      const residualDb = (20 / Math.LN10) * (Math.log(density) - expected);
      return Object.freeze({
        frequency,
        residualDb,
        inFit: fitted.has(frequency),
        ...(line !== undefined && { line }),
      });
    }),
  );
}
