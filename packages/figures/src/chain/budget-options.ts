import type { Weighting } from "@quietband/core";
import type { NoiseSource } from "./noise-source.js";

/** One source of a budget, and its way into the path. */
export interface BudgetSource {
  readonly source: NoiseSource;
  /** For reports; the source's own name unless given. Names must differ. */
  readonly name?: string | undefined;
  /** Amplitude gain from the source to where it enters the path, 1 unless given; its sign matters where sources correlate. */
  readonly gain?: number | undefined;
  /** Unit behind that gain, where it changes it (V behind a resistance for a current); the source's unless given. */
  readonly unit?: string | undefined;
  /** What this source alone passes. */
  readonly weighting?: Weighting | undefined;
  /** Name of the stage at whose input it enters, or 'output'; the first stage unless given. */
  readonly enters?: string | undefined;
  /** Relative standard uncertainty of its rms (k = 1) beyond what its spectrum carries: of a gain, of a temperature. */
  readonly standardUncertainty?: number | undefined;
  /** Stated spread from part to part, as the factor a noisy part is above this one; 1 or more. Not included unless given. */
  readonly partFactor?: number | undefined;
}

/** One stage of the path from input to output. */
export interface BudgetStage {
  readonly name: string;
  /** Amplitude gain, 1 unless given. */
  readonly gain?: number | undefined;
  /** What it does over frequency. */
  readonly weighting?: Weighting | undefined;
}

/** A correlation between two sources. */
export interface BudgetCorrelation {
  readonly between: readonly [string, string];
  /** −1 to 1, at every frequency; of the sources as they are, before their gains. */
  readonly coefficient: number;
}

/** A total that should be met. */
export interface BudgetTarget {
  /** RMS in the budget's unit. */
  readonly rms: number;
  /** A family of filters in place of `weighting`: its cutoff is sought; otherwise the upper band edge. */
  readonly family?: ((cutoffHz: number) => Weighting) | undefined;
}

/** What `noiseBudget` takes. */
export interface NoiseBudgetOptions {
  readonly sources: readonly BudgetSource[];
  /** Stages from input to output; none unless given. */
  readonly path?: readonly BudgetStage[] | undefined;
  /** Lower band edge, Hz. */
  readonly fromHz: number;
  /** Upper band edge, Hz. */
  readonly toHz: number;
  /** What everything passes at the end. */
  readonly weighting?: Weighting | undefined;
  readonly correlations?: readonly BudgetCorrelation[] | undefined;
  /** Where the total is stated: 'input' (unless given), 'output', or the name of a stage, which means its input. */
  readonly referredTo?: string | undefined;
  /** The total in the measured quantity besides: units per unit at the place where it is stated. */
  readonly measured?: { readonly unit: string; readonly perUnit: number } | undefined;
  /** Peak-to-peak / RMS of the random part; 6.6 unless given. */
  readonly peakToPeakFactor?: number | undefined;
  readonly target?: BudgetTarget | undefined;
}
