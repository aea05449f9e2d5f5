import { writeQuantity } from "@quietband/core";
import type { BudgetShare, NoiseBudget } from "../chain/budget-result.js";
import type { ReportEntry, ReportSection, ReportTable } from "./report.js";
import { percent } from "./report-of-noise.js";

/** The total, what to attack first, which bandwidth meets the target, and the ranked shares. */
export function reportOfBudget(budget: NoiseBudget): ReportSection {
  return {
    heading: "Budget",
    entries: [...totalEntries(budget), ...attackEntries(budget), ...targetEntries(budget)],
    table: sharesTable(budget),
    notes: budget.notes,
  };
}

function totalEntries(budget: NoiseBudget): readonly ReportEntry[] {
  const { unit, rms, standardUncertainty, peakToPeak, measured, partSpread, correlationShare, referredTo } = budget;
  const { factor, random, tones } = peakToPeak;
  const known =
    standardUncertainty === undefined
      ? "no uncertainty stated"
      : `± ${percent(standardUncertainty)} (k = 1) from ${percent(budget.uncertaintyCovers)} of the power`;
  const entries: ReportEntry[] = [
    { name: "RMS of all", value: rms, unit, basis: `referred to ${referredTo}, ${known}` },
    {
      name: "peak-to-peak of all",
      value: peakToPeak.total,
      unit,
      basis:
        tones > 0
          ? `${factor} × RMS of the random part, ${short(random, unit)}, and the tones in amplitude, ${short(tones, unit)}`
          : `${factor} × RMS of the random part`,
    },
  ];
  if (measured !== undefined)
    entries.push(
      { name: "RMS, measured", value: measured.rms, unit: measured.unit, basis: "RMS of all through its gain" },
      {
        name: "peak-to-peak, measured",
        value: measured.peakToPeak,
        unit: measured.unit,
        basis: "peak-to-peak of all through its gain",
      },
    );
  if (correlationShare !== 0)
    entries.push({
      name: correlationShare > 0 ? "added by correlation" : "taken away by correlation",
      value: 100 * Math.abs(correlationShare),
      unit: "%",
      basis: "of the power, by the stated coefficients",
      digits: 3,
    });
  const spread = partSpread.rms;
  entries.push(
    spread === undefined
      ? { name: "part-to-part spread", value: partSpread.text, unit: "", basis: "no source states a factor" }
      : { name: "RMS with noisy parts", value: spread, unit, basis: partSpread.text },
  );
  return entries;
}

/** Halving a source that lowers the total by less than this is hardly worth the money. */
const hardlyWorth = 0.01;

/** More names than this are a count. */
const mostNames = 5;

function attackEntries({ shares, rms, unit }: NoiseBudget): readonly ReportEntry[] {
  const [first] = shares;
  if (first === undefined || rms === 0) return [];
  const idle = shares.filter(({ totalIfHalved }) => totalIfHalved > (1 - hardlyWorth) * rms);
  const named = idle.length > mostNames ? `${idle.length} sources` : idle.map(({ name }) => name).join(", ");
  return [
    {
      name: "to attack first",
      value: first.name,
      unit: "",
      basis: `${percent(first.share, 3)} of the power; halved, the total would be ${short(first.totalIfHalved, unit)}`,
    },
    ...(idle.length === 0
      ? []
      : [
          {
            name: "hardly worth attacking",
            value: named,
            unit: "",
            basis: `halving one of them lowers the total by less than ${percent(hardlyWorth)}`,
          },
        ]),
  ];
}

function targetEntries({ target, unit }: NoiseBudget): readonly ReportEntry[] {
  if (target === undefined) return [];
  const { toHz, cutoffHz, text } = target;
  const edge = toHz ?? cutoffHz;
  return [
    { name: "target", value: target.rms, unit, basis: text },
    ...(edge === undefined
      ? []
      : [
          {
            name: "bandwidth that meets it",
            value: edge,
            unit: "Hz",
            basis: toHz === undefined ? "cutoff of the last filter" : "upper band edge, the filters as they are",
          },
        ]),
  ];
}

function sharesTable({ shares, unit, referredTo }: NoiseBudget): ReportTable {
  return {
    columns: [
      { heading: "source" },
      { heading: "RMS", unit, digits: 4, basis: `of the source alone, referred to ${referredTo}` },
      { heading: "± (k = 1)", unit: "%", digits: 2 },
      {
        heading: "share",
        unit: "%",
        digits: 3,
        basis: "of the power; of what two make by correlation each gets half",
      },
      { heading: "so far", unit: "%", digits: 3 },
      { heading: "total if halved", unit, digits: 4 },
    ],
    rows: shares.map(({ name, rms, share, cumulativeShare, standardUncertainty, totalIfHalved }) => [
      name,
      rms,
      standardUncertainty === undefined ? "" : 100 * standardUncertainty,
      100 * share,
      100 * cumulativeShare,
      totalIfHalved,
    ]),
    assumptions: shares.map(assumedFor),
  };
}

/** What a source rests on, in one line. */
function assumedFor({ notes, outsidePoints }: BudgetShare): string {
  const outside = (outsidePoints?.below ?? 0) + (outsidePoints?.above ?? 0);
  const beyond = outside > 1e-6 ? [`${percent(outside)} of its power lies beyond its points.`] : [];
  return [...notes, ...beyond].join(" ");
}

function short(value: number, unit: string): string {
  return writeQuantity(value, unit, { digits: 4 });
}
