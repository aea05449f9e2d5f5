import type { Curve } from "../curve/curve.js";
import type { FitAlternative, Tried } from "./choose.js";
import type { FitPoints } from "./fit-points.js";
import type { Misreading } from "./misreadings.js";

/** What a reader of a fit must know. */
export interface FitFinding {
  readonly code:
    | "uncertainty-assumed"
    | "points-left-out"
    | "not-supported"
    | "stepped-down"
    | "misreading"
    | "rises-at-the-top"
    | "falls-at-the-top"
    | "bends-at-the-top"
    | "departs-at-the-bottom"
    | "scatter-above-stated";
  readonly message: string;
}

interface Judged {
  readonly curve: Curve;
  readonly points: FitPoints;
  readonly chosen: Tried;
  readonly alternatives: readonly FitAlternative[];
  readonly residuals: readonly number[];
  readonly misreadings: readonly Misreading[];
  readonly downweighted: boolean;
}

/** Standard deviations by which points at an end must lie off the model, two at least or one by twice as much. */
const farOff = 2.5;

/** Puts into words what a fit shows, in the order a reader needs it. */
export function judgeFit(given: Judged): FitFinding[] {
  return [
    ...assumptions(given),
    ...support(given),
    ...given.misreadings.map((misreading) => misreadingNote(misreading, given.downweighted)),
    ...departures(given),
  ];
}

function assumptions({ curve, points, chosen }: Judged): FitFinding[] {
  const findings: FitFinding[] = [];
  if (curve.uncertaintyIs === "assumed")
    findings.push({
      code: "uncertainty-assumed",
      message: "The points state no uncertainty; 5 % a point (k = 1) is assumed.",
    });
  if (points.leftOut.length > 0) {
    const list = points.leftOut.map(({ frequency, why }) => `${short(frequency)} Hz (${why})`).join(", ");
    findings.push({ code: "points-left-out", message: `Left out of the fit: ${list}.` });
  }
  const { chiSquare, degrees } = chosen.fit;
  if (degrees > 0 && chiSquare / degrees > 2)
    findings.push({
      code: "scatter-above-stated",
      message: `The points scatter ${short(Math.sqrt(chiSquare / degrees))} times as much as their uncertainty says; standard errors are widened by that.`,
    });
  return findings;
}

function support({ chosen, alternatives }: Judged): FitFinding[] {
  if (chosen.unsupported !== undefined)
    return [{ code: "not-supported", message: `The points do not support the model: ${chosen.unsupported}.` }];
  const corner = alternatives.find(({ model }) => model === "floorAndFlicker");
  if (corner === undefined || corner.verdict === "chosen" || chosen.fit.model.parameters.length > 2) return [];
  const why = corner.reason ?? `its criterion differs by ${short(corner.criterionDifference)} only`;
  return [{ code: "stepped-down", message: `The points do not support a corner (${why}); the simpler model stands.` }];
}

function misreadingNote({ frequency, density, expectedDensity, line }: Misreading, downweighted: boolean): FitFinding {
  const where = line === undefined ? "" : ` (line ${line})`;
  const factor = short(Math.max(density / expectedDensity, expectedDensity / density));
  return {
    code: "misreading",
    message: `The point at ${short(frequency)} Hz${where} is a factor ${factor} ${density > expectedDensity ? "above" : "below"} what the others give; ${downweighted ? "it has no weight in the fit" : "read it again"}.`,
  };
}

/** Points at the ends that lie on one side of the model: structure that the model does not have. */
function departures({ points, residuals, misreadings }: Judged): FitFinding[] {
  const off = Array.from(residuals, (value, i) => value * (points.weight[i] as number));
  const known = new Set(misreadings.map(({ frequency }) => frequency));
  const usable = off.map((value, i) => (known.has(points.points[i]?.frequency ?? 0) ? 0 : value));
  const findings: FitFinding[] = bend(points, known);
  const top = runLength(usable.toReversed());
  if (top.length > 0) {
    const from = points.points[points.points.length - top.length]?.frequency ?? 0;
    const before = points.points[points.points.length - top.length - 1]?.frequency ?? from;
    const above = top.sign > 0;
    findings.push({
      code: above ? "rises-at-the-top" : "falls-at-the-top",
      message: `The points from ${short(from)} Hz up lie ${above ? "above" : "below"} the model: this curve ${above ? "rises" : "rolls off"} there; fit up to ${short(before)} Hz?`,
    });
  }
  const bottom = runLength(usable);
  if (bottom.length > 0 && bottom.length < usable.length) {
    const upTo = points.points[bottom.length - 1]?.frequency ?? 0;
    findings.push({
      code: "departs-at-the-bottom",
      message: `The points up to ${short(upTo)} Hz lie ${bottom.sign > 0 ? "above" : "below"} the model; another law may begin there.`,
    });
  }
  return findings;
}

/** Two suspects side by side at the top are a curve that bends there rather than two slips of the pen. */
function bend({ points }: FitPoints, suspected: ReadonlySet<number>): FitFinding[] {
  let first = points.length;
  while (first > 0 && suspected.has(points[first - 1]?.frequency ?? 0)) first -= 1;
  if (points.length - first < 2 || first === 0) return [];
  return [
    {
      code: "bends-at-the-top",
      message: `The suspected points are the last ones, from ${short(points[first]?.frequency ?? 0)} Hz up: the curve may bend there (a loop that peaks and rolls off); fit up to ${short(points[first - 1]?.frequency ?? 0)} Hz?`,
    },
  ];
}

function runLength(off: readonly number[]): { readonly length: number; readonly sign: number } {
  const sign = Math.sign(off[0] ?? 0);
  let length = 0;
  while (length < off.length && sign * (off[length] as number) > farOff) length += 1;
  const single = length === 1 && Math.abs(off[0] ?? 0) > 2 * farOff;
  return length >= 2 || single ? { length, sign } : { length: 0, sign };
}

function short(value: number): string {
  return String(Number(value.toPrecision(3)));
}
