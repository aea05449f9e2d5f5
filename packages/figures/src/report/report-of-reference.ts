import type { ReferenceUseRow } from "../chain/reference-noise-by-use.js";
import type { ReferencePathNoise } from "../chain/reference-path-noise.js";
import type { ReportSection } from "./report.js";
import { percent } from "./report-of-noise.js";

/** What the reference brings in at one input, and at other uses of the range where they are given. */
export interface ReportedReference {
  readonly path: ReferencePathNoise;
  readonly byUse?: readonly ReferenceUseRow[] | undefined;
}

export function reportOfReference({ path, byUse }: ReportedReference): ReportSection {
  const { unit, rms, basis, byRule, inputRms, referenceRms, standardUncertainty } = path;
  const known = standardUncertainty === undefined ? "" : `, ± ${percent(standardUncertainty)} (k = 1)`;
  return {
    heading: "Noise through the reference",
    entries: [
      {
        name: "RMS at this input",
        value: rms,
        unit,
        basis: `${basis === "exact" ? "exact, by the skirts of the input's lines" : "by the rule"}${known}`,
      },
      {
        name: "by the rule",
        value: byRule,
        unit,
        basis: "RMS of the input over the reference voltage, times the reference's RMS",
      },
      { name: "RMS of the input", value: inputRms, unit, basis: "dc part included" },
      { name: "RMS of the reference", value: referenceRms, unit, basis: "in the same band" },
    ],
    ...(byUse !== undefined && {
      table: {
        columns: [
          {
            heading: "use of the range",
            unit: "%",
            digits: 3,
            basis: "input over reference voltage, of a sine its peak",
          },
          { heading: "through the reference", unit, digits: 4 },
          { heading: "with all other noise", unit, digits: 4 },
          { heading: "SNR", unit: "dB", digits: 4, basis: "input over all noise" },
        ],
        rows: byUse.map(({ share, rms: own, totalRms, snrDb }) => [100 * share, own, totalRms, snrDb ?? ""]),
      },
    }),
    notes: path.notes,
  };
}
