import type { FigureReading } from "./band-figure.js";
import type { CornerLimit } from "./figure-limits.js";
import type { ResolvedExponent } from "./fit-options.js";
import type { SolvedFigures } from "./solve-figures.js";

/** What a reader of an answer from stated figures must know. */
export interface FigureFinding {
  readonly code:
    | "uncertainty-assumed"
    | "exponent-assumed"
    | "no-corner-visible"
    | "no-floor-visible"
    | "rounding-leaves"
    | "largest-cost"
    | "factors-independent"
    | "figures-disagree";
  readonly message: string;
}

interface Judged {
  readonly solved: SolvedFigures;
  readonly exponent: ResolvedExponent;
  readonly readings: readonly FigureReading[];
  readonly limit: CornerLimit | undefined;
  readonly rounding: { readonly cornerHz: readonly [number, number] } | undefined;
  readonly costs: readonly { readonly figure: string; readonly cause: string; readonly cornerHz: number | undefined }[];
}

/** Puts into words what stated figures leave open, in the order a reader needs it. */
export function judgeFigures(given: Judged): FigureFinding[] {
  return [...visibility(given), ...assumptions(given), ...costs(given)];
}

function visibility({ solved, limit }: Judged): FigureFinding[] {
  if (solved.model.name === "floorAndFlicker") return [];
  const below = solved.model.name === "floor";
  const where = limit === undefined ? "and they do not limit it" : `${limit.side} ${short(limit.hz)} Hz at 95 %`;
  return [
    below
      ? { code: "no-corner-visible", message: `The figures show no corner: ${where}.` }
      : {
          code: "no-floor-visible",
          message: `The figures show no floor, the 1/f part alone gives them; the corner lies ${where}.`,
        },
  ];
}

function assumptions({ solved, exponent, readings }: Judged): FigureFinding[] {
  const findings: FigureFinding[] = [];
  const assumed = readings.filter(({ doubts }) => doubts.some(({ cause }) => cause === "assumed"));
  if (assumed.length > 0)
    findings.push({
      code: "uncertainty-assumed",
      message: `No uncertainty or rounding is stated for ${assumed.map(({ label }) => label).join(", ")}; 5 % (k = 1) is assumed.`,
    });
  if (exponent.kind === "prior" && solved.degrees === 0)
    findings.push({
      code: "exponent-assumed",
      message: `The figures do not show the exponent; ${exponent.mean} ± ${exponent.standardUncertainty} is assumed.`,
    });
  const factors = readings.filter(({ doubts }) => doubts.some(({ cause }) => cause === "peak-to-peak factor"));
  if (factors.length > 1)
    findings.push({
      code: "factors-independent",
      message: `The peak-to-peak factors of ${factors.map(({ label }) => label).join(" and ")} are taken as independent; where one convention stands behind them, the floor moves with it and the corner stays.`,
    });
  if (solved.degrees > 0 && solved.chiSquare / solved.degrees > 2)
    findings.push({
      code: "figures-disagree",
      message: `The figures lie ${short(Math.sqrt(solved.chiSquare / solved.degrees))} times as far from one floor and corner as their uncertainty says; standard errors are widened by that.`,
    });
  return findings;
}

function costs({ rounding, costs: all }: Judged): FigureFinding[] {
  const findings: FigureFinding[] = [];
  if (rounding !== undefined)
    findings.push({
      code: "rounding-leaves",
      message: `The rounding of the figures alone leaves a corner of ${short(rounding.cornerHz[0])} Hz to ${short(rounding.cornerHz[1])} Hz.`,
    });
  const [largest] = all;
  if (largest?.cornerHz !== undefined && largest.cornerHz > 0.1)
    findings.push({
      code: "largest-cost",
      message: `What costs the corner most is the ${largest.cause} of the ${largest.figure}: ${short(100 * largest.cornerHz)} % (k = 1).`,
    });
  return findings;
}

function short(value: number): string {
  return String(Number(value.toPrecision(3)));
}
