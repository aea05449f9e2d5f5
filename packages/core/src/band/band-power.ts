import type { Spectrum } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";
import { adaptivePower } from "./adaptive-route.js";
import { closedPower } from "./closed-route.js";
import { exactPower } from "./exact-route.js";
import { lobedPower } from "./lobed-route.js";
import type { RoutedPower } from "./routed-power.js";
import { skirtPower } from "./skirt-route.js";

/**
 * ∫ S·|H|² df by the best route there is: power laws exactly, power laws through poles and zeros in closed form where that
 * is well conditioned, lobes by counting them, everything else adaptively. Convergence has been decided before.
 */
export function bandPower(
  spectrum: Spectrum,
  weighting: Weighting | undefined,
  [fromHz, toHz]: readonly [number, number],
  relativeTolerance: number,
): RoutedPower {
  if (spectrum.parts !== undefined) return sumOf(spectrum.parts, weighting, [fromHz, toHz], relativeTolerance);
  return (
    skirtPower(spectrum, weighting, [fromHz, toHz], relativeTolerance) ??
    exactPower(spectrum, weighting, fromHz, toHz) ??
    closedPower(spectrum, weighting, fromHz, toHz) ??
    lobedPower(spectrum, weighting, [fromHz, toHz], relativeTolerance) ??
    adaptivePower(spectrum, weighting, [fromHz, toHz], relativeTolerance)
  );
}

/** A sum integrates part by part: each keeps its own best route. */
function sumOf(
  parts: readonly Spectrum[],
  weighting: Weighting | undefined,
  band: readonly [number, number],
  relativeTolerance: number,
): RoutedPower {
  let power = 0;
  let error = 0;
  let evaluations = 0;
  let status: RoutedPower["status"] = "exact";
  for (const part of parts) {
    const found = bandPower(part, weighting, band, relativeTolerance);
    power += found.power;
    error += found.error;
    evaluations += found.evaluations;
    if (found.status === "limit" || status === "exact") status = found.status;
  }
  return { power, error: error + power * parts.length * Number.EPSILON, status, evaluations };
}
