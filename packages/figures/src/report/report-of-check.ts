import type { BasisVerdict } from "../judge/basis-verdict.js";
import type { StatedFigureCheck } from "../judge/check-stated-figure.js";
import type { ReportEntry, ReportSection } from "./report.js";
import { percent } from "./report-of-noise.js";

const names: Readonly<Record<BasisVerdict["basis"], string>> = Object.freeze({
  convention: "by convention",
  record: "as a record",
  rms: "RMS of the band",
  density: "from the curve",
});

/** A stated figure beside its own curve. */
export function reportOfCheck(check: StatedFigureCheck): ReportSection {
  const { figure, stated, unit, bases } = check;
  const entries: ReportEntry[] = [
    {
      name: "stated",
      value: stated,
      unit,
      basis: `last digit ± ${percent(figure.halfUnit / figure.value)}`,
    },
    ...bases.map((judged) => ({
      name: names[judged.basis],
      value: judged.predicted,
      unit,
      basis: `${judged.verdict}; difference ${judged.differenceDb.toFixed(2)} dB, ${judged.differenceOverExpanded.toFixed(2)} of the expanded uncertainty of ${percent(judged.expanded.relative)} (95 %, k = ${judged.expanded.k.toFixed(2)})`,
    })),
    { name: "verdict", value: check.verdict, unit: "", basis: check.summary },
  ];
  return { heading: `Stated figure: ${figure.text}`, entries, notes: check.notes };
}
