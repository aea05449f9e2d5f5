import type { Spectrum } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";
import type { RoutedPower } from "./routed-power.js";

/** Power laws through poles and zeros, by partial fractions, where that is well conditioned. */
export function closedPower(
  _spectrum: Spectrum,
  _weighting: Weighting | undefined,
  _fromHz: number,
  _toHz: number,
): RoutedPower | undefined {
  return undefined;
}
