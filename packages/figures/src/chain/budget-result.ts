import type { BandNoise } from "@quietband/core";

/** One source's part in a total. */
export interface BudgetShare {
  /** 1 for the largest share. */
  readonly rank: number;
  readonly name: string;
  /** Its own RMS where the total is stated, in the budget's unit. */
  readonly rms: number;
  /**
   * Share of the total power, 1 for all of it. Of what two sources make together by correlation each gets half, so that
   * shares add up to 1; one may be negative where sources take away from each other.
   */
  readonly share: number;
  /** This share and all larger ones. */
  readonly cumulativeShare: number;
  /** RMS of the total if this source were half as large. */
  readonly totalIfHalved: number;
  /** Relative standard uncertainty of its rms (k = 1), where known. */
  readonly standardUncertainty?: number;
  /** Factor by which a noisy part is above it, where stated. */
  readonly partFactor?: number;
  /** Shares of its power from frequencies below and above its points, where it has points. */
  readonly outsidePoints?: BandNoise["outsidePoints"];
  /** What it rests on. */
  readonly notes: readonly string[];
}

/** A total's peak-to-peak value: noise by a factor, tones by their amplitudes. */
export interface BudgetPeakToPeak {
  readonly factor: number;
  /** Share of time that the random part spends outside its own value. */
  readonly shareOutside: number;
  /** factor · RMS of everything but tones. */
  readonly random: number;
  /** Sum of the tones' peak-to-peak values: their peaks meet at some time. */
  readonly tones: number;
  /** random + tones. */
  readonly total: number;
}

/** A budget: plain data, the same after a round trip through JSON. */
export interface NoiseBudget {
  readonly unit: string;
  /** Where the total is stated: 'input', 'output' or a stage, at whose input it is. */
  readonly referredTo: string;
  readonly fromHz: number;
  /** Hz; "Infinity" as a text, since JSON has no such number. */
  readonly toHz: number | "Infinity";
  readonly rms: number;
  readonly power: number;
  /** Bound on the relative error of rms made by the arithmetic alone. */
  readonly numericalError: number;
  /** Relative standard uncertainty of rms (k = 1) from the sources that state one; missing where none does. */
  readonly standardUncertainty?: number;
  /** Share of the power that comes from sources which state an uncertainty. */
  readonly uncertaintyCovers: number;
  /** 2 · standardUncertainty: about 95 % coverage where errors are near normal (JCGM 100, 6.2). */
  readonly expandedUncertainty?: { readonly relative: number; readonly coverageFactor: 2; readonly coverage: 0.95 };
  readonly peakToPeak: BudgetPeakToPeak;
  /** Spread from part to part: the total with every stated factor applied, or that none is included. */
  readonly partSpread: { readonly text: string; readonly rms?: number };
  /** Ranked by share; equal shares stay in the order given. */
  readonly shares: readonly BudgetShare[];
  /** Share of the power that correlation adds, or takes away where negative. */
  readonly correlationShare: number;
  /** The total in the measured quantity. */
  readonly measured?: { readonly unit: string; readonly rms: number; readonly peakToPeak: number };
  readonly target?: BudgetTargetAnswer;
  /** What the total assumes. */
  readonly notes: readonly string[];
}

/** Whether a target is met, and which bandwidth would meet it. */
export interface BudgetTargetAnswer {
  readonly rms: number;
  readonly met: boolean;
  /** The upper band edge at which the total is the target, the filters staying as they are. */
  readonly toHz?: number;
  /** The cutoff at which it is, where a family of filters was given. */
  readonly cutoffHz?: number;
  /** The answer in words. */
  readonly text: string;
}
