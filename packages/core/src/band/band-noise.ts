import { requireBand } from "../ground/domain.js";
import { NoConvergenceError } from "../ground/errors.js";
import { refuseUnknownKeys } from "../ground/options.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";
import { bandPower } from "./band-power.js";
import { requireConvergent } from "./convergence.js";
import { type RoutedPower, relativeErrorOfRms } from "./routed-power.js";
import { type UncertaintyPart, uncertaintyParts } from "./uncertainty.js";

/** What {@link bandNoise} takes. */
export interface BandNoiseOptions {
  /** Lower band edge, Hz; 0 where the integral converges. There is no default: where 1/f noise begins is a decision. */
  readonly fromHz: number;
  /** Upper band edge, Hz; Infinity where the integral converges. */
  readonly toHz: number;
  /** What the noise passes on its way; a brick wall from fromHz to toHz unless given. */
  readonly weighting?: Weighting | undefined;
  /** Aim for the relative error of the power on adaptive routes; 1e-12 unless given. */
  readonly relativeTolerance?: number | undefined;
}

/** Noise in a band, with what its digits rest on. */
export interface BandNoise {
  /** RMS over the band, in `unit`. */
  readonly rms: number;
  /** Its square, unit². */
  readonly power: number;
  readonly unit: string;
  readonly fromHz: number;
  readonly toHz: number;
  /** Bound on the relative error of rms made by the arithmetic alone. */
  readonly numericalError: number;
  /** Relative standard uncertainty of rms (k = 1) from points, fit and assumptions, where the spectrum carries them. */
  readonly standardUncertainty?: number;
  /** What the standard uncertainty is made of; the parts are independent. */
  readonly uncertaintyParts?: readonly UncertaintyPart[];
  /** Shares of the power from frequencies below and above the points. */
  readonly outsidePoints: { readonly below: number; readonly above: number };
  readonly status: "exact" | "converged" | "limit";
  /** Evaluations of the integrand; 0 on exact routes. */
  readonly evaluations: number;
  /** What the spectrum assumes where this band reaches beyond its points. */
  readonly notes: readonly string[];
}

const optionNames: readonly string[] = Object.freeze(["fromHz", "toHz", "weighting", "relativeTolerance"]);

function isOption(key: string): boolean {
  return key === "fromHz" || key === "toHz" || key === "weighting" || key === "relativeTolerance";
}

/** Relative tolerance on the power unless given; `numericalError` tells what was reached. */
export const bandNoiseTolerance = 1e-12;

const nothingOutside: BandNoise["outsidePoints"] = Object.freeze({ below: 0, above: 0 });
const noNotes: readonly string[] = Object.freeze([]);

/**
 * Noise of a spectrum in a band: rms = √(∫ S(f)·|H(f)|² df), f from fromHz to toHz.
 *
 * Spectra made of power laws (models, polylines, sums) integrate exactly through brick walls and gain tables, in closed
 * form through filters where that is well conditioned; everything else adaptively in ln f with a true error bound.
 *
 * @param spectrum - one-sided power density, unit²/Hz.
 * @param options - band edges in Hz, and the weighting; 0 and Infinity are allowed where the integral converges.
 * @returns rms, power, the bound on the arithmetic's error, standard uncertainty where the spectrum carries one, and the
 *   share of the power that rests on assumption beyond the points.
 * @throws OutOfDomainError for crossed edges or a band outside the support; DivergentIntegralError naming the edge to
 *   move; NoConvergenceError with the best estimate.
 *
 * @example
 * ```ts
 * import { bandNoise, butterworthLowPass, whiteFlicker } from "@quietband/core";
 * const reference = whiteFlicker({ floor: 70e-9, cornerHz: 60 });
 * const weighting = butterworthLowPass({ order: 2, cutoffHz: 5 });
 * bandNoise(reference, { fromHz: 0.1, toHz: Infinity, weighting }).rms; // → 1.08483e-6
 * ```
 */
export function bandNoise(spectrum: Spectrum, options: BandNoiseOptions): BandNoise {
  // A sweep calls this a million times: keys are looked at without making a list of them.
  for (const key in options) if (!isOption(key)) refuseUnknownKeys("bandNoise", optionNames, options);
  const { fromHz, toHz, weighting, relativeTolerance } = options;
  requireBand(fromHz, toHz);
  requireConvergent(spectrum, weighting, fromHz, toHz);
  const tolerance = relativeTolerance ?? bandNoiseTolerance;
  const band = [fromHz, toHz] as const;
  const found = requireReached(bandPower(spectrum, weighting, band, tolerance), spectrum.unit);
  const parts = uncertaintyParts(spectrum, weighting, band, found.power);
  const outsidePoints = shareOutsidePoints(spectrum, weighting, band, found.power);
  const power = found.power;
  const numericalError = relativeErrorOfRms(found);
  const notes = notesFor(spectrum, outsidePoints);
  const { unit } = spectrum;
  const { status, evaluations } = found;
  const rms = Math.sqrt(power);
  // Two records written out: spreading one into another costs more than an exact integral.
  if (parts.length === 0)
    return Object.freeze({ rms, power, unit, fromHz, toHz, numericalError, outsidePoints, status, evaluations, notes });
  let variance = 0;
  for (const { relative } of parts) variance += relative * relative;
  return Object.freeze({
    rms,
    power,
    unit,
    fromHz,
    toHz,
    numericalError,
    standardUncertainty: Math.sqrt(variance),
    uncertaintyParts: parts,
    outsidePoints,
    status,
    evaluations,
    notes,
  });
}

/** What the spectrum assumes on a side counts only where the band reaches there. */
function notesFor({ notes = noNotes }: Spectrum, { below, above }: BandNoise["outsidePoints"]): readonly string[] {
  if (notes.length === 0) return noNotes;
  return Object.freeze(
    notes.filter((note) => (note.startsWith("Below ") ? below > 0 : note.startsWith("Above ") ? above > 0 : true)),
  );
}

/** Turns an integral that stopped at its limit into an error that carries the best estimate. */
export function requireReached(found: RoutedPower, unit: string): RoutedPower {
  if (found.status !== "limit" && Number.isFinite(found.power)) return found;
  throw new NoConvergenceError(
    `The band integral stopped at a relative error of ${(found.error / found.power).toPrecision(2)} of the power; the best estimate of the rms is ${Math.sqrt(found.power)} ${unit}; name the frequencies where the spectrum bends as knots, or ask for a wider relativeTolerance.`,
    { bestEstimate: Math.sqrt(found.power), estimatedError: relativeErrorOfRms(found) },
  );
}

function shareOutsidePoints(
  spectrum: Spectrum,
  weighting: Weighting | undefined,
  [fromHz, toHz]: readonly [number, number],
  power: number,
): BandNoise["outsidePoints"] {
  if (spectrum.pointsSpan === undefined || power === 0) return nothingOutside;
  const [first, last] = spectrum.pointsSpan;
  if (fromHz >= first && toHz <= last) return nothingOutside;
  const share = (low: number, high: number): number =>
    high > low ? Math.min(bandPower(spectrum, weighting, [low, high], 1e-9).power / power, 1) : 0;
  return Object.freeze({ below: share(fromHz, Math.min(first, toHz)), above: share(Math.max(last, fromHz), toHz) });
}
