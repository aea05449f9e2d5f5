import type { PowerLawPiece } from "../numerics/power-law.js";

/**
 * Anything that has a one-sided power density at every frequency of its support: a fitted model, straight lines through
 * points, a sum. Powers add, so everything inside the library is power density (unit²/Hz); the amplitude density a
 * datasheet prints (unit/√Hz) is its square root.
 */
export interface Spectrum {
  /** Unit of the signal: "V" means a density in V/√Hz and a power density in V²/Hz. */
  readonly unit: string;
  /** Hz, where the power density is defined; outside it the library refuses. */
  readonly support: readonly [number, number];
  /** Hz, ascending, inside the support: where it bends, so that integrators place panel edges there. */
  readonly knots: readonly number[];
  /** S ~ f^−lowExponent towards the low end of the support (0 Hz): decides convergence before integrating. */
  readonly lowExponent: number;
  /** S ~ f^−highExponent towards the high end (∞ Hz). */
  readonly highExponent: number;
  /** Power density in unit²/Hz at a frequency inside the support. */
  powerDensityAt(hz: number): number;
  /** Where the spectrum IS a sum of power laws on intervals that tile its support: exact integrals and moments. */
  readonly pieces?: readonly PowerLawPiece[];
  /** Where it is a sum whose parts are not all power laws: each part integrates by its own route. */
  readonly parts?: readonly Spectrum[];
  /** Where it is a spectrum multiplied by a tone: integrals run in offsets from the tone, where nothing cancels. */
  readonly skirt?: ToneSkirtForm;
  /** Hz, where points support it; outside is assumption and its share of the power is reported. */
  readonly pointsSpan?: readonly [number, number];
  /** What its uncertainty rests on; independent groups add in power. */
  readonly sensitivities?: readonly Sensitivity[];
  /** Sentences a report must print: what was assumed beyond the points, what was left out. */
  readonly notes?: readonly string[];
}

/**
 * One group of correlated parameters and how the logarithm of the power density answers to each of them.
 * Band noise propagates uncertainty through this and needs to know nothing of fits or points.
 */
export interface Sensitivity {
  /** What the parameters are, for a report: "points", "fit", "axis", "exponent below the points". */
  readonly name: string;
  /** Number of parameters in the group. */
  readonly count: number;
  /** Their covariance: variances where they are independent (a traced curve has 1e5 points), else the matrix by rows. */
  readonly covariance: { readonly variances: readonly number[] } | { readonly matrix: readonly (readonly number[])[] };
  /** Hz, ascending: where the gradients bend. */
  readonly knots: readonly number[];
  /** Whether all gradients are unbroken straight lines in ln f between the knots: then they need to be known at these only. */
  readonly straight?: boolean;
  /** Calls `visit` with d ln S / d parameter at a frequency, for every parameter for which it is not zero. */
  gradientAt(hz: number, visit: (parameter: number, slope: number) => void): void;
}

/** S_out(f) = powerGain · (S(|f − toneHz|) + S(f + toneHz)), zero closer to the tone than leaveOutHz. */
export interface ToneSkirtForm {
  readonly base: Spectrum;
  readonly toneHz: number;
  readonly powerGain: number;
  readonly leaveOutHz: number;
}
