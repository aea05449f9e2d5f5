import { type BandNoise, type BandNoiseOptions, bandNoise } from "../band/band-noise.js";
import { groupResponses } from "../band/uncertainty.js";
import type { Curve } from "../curve/curve.js";
import type { Beyond } from "../spectrum/beyond.js";
import { polyline } from "../spectrum/polyline.js";
import type { Spectrum } from "../spectrum/spectrum.js";

/** A band's noise by the model and by the points themselves. */
export interface FitAgainstPoints {
  readonly fit: BandNoise;
  readonly points: BandNoise;
  /** RMS by the model over that by the points, less 1. */
  readonly relativeDifference: number;
  /** Points that carry more than 30 % of the band's power, the heaviest first. */
  readonly heavyPoints: readonly HeavyPoint[];
  /** "points" where such a point lies off the model: the model then misses what carries the power. */
  readonly better: "fit" | "points";
  readonly notes: readonly string[];
}

/** A point and the share of the band's power that hangs on it. */
export interface HeavyPoint {
  readonly frequency: number;
  readonly share: number;
  /** Point over model, in the point's own standard uncertainties. */
  readonly deviations: number;
}

/** What {@link fitAgainstPoints} takes: the band, as in `bandNoise`, and how the lines through the points go on beyond them. */
export interface FitAgainstPointsOptions extends BandNoiseOptions {
  readonly beyond?: Beyond | undefined;
}

/** Share of a band's power from which a point is named, and standard uncertainties from which it is off the model. */
const heavyShare = 0.3;
const farOff = 2;

/**
 * The noise of a band both ways, by a model and by straight lines through the points, and the points on which the answer
 * hangs. share_i = d ln rms/d ln e_i through the lines: the power under the point's own hat over all of it; shares add up to 1.
 *
 * @param curve - the points.
 * @param fit - the model, for instance from `fitCurve`.
 * @param options - band edges, weighting, and `beyond` for the lines where the band reaches beyond the points.
 * @returns both band noises, their difference, points that carry more than 30 % of the power, and which to take.
 * @throws as `bandNoise` and `polyline`.
 *
 * @example
 * ```ts
 * import { curveFromPoints, fitAgainstPoints, fitCurve } from "@quietband/core";
 * const points = [1, 3, 10, 30, 100, 300, 1000, 3000].map((frequency) => ({
 *   frequency,
 *   density: 8e-9 * Math.sqrt(1 + 40 / frequency),
 * }));
 * const curve = curveFromPoints(points, { unit: "V" });
 * const both = fitAgainstPoints(curve, fitCurve(curve), { fromHz: 1, toHz: 30 });
 * both.relativeDifference; // → -0.0068
 * both.heavyPoints.map(({ frequency }) => frequency); // → [10,3]
 * ```
 */
export function fitAgainstPoints(
  curve: Curve,
  fit: Spectrum,
  { beyond, ...band }: FitAgainstPointsOptions,
): FitAgainstPoints {
  const lines = polyline(curve, { beyond });
  const byFit = bandNoise(fit, band);
  const byPoints = bandNoise(lines, band);
  const [shares = new Float64Array(0)] = groupResponses(lines, band.weighting, [band.fromHz, band.toHz], {
    groups: lines.sensitivities?.slice(0, 1) ?? [],
    knownPower: byPoints.power,
  });
  const heavyPoints = curve.points
    .map(({ frequency, density, uncertainty }, index) => {
      const off = within(fit, frequency) ? Math.log(density / Math.sqrt(fit.powerDensityAt(frequency))) : 0;
      return Object.freeze({ frequency, share: shares[index] ?? 0, deviations: off / uncertainty });
    })
    .filter(({ share }) => share > heavyShare)
    .toSorted((one, other) => other.share - one.share);
  const relativeDifference = byFit.rms / byPoints.rms - 1;
  const better = heavyPoints.some(({ deviations }) => Math.abs(deviations) > farOff) ? "points" : "fit";
  const notes = heavyPoints.map(heavyNote);
  if (heavyPoints.length > 0)
    notes.push(
      `${better === "points" ? "Straight lines through the points are the better spectrum here" : "Model and straight lines through the points may both stand here"}; the model gives ${(100 * Math.abs(relativeDifference)).toFixed(1)} % ${relativeDifference < 0 ? "less" : "more"} RMS.`,
    );
  return Object.freeze({
    fit: byFit,
    points: byPoints,
    relativeDifference,
    heavyPoints: Object.freeze(heavyPoints),
    better,
    notes: Object.freeze(notes),
  });
}

function within({ support }: Spectrum, hz: number): boolean {
  return hz >= support[0] && hz <= support[1];
}

function heavyNote({ frequency, share, deviations }: HeavyPoint): string {
  const far = Math.abs(deviations) > farOff;
  const where = far
    ? `and lies ${Math.abs(deviations).toFixed(1)} standard uncertainties ${deviations > 0 ? "above" : "below"} the model`
    : "and lies where the model has it";
  return `The point at ${frequency} Hz carries ${(100 * share).toFixed(0)} % of the power of the band ${where}.`;
}
