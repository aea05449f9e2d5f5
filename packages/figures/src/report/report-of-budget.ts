import { writeQuantity } from "@quietband/core";
import type { NoiseBudget } from "../chain/budget-result.js";
import type { ReportEntry, ReportSection } from "./report.js";
import { percent } from "./report-of-noise.js";

/** The total, the ranked shares, and what to attack first. */
export function reportOfBudget(budget: NoiseBudget): ReportSection {
  const { unit, rms, standardUncertainty, peakToPeak, shares, measured, target, partSpread } = budget;
  const known =
    standardUncertainty === undefined
      ? "no uncertainty stated"
      : `± ${percent(standardUncertainty)} (k = 1) from ${percent(budget.uncertaintyCovers)} of the power`;
  const [first] = shares;
  const entries: ReportEntry[] = [
    { name: "RMS of all", value: rms, unit, basis: `referred to ${budget.referredTo}, ${known}` },
    {
      name: "peak-to-peak of all",
      value: peakToPeak.total,
      unit,
      basis: `${peakToPeak.factor} × RMS of the random part${peakToPeak.tones > 0 ? ", tones added in amplitude" : ""}`,
    },
    ...(measured === undefined
      ? []
      : [{ name: "in the measured quantity", value: measured.rms, unit: measured.unit, basis: "RMS of all" }]),
    {
      name: "part-to-part spread",
      value: partSpread.rms ?? partSpread.text,
      unit: partSpread.rms === undefined ? "" : unit,
      basis: partSpread.text,
    },
    ...(first === undefined
      ? []
      : [
          {
            name: "to attack first",
            value: first.name,
            unit: "",
            basis: `${percent(first.share, 3)} of the power; halved, the total would be ${writeQuantity(first.totalIfHalved, unit, { digits: 4 })}`,
          },
        ]),
    ...(target === undefined ? [] : [{ name: "target", value: target.rms, unit, basis: target.text }]),
  ];
  return {
    heading: "Budget",
    entries,
    table: {
      columns: [
        { heading: "source" },
        { heading: "RMS", unit },
        { heading: "share", unit: "%", digits: 3 },
        { heading: "so far", unit: "%", digits: 3 },
        { heading: "total if halved", unit },
      ],
      rows: shares.map(({ name, rms: own, share, cumulativeShare, totalIfHalved }) => [
        name,
        own,
        100 * share,
        100 * cumulativeShare,
        totalIfHalved,
      ]),
    },
    notes: budget.notes,
  };
}
