import type { CurveComparison } from "../chain/compare-curves.js";
import type { ReportSection } from "./report.js";
import { percent } from "./report-of-noise.js";

/** Candidates through one path, quietest first. */
export function reportOfCandidates({ unit, rows, fromHz, toHz, notes }: CurveComparison): ReportSection {
  const [best] = rows;
  const tied = rows.filter(({ rank, tiedWithBest }) => rank > 1 && tiedWithBest).map(({ name }) => name);
  return {
    heading: "Candidates",
    entries:
      best === undefined
        ? []
        : [
            {
              name: "quietest",
              value: best.name,
              unit: "",
              basis: `${fromHz} Hz to ${toHz === "Infinity" ? "∞" : `${toHz} Hz`}; ${tied.length === 0 ? "no other within the uncertainty" : `not told apart from ${tied.join(", ")}`}`,
            },
          ],
    table: {
      columns: [
        { heading: "rank" },
        { heading: "candidate" },
        { heading: "RMS", unit },
        { heading: "± (k = 1)" },
        { heading: "over the quietest", digits: 4 },
        { heading: "beyond the points" },
      ],
      rows: rows.map(({ rank, name, rms, standardUncertainty, overBest, outsidePoints }) => [
        rank,
        name,
        rms,
        standardUncertainty === undefined ? "" : percent(standardUncertainty),
        overBest,
        percent(outsidePoints.below + outsidePoints.above),
      ]),
    },
    notes: [...notes, ...rows.flatMap(({ name, notes: own }) => own.map((note) => `${name}: ${note}`))],
  };
}
