import type { Curve, CurvePoint } from "./curve.js";
import { asideMark } from "./read-curve.js";

/**
 * A curve as the text that `readCurve` reads back to the same curve, to the last bit.
 *
 * Errors that points share but feel differently (a plot's calibration) have no place in a table: they are written as one axis
 * uncertainty, their root mean square over the points.
 *
 * @param curve - any curve.
 * @returns provenance as comments, a heading, a row a point.
 *
 * @example
 * ```ts
 * import { readCurve, writeCurve } from "@quietband/core";
 * const curve = readCurve("1 kHz, 85 nV/√Hz\n10 kHz, 80 nV/√Hz");
 * readCurve(writeCurve(curve)).points[0]?.density; // → 8.5e-8
 * ```
 */
export function writeCurve(curve: Curve): string {
  const counted = new Set(["label", "uncertainty", "axis uncertainty"]);
  const remarks = curve.source
    .filter(({ key }) => !counted.has(key.toLowerCase()))
    .map(({ key, value }) => (key === "" ? `# ${value}` : `# ${key}: ${value}`));
  const common = Math.hypot(curve.commonUncertainty, sharedError(curve));
  const given = curve.uncertaintyIs === "given";
  const rows = curve.points.map(({ frequency, density, uncertainty, inFit }: CurvePoint) =>
    [frequency, density, ...(given ? [uncertainty] : []), ...(inFit ? [] : [asideMark])].join(", "),
  );
  return [
    ...(curve.label === "" ? [] : [`# label: ${curve.label}`]),
    ...remarks,
    ...(common > 0 ? [`# axis uncertainty: ${common} 1`] : []),
    `frequency [Hz], density [${curve.unit}/√Hz]${given ? ", uncertainty [1]" : ""}`,
    ...rows,
    "",
  ].join("\n");
}

function sharedError({ commonEffects = [], points }: Curve): number {
  let square = 0;
  for (const { effects } of commonEffects) for (const effect of effects) square += effect * effect;
  return Math.sqrt(square / points.length);
}
