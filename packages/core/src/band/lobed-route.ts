import { fewestLobes } from "../numerics/lobed-rule.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";
import { adaptivePower } from "./adaptive-route.js";
import { added, countedPower } from "./counted-lobes.js";
import { withLobesAsKnots } from "./lobed-factor.js";
import type { RoutedPower } from "./routed-power.js";

/**
 * Gains with lobes: the first few and those beside the peaks of a digital filter one by one, all others counted, however
 * many the band holds. A band of few lobes takes every one by itself.
 */
export function lobedPower(
  spectrum: Spectrum,
  weighting: Weighting | undefined,
  [fromHz, toHz]: readonly [number, number],
  relativeTolerance: number,
): RoutedPower | undefined {
  const lobes = weighting?.lobes;
  if (weighting === undefined || lobes === undefined) return undefined;
  if (toHz - fromHz <= fewestLobes * lobes.lobeHz) {
    const resolved = withLobesAsKnots(weighting, lobes, fromHz, toHz);
    return adaptivePower(spectrum, resolved, [fromHz, toHz], relativeTolerance);
  }
  const start = Math.max(fromHz, 0.5 * lobes.lobeHz);
  const counted = countedPower(spectrum, weighting, lobes, [start, toHz], relativeTolerance);
  if (start === fromHz) return counted;
  return added(adaptivePower(spectrum, weighting, [fromHz, start], relativeTolerance), counted);
}
