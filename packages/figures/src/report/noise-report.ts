import { type FittedCurve, OutOfDomainError } from "@quietband/core";
import type { NoiseBudget } from "../chain/budget-result.js";
import type { CurveComparison } from "../chain/compare-curves.js";
import { refuseUnknownKeys } from "../convert/domain.js";
import type { StatedFigureCheck } from "../judge/check-stated-figure.js";
import { type NoiseReport, type ReportPlot, type ReportSection, standingCautions } from "./report.js";
import { reportOfBudget } from "./report-of-budget.js";
import { reportOfCandidates } from "./report-of-candidates.js";
import { reportOfCheck } from "./report-of-check.js";
import { reportOfFit } from "./report-of-fit.js";
import { type ReportedNoise, reportOfNoise } from "./report-of-noise.js";
import { type ReportedReference, reportOfReference } from "./report-of-reference.js";

/** What {@link noiseReport} is made of; everything but the title may be left out. */
export interface NoiseReportOptions {
  readonly title: string;
  readonly noise?: ReportedNoise | undefined;
  readonly fit?: FittedCurve | undefined;
  readonly reference?: ReportedReference | undefined;
  readonly budget?: NoiseBudget | undefined;
  readonly candidates?: CurveComparison | undefined;
  readonly checks?: readonly StatedFigureCheck[] | undefined;
  /** Sections of one's own, behind the others. */
  readonly sections?: readonly ReportSection[] | undefined;
  readonly plots?: readonly ReportPlot[] | undefined;
  /** Besides the standing ones. */
  readonly cautions?: readonly string[] | undefined;
}

const keys: readonly (keyof NoiseReportOptions)[] = [
  ...(["title", "noise", "fit", "reference", "budget"] as const),
  ...(["candidates", "checks", "sections", "plots", "cautions"] as const),
];

/**
 * One structure for a review: every number with its unit, what it rests on and what was assumed for it. `reportText`,
 * `reportMarkdown` and `reportCsv` write it; JSON.stringify keeps it whole.
 *
 * @param options - title and parts: noise of a band, fit, reference path, budget, candidates, checks of stated figures, plots.
 * @returns plain data; it ends with the cautions that every report carries.
 * @throws OutOfDomainError for an empty title, no part at all, or an unknown key.
 *
 * @example
 * ```ts
 * import { bandNoise, whiteFlicker } from "@quietband/core";
 * import { noiseReport, reportText } from "@quietband/figures";
 * const noise = bandNoise(whiteFlicker({ floor: 70e-9, cornerHz: 55 }), { fromHz: 0.1, toHz: 10 });
 * const report = noiseReport({ title: "Reference (invented)", noise: { noise, basis: "model" } });
 * report.sections[0].entries[0].value; // → 1.13561e-6
 * reportText(report).split("\n")[2]; // → Noise
 * ```
 */
export function noiseReport(options: NoiseReportOptions): NoiseReport {
  refuseUnknownKeys("noiseReport", keys, options);
  const { title, noise, fit, reference, budget, candidates, checks = [], sections = [], plots = [] } = options;
  if (typeof title !== "string" || title.trim() === "")
    throw new OutOfDomainError("A report needs a title; got an empty one.");
  const parts = [
    noise && reportOfNoise(noise),
    fit && reportOfFit(fit),
    reference && reportOfReference(reference),
    budget && reportOfBudget(budget),
    candidates && reportOfCandidates(candidates),
    ...checks.map(reportOfCheck),
    ...sections,
  ].filter((part) => part !== undefined);
  if (parts.length === 0)
    throw new OutOfDomainError(
      "A report needs at least one part: noise, fit, reference, budget, candidates, checks or sections; got none.",
    );
  return Object.freeze({
    title,
    sections: Object.freeze(parts),
    plots: Object.freeze(plots),
    cautions: Object.freeze([...(options.cautions ?? []), ...standingCautions]),
  });
}
