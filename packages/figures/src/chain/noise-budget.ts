import { OutOfDomainError } from "@quietband/core";
import { refuseUnknownKeys, requireFinite, requirePositive } from "../convert/domain.js";
import { peakToPeakDefaults } from "../convert/peak-to-peak.js";
import { shareOutside } from "../convert/share-outside.js";
import { type BudgetLine, budgetLines, weightingFinder } from "./budget-lines.js";
import { budgetNotes, partSpreadOf } from "./budget-notes.js";
import type { BudgetStage, NoiseBudgetOptions } from "./budget-options.js";
import type { BudgetPeakToPeak, NoiseBudget } from "./budget-result.js";
import { budgetUncertainty, rankedShares } from "./budget-shares.js";
import { answerTarget } from "./budget-target.js";
import { type BudgetTotals, budgetTotals } from "./budget-totals.js";
import { correlatedPairs } from "./correlation-matrix.js";
import { signalPath } from "./signal-path.js";

const optionNames: readonly string[] = Object.freeze([
  "sources",
  "path",
  "fromHz",
  "toHz",
  "weighting",
  "correlations",
  "referredTo",
  "measured",
  "peakToPeakFactor",
  "target",
]);

/**
 * What all sources of a channel make together, and which one to attack.
 *
 * P = Σ c_i²P_i + 2 Σ ρ_ij c_i c_j ∫√(S_iS_j)|H_i||H_j| df, with P_i the band noise of source i through its own filter and the
 * stages from where it enters on, and c_i its gain to the place where the total is stated. Phase differences between the
 * filters of two correlated sources are left out. Referred to the input means divided by the plain gains, not by filters.
 *
 * Tones add in power to the RMS and in amplitude to the peak-to-peak value. Uncertainty: u² = Σ (share_i · u_i)²;
 * sources that share one curve share its errors and add before squaring.
 *
 * @param options - see {@link NoiseBudgetOptions}. There is no default band.
 * @returns total, shares, what halving each source would give, the bandwidth that meets a target; plain data.
 * @throws OutOfDomainError for no sources, names that do not differ or do not exist, units that do not meet, correlations that
 *   contradict each other; the errors of `bandNoise`, with the source's name in front.
 *
 * @example
 * ```ts
 * import { butterworthLowPass, whiteFlicker } from "@quietband/core";
 * import { namedSpectrum, noiseBudget, thermalNoise } from "@quietband/figures";
 * const budget = noiseBudget({
 *   sources: [
 *     { source: thermalNoise({ ohms: 350, celsius: 25, name: "bridge" }) },
 *     { source: namedSpectrum(whiteFlicker({ floor: 7.2e-9, cornerHz: 0.02 }), "amplifier") },
 *   ],
 *   fromHz: 0.1,
 *   toHz: Infinity,
 *   weighting: butterworthLowPass({ order: 2, cutoffHz: 5 }),
 * });
 * budget.rms; // → 17.838e-9
 * budget.shares[0]?.name; // → amplifier
 * budget.shares[0]?.share; // → 0.9012
 * budget.shares[0]?.totalIfHalved; // → 10.155e-9
 * ```
 */
export function noiseBudget(options: NoiseBudgetOptions): NoiseBudget {
  refuseUnknownKeys("noiseBudget", optionNames, options);
  const {
    sources,
    fromHz,
    toHz,
    referredTo = "input",
    correlations = [],
    peakToPeakFactor,
    measured,
    target,
  } = options;
  if (!Array.isArray(sources) || sources.length === 0)
    throw new OutOfDomainError("A budget needs at least one source; got none.");
  const path = signalPath(options.path ?? [], options.weighting);
  const { lines, unit } = budgetLines(sources, { path, place: path.wayFrom(referredTo), fromHz, toHz });
  const names = lines.map(({ name }) => name);
  const pairs = correlatedPairs(correlations, names);
  const totals = budgetTotals(lines, pairs, [fromHz, toHz]);
  const rms = Math.sqrt(totals.power);
  const peakToPeak = peakToPeakOf(lines, totals, peakToPeakFactor ?? peakToPeakDefaults.factor);
  const uncertainty = budgetUncertainty(lines, totals);
  return Object.freeze({
    unit,
    referredTo,
    fromHz,
    toHz: toHz === Number.POSITIVE_INFINITY ? "Infinity" : toHz,
    rms,
    power: totals.power,
    numericalError: totals.power === 0 ? 0 : (0.5 * totals.error) / totals.power + Number.EPSILON,
    ...uncertainty,
    peakToPeak,
    partSpread: partSpreadOf(lines, totals, unit),
    shares: rankedShares(lines, totals),
    correlationShare: totals.power === 0 ? 0 : totals.crossPowers.reduce((sum, part) => sum + part, 0) / totals.power,
    ...(measured !== undefined && { measured: inMeasuredUnit(measured, rms, peakToPeak.total) }),
    ...(target !== undefined && {
      target: answerTarget(target, {
        lines: target.family === undefined ? lines : withoutLast(lines, options.path ?? []),
        pairs,
        rms,
        unit,
        fromHz,
        toHz,
      }),
    }),
    notes: Object.freeze(budgetNotes(lines, pairs, totals, { ...uncertainty, unit, referredTo, band: [fromHz, toHz] })),
  });
}

/** The lines as they are before the last weighting, for which a family of filters steps in. */
function withoutLast(lines: readonly BudgetLine[], stages: readonly BudgetStage[]): BudgetLine[] {
  const weightingOf = weightingFinder(signalPath(stages, undefined));
  return lines.map((line) => ({ ...line, weighting: weightingOf(line.given) }));
}

function peakToPeakOf(lines: readonly BudgetLine[], totals: BudgetTotals, factor: number): BudgetPeakToPeak {
  const random = requirePositive("peakToPeakFactor", factor) * Math.sqrt(totals.randomPower);
  const tones = lines.reduce((sum, { swing }) => sum + swing, 0);
  return Object.freeze({ factor, shareOutside: shareOutside(factor), random, tones, total: random + tones });
}

function inMeasuredUnit(
  { unit, perUnit }: NonNullable<NoiseBudgetOptions["measured"]>,
  rms: number,
  peakToPeak: number,
): NonNullable<NoiseBudget["measured"]> {
  const gain = Math.abs(requireFinite("perUnit", perUnit));
  if (gain === 0 || typeof unit !== "string" || unit === "")
    throw new OutOfDomainError("measured needs a unit and a perUnit other than zero: µε per V, °C per V.");
  return Object.freeze({ unit, rms: rms * gain, peakToPeak: peakToPeak * gain });
}
