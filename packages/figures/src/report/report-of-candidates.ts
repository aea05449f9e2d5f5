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
        { heading: "RMS", unit, digits: 4, basis: "through the path" },
        { heading: "± (k = 1)", unit: "%", digits: 2 },
        { heading: "over the quietest", digits: 4 },
        { heading: "beyond the points", align: "right", basis: "share of the power" },
      ],
      rows: rows.map(({ rank, name, rms, standardUncertainty, overBest, outsidePoints }) => [
        rank,
        name,
        rms,
        standardUncertainty === undefined ? "" : 100 * standardUncertainty,
        overBest,
        beyond(outsidePoints.below + outsidePoints.above),
      ]),
      assumptions: rows.map(({ notes: own }) => own.join(" ")),
    },
    notes,
  };
}

/** What a filter leaves of the frequencies beyond the points is not worth a number. */
function beyond(share: number): string {
  return share < 1e-6 ? "none" : percent(share);
}
