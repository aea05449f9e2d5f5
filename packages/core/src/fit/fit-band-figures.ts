import type { Curve } from "../curve/curve.js";
import { OutOfDomainError } from "../ground/errors.js";
import { completeOptions } from "../ground/options.js";
import type { Beyond } from "../spectrum/beyond.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import { type BandFigure, type FigureReading, readingOfBand, readingOfSpot, type SpotDensity } from "./band-figure.js";
import { type CornerLimit, cornerLimit, nonnegativeSolution, requirePossible } from "./figure-limits.js";
import { type FitOptions, resolveExponent } from "./fit-options.js";
import { figuresSpectrum } from "./fitted-spectrum.js";
import { type FigureFinding, judgeFigures } from "./judge-figures.js";
import { type SolvedFigures, solveFigures, weightOf } from "./solve-figures.js";

/** What {@link fitBandFigures} takes besides the figures. */
export interface BandFiguresOptions {
  /** Unit of the signal; that of `curve` unless given. */
  readonly unit?: string | undefined;
  /** Exponent of the 1/f part: a number in (0, 4], 'free', or a prior; 1 ± 0.15 unless given. */
  readonly exponent?: FitOptions["exponent"];
  /** Densities stated at single frequencies. */
  readonly densities?: readonly SpotDensity[] | undefined;
  /** Points of a plot that join in, each with its own uncertainty. */
  readonly curve?: Curve | undefined;
  /** How the spectrum goes on beyond the figures; 'refuse' unless given. */
  readonly beyond?: Beyond | undefined;
}

/** A figure against the answer. */
export interface FigureResidual {
  readonly label: string;
  /** RMS (or density) as stated, and what the answer gives there. */
  readonly stated: number;
  readonly fitted: number;
  /** Stated over fitted, in dB. */
  readonly residualDb: number;
  /** Relative standard uncertainty that the figure entered with. */
  readonly uncertainty: number;
}

/** What one cause of uncertainty does to the answer, k = 1, both relative. */
export interface FigureCost {
  readonly figure: string;
  readonly cause: string;
  readonly floor: number | undefined;
  readonly cornerHz: number | undefined;
}

/** Floor and corner from stated figures: a spectrum that knows how well they fix it. */
export interface BandFiguresFit extends Spectrum {
  /** 'floor' or 'flicker' where the figures show no corner; `cornerLimit` then says how far it can go. */
  readonly model: "floor" | "flicker" | "floorAndFlicker";
  readonly floor: number | undefined;
  /** Hz; 0 where no 1/f part is visible, undefined where no floor is. */
  readonly cornerHz: number | undefined;
  readonly exponent: number | undefined;
  /** k = 1: relative for floor and corner, absolute for the exponent. */
  readonly standardErrors: {
    readonly floor: number | undefined;
    readonly cornerHz: number | undefined;
    readonly exponent: number | undefined;
  };
  readonly cornerLimit?: CornerLimit;
  /** What the rounding of the figures alone leaves: lowest and highest value within their half units. */
  readonly rounding?: { readonly floor: readonly [number, number]; readonly cornerHz: readonly [number, number] };
  readonly chiSquarePerDegree: number;
  readonly degreesOfFreedom: number;
  readonly figures: readonly FigureResidual[];
  /** Causes of uncertainty, the one that costs the corner most first. */
  readonly costs: readonly FigureCost[];
  readonly findings: readonly FigureFinding[];
}

const figuresDefaults: BandFiguresOptions = Object.freeze({
  unit: undefined,
  exponent: undefined,
  densities: undefined,
  curve: undefined,
  beyond: "refuse",
});

/**
 * Floor and corner from stated band figures, where there is no curve: S(f) = floor² · (1 + (cornerHz/f)^exponent) with
 * ∫ S·|H|² df equal to each figure's square; by least squares on logarithms where there are more figures than unknowns.
 *
 * Each figure brings its measurement filter, its peak-to-peak factor with an uncertainty and its rounding, and the answer says
 * what each costs. Floor and 1/f power are never negative: figures that would need that give a limit of the corner (95 %,
 * one-sided), or are refused where they are beyond their own uncertainty.
 *
 * @param figures - bands with `rms`, or `peakToPeak` and `peakToPeakFactor`, in the unit of the answer.
 * @param options - exponent, unit, spot densities and curve points that join in, how it goes on beyond the figures.
 * @returns a spectrum with floor, corner, standard errors, residuals, costs, what rounding leaves, and findings.
 * @throws OutOfDomainError for fewer figures than unknowns, figures that state both or neither of rms and peakToPeak, and
 *   figures that no floor and 1/f part reproduce, with the inequality that fails.
 * @see JCGM 100:2008, 5.1 and 4.3.7 (half unit of rounding over √3).
 *
 * @example
 * ```ts
 * import { fitBandFigures } from "@quietband/core";
 * const fit = fitBandFigures(
 *   [
 *     { fromHz: 0.1, toHz: 10, rms: 1.17e-6, roundingHalfUnit: 0.005e-6 },
 *     { fromHz: 0.1, toHz: 100, rms: 2.06e-6, roundingHalfUnit: 0.005e-6 },
 *   ],
 *   { unit: "V", exponent: 1 },
 * );
 * fit.floor; // → 160.5e-9
 * fit.cornerHz; // → 9.39
 * fit.rounding?.cornerHz[0]; // → 9.1
 * fit.rounding?.cornerHz[1]; // → 9.7
 * ```
 */
export function fitBandFigures(figures: readonly BandFigure[], options: BandFiguresOptions = {}): BandFiguresFit {
  const given = completeOptions<BandFiguresOptions>("fitBandFigures", figuresDefaults, options);
  const unit = requireUnit(given);
  const exponent = resolveExponent(given.exponent);
  const readings = readingsOf(figures, given);
  requireEnough(readings.length, exponent.kind === "free");
  const solved = nonnegativeSolution(exponent, readings);
  requirePossible(solved, exponent, readings);
  const limit = solved.model.name === "floorAndFlicker" ? undefined : cornerLimit(solved, exponent, readings);
  const perDegree = solved.degrees > 0 ? solved.chiSquare / solved.degrees : 0;
  const widening = Math.max(1, perDegree);
  const covariance = (solved.covariance ?? []).map((row) => Object.freeze(row.map((value) => value * widening)));
  const spectrum = figuresSpectrum(unit, spanOf(readings), solved, covariance, given.beyond ?? "refuse");
  const costs = costsOf(solved, readings);
  const rounding = roundingOf(solved, exponent, readings);
  const findings = judgeFigures({ solved, exponent, readings, limit, rounding, costs });
  return Object.freeze({
    ...spectrum,
    ...figuresOf(solved, covariance),
    ...(limit !== undefined && { cornerLimit: limit }),
    ...(rounding !== undefined && { rounding }),
    chiSquarePerDegree: perDegree,
    degreesOfFreedom: solved.degrees,
    figures: Object.freeze(residualsOf(solved, readings)),
    costs: Object.freeze(costs),
    findings: Object.freeze(findings),
    notes: Object.freeze([...(spectrum.notes ?? []), ...findings.map(({ message }) => message)]),
  });
}

function requireUnit({ unit, curve }: BandFiguresOptions): string {
  const known = unit ?? curve?.unit ?? "";
  if (known !== "") return known;
  throw new OutOfDomainError("fitBandFigures needs the unit of the figures, for instance { unit: 'V' }; got nothing.");
}

function requireEnough(count: number, free: boolean): void {
  if (count >= (free ? 3 : 2)) return;
  throw new OutOfDomainError(
    free
      ? `Floor, corner and a free exponent need at least 3 figures; got ${count}; give the exponent, or a prior for it.`
      : `Floor and corner need at least 2 figures; got ${count}.`,
  );
}

function readingsOf(figures: readonly BandFigure[], { densities = [], curve }: BandFiguresOptions): FigureReading[] {
  return [
    ...figures.map(readingOfBand),
    ...densities.map((spot, index) => readingOfSpot(spot, `densities[${index}]`)),
    ...(curve?.points ?? [])
      .filter(({ inFit }) => inFit)
      .map(({ frequency, density, uncertainty }) =>
        readingOfSpot({ frequency, density, uncertainty, label: `point at ${frequency} Hz` }, "curve"),
      ),
  ];
}

function spanOf(readings: readonly FigureReading[]): readonly [number, number] {
  return [Math.min(...readings.map(({ span }) => span[0])), Math.max(...readings.map(({ span }) => span[1]))];
}

function figuresOf(
  { model, scale, parameters }: SolvedFigures,
  covariance: readonly (readonly number[])[],
): Pick<BandFiguresFit, "model" | "floor" | "cornerHz" | "exponent" | "standardErrors"> {
  const errorAt = (index: number): number | undefined => {
    const variance = index < 0 ? undefined : covariance[index]?.[index];
    return variance === undefined ? undefined : Math.sqrt(variance);
  };
  const scaleError = errorAt(0);
  const exponent = model.exponentAt >= 0 ? parameters[model.exponentAt] : fixedExponent(model);
  const floor = model.name !== "flicker";
  return {
    model: model.name as BandFiguresFit["model"],
    floor: floor ? Math.exp(0.5 * scale) : undefined,
    cornerHz: cornerOf(model.name, parameters),
    exponent: model.name === "floor" ? undefined : exponent,
    standardErrors: Object.freeze({
      floor: floor && scaleError !== undefined ? 0.5 * scaleError : undefined,
      cornerHz: model.name === "floorAndFlicker" ? errorAt(1) : undefined,
      exponent: model.exponentAt >= 0 ? errorAt(model.exponentAt + 1) : undefined,
    }),
  };
}

function fixedExponent({ exponent }: SolvedFigures["model"]): number | undefined {
  return exponent.kind === "fixed" ? exponent.value : undefined;
}

function cornerOf(name: string, parameters: Float64Array): number | undefined {
  if (name === "floor") return 0;
  return name === "flicker" ? undefined : Math.exp(parameters[0] as number);
}

function residualsOf({ residuals }: SolvedFigures, readings: readonly FigureReading[]): FigureResidual[] {
  return readings.map((reading, index) => {
    const off = residuals[index] as number;
    return Object.freeze({
      label: reading.label,
      stated: reading.value,
      fitted: reading.value * Math.exp(-off),
      residualDb: (20 / Math.LN10) * off,
      uncertainty: 1 / weightOf(reading),
    });
  });
}

function costsOf({ model, effects }: SolvedFigures, readings: readonly FigureReading[]): FigureCost[] {
  const costOf = (figure: string, cause: string, effect: readonly number[] | undefined, size: number): FigureCost =>
    Object.freeze({
      figure,
      cause,
      floor: model.name === "flicker" ? undefined : Math.abs(0.5 * (effect?.[0] ?? 0) * size),
      cornerHz: model.name === "floorAndFlicker" ? Math.abs((effect?.[1] ?? 0) * size) : undefined,
    });
  const costs = readings.flatMap(({ label, doubts }, index) =>
    doubts.map(({ cause, relative }) => costOf(label, cause, effects[index], relative)),
  );
  // the prior's row is already in units of its standard uncertainty
  const prior = effects[readings.length];
  if (prior !== undefined) costs.push(costOf("1/f part", "exponent", prior, 1));
  return costs.toSorted((one, other) => (other.cornerHz ?? other.floor ?? 0) - (one.cornerHz ?? one.floor ?? 0));
}

/** Solves once more at the corners of the box of half units that move floor and corner most. */
function roundingOf(
  solved: SolvedFigures,
  exponent: Parameters<typeof solveFigures>[1],
  readings: readonly FigureReading[],
): BandFiguresFit["rounding"] {
  if (solved.model.name !== "floorAndFlicker" || readings.every(({ rounding }) => rounding === 0)) return undefined;
  const extreme = (parameter: number, direction: number): number => {
    const logs = readings.map(({ value, rounding }, index) => {
      const way = Math.sign(solved.effects[index]?.[parameter] ?? 0) * direction;
      return Math.log(value) + Math.log1p(way * rounding);
    });
    const found = solveFigures("floorAndFlicker", exponent, readings, logs);
    return parameter === 0 ? Math.exp(0.5 * found.scale) : Math.exp(found.parameters[0] as number);
  };
  return Object.freeze({
    floor: Object.freeze([extreme(0, -1), extreme(0, 1)] as const),
    cornerHz: Object.freeze([extreme(1, -1), extreme(1, 1)] as const),
  });
}
