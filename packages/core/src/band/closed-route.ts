import { saturatingIntegral } from "../numerics/saturating-integral.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import type { SaturatingGain, Weighting } from "../weighting/weighting.js";
import { eachTermOver } from "./exact-route.js";
import type { RoutedPower } from "./routed-power.js";

/** A closed form whose own bound is wider than this share hands over to the integrator. */
const widestBound = 1e-13;

/** Power laws through first-order and Butterworth gains, term by term in closed form, where that is well conditioned. */
export function closedPower(
  spectrum: Spectrum,
  weighting: Weighting | undefined,
  fromHz: number,
  toHz: number,
): RoutedPower | undefined {
  if (spectrum.pieces === undefined || weighting?.saturating === undefined) return undefined;
  const found = sumOfTerms(spectrum, weighting.saturating, fromHz, toHz);
  return found !== undefined && found.error <= widestBound * found.power ? found : undefined;
}

function sumOfTerms(
  spectrum: Spectrum,
  { cutoffHz, order, numeratorOrder }: SaturatingGain,
  fromHz: number,
  toHz: number,
): RoutedPower | undefined {
  const gain = { cutoff: cutoffHz, order, numeratorOrder };
  let power = 0;
  let error = 0;
  let complete = true;
  eachTermOver(spectrum.pieces ?? [], fromHz, toHz, (term, low, high) => {
    const part = saturatingIntegral(term, gain, low, high);
    if (part === undefined) complete = false;
    else {
      power += part.value;
      error += part.error + Number.EPSILON * power;
    }
  });
  return complete ? { power, error, status: "exact", evaluations: 0 } : undefined;
}
