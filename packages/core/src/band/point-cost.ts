import type { Curve } from "../curve/curve.js";
import type { Beyond } from "../spectrum/beyond.js";
import { polyline } from "../spectrum/polyline.js";
import type { BandNoiseOptions } from "./band-noise.js";
import { bandNoise } from "./band-noise.js";
import { groupResponses } from "./uncertainty.js";

/** What one point's uncertainty does to the RMS of a band. */
export interface PointCost {
  /** Hz. */
  readonly frequency: number;
  /** Relative change of the RMS that one standard uncertainty of this point makes. */
  readonly relative: number;
  /** Share of the variance of the RMS that comes from this point, 0 to 1. */
  readonly share: number;
}

/** What {@link pointCost} takes: the band, as in `bandNoise`, and how the curve goes on beyond its points. */
export interface PointCostOptions extends BandNoiseOptions {
  readonly beyond?: Beyond | undefined;
}

/**
 * What share of the variance of a band's RMS each point's uncertainty causes: which two points to read again.
 *
 * share_i = (c_i u_i)² / u², with c_i = d ln rms / d ln e_i through the straight lines of the points and u all of the
 * standard uncertainty, errors shared by all points included; the shares of the points add up to 1 only without those.
 *
 * @param curve - the points; their own uncertainty counts.
 * @param options - band edges, weighting, `beyond`.
 * @returns a record a point, in the order of the curve.
 * @throws as `bandNoise` and `polyline`.
 *
 * @example
 * ```ts
 * import { pointCost, readCurve } from "@quietband/core";
 * const curve = readCurve("frequency [Hz], density [nV/√Hz]\n0.1, 1000\n1, 400\n10, 100\n100, 80");
 * const costs = pointCost(curve, { fromHz: 0.1, toHz: 10 });
 * costs.map(({ share }) => share.toFixed(2)).join(" "); // → 0.13 0.73 0.13 0.00
 * ```
 */
export function pointCost(curve: Curve, { beyond, ...band }: PointCostOptions): readonly PointCost[] {
  const spectrum = polyline(curve, { beyond });
  const { standardUncertainty = 0, power } = bandNoise(spectrum, band);
  const points = spectrum.sensitivities?.slice(0, 1) ?? [];
  const [responses = new Float64Array(curve.points.length)] = groupResponses(
    spectrum,
    band.weighting,
    [band.fromHz, band.toHz],
    { groups: points, knownPower: power },
  );
  return Object.freeze(
    curve.points.map(({ frequency, uncertainty }, index) => {
      const relative = (responses[index] ?? 0) * uncertainty;
      const share = standardUncertainty === 0 ? 0 : (relative / standardUncertainty) ** 2;
      return Object.freeze({ frequency, relative, share });
    }),
  );
}
