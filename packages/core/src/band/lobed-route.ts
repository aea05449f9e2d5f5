import type { Spectrum } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";
import type { RoutedPower } from "./routed-power.js";

/** Gains with lobes, by counting them. */
export function lobedPower(
  _spectrum: Spectrum,
  _weighting: Weighting | undefined,
  _band: readonly [number, number],
  _relativeTolerance: number,
): RoutedPower | undefined {
  return undefined;
}
