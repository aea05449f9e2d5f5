import type { FittedCurve } from "@quietband/core";
import type { ReportEntry, ReportSection } from "./report.js";
import { percent } from "./report-of-noise.js";

/** Floor, corner and exponent with their standard errors, and what the fit found. */
export function reportOfFit(fit: FittedCurve): ReportSection {
  const { floor, cornerHz, exponent, standardErrors, coverage } = fit;
  const relative = (error: number | undefined): string =>
    error === undefined
      ? "fixed"
      : `± ${percent(error)} (k = 1); 95 % within a factor ${Math.exp(coverage.k * error).toPrecision(3)} (k = ${coverage.k.toFixed(2)})`;
  const entries: ReportEntry[] = [];
  if (floor !== undefined)
    entries.push({ name: "floor", value: floor, unit: `${fit.unit}/√Hz`, basis: relative(standardErrors.floor) });
  if (cornerHz !== undefined && cornerHz > 0)
    entries.push({ name: "corner", value: cornerHz, unit: "Hz", basis: relative(standardErrors.cornerHz) });
  if (exponent !== undefined)
    entries.push({
      name: "exponent",
      value: exponent,
      unit: "",
      basis: standardErrors.exponent === undefined ? "fixed" : `± ${standardErrors.exponent.toFixed(3)} (k = 1)`,
    });
  entries.push({
    name: "χ² a degree",
    value: fit.chiSquarePerDegree,
    unit: "",
    basis: `${fit.degreesOfFreedom} degrees of freedom; ${coverage.basis}`,
    digits: 3,
  });
  return { heading: "Model of the curve", entries, notes: fit.findings.map(({ message }) => message) };
}
