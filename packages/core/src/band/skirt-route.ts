import { DivergentIntegralError } from "../ground/errors.js";
import type { Spectrum, ToneSkirtForm } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";
import { adaptivePower } from "./adaptive-route.js";
import { exactPower } from "./exact-route.js";
import type { RoutedPower } from "./routed-power.js";

/** A stretch of the skirt in u, the argument of the base spectrum; the frequency there is side·u + shift. */
interface Stretch {
  readonly from: number;
  readonly to: number;
  readonly side: 1 | -1;
  readonly shift: number;
}

/**
 * A skirt over a band, in offsets from the tone: below it f = f₀ − u, above it f = f₀ + u, the image f = u − f₀. In
 * frequency the offsets would be differences of large numbers: 0.9 Hz beside 300 kHz keeps ten digits only.
 */
export function skirtPower(
  spectrum: Spectrum,
  weighting: Weighting | undefined,
  [fromHz, toHz]: readonly [number, number],
  relativeTolerance: number,
): RoutedPower | undefined {
  const { skirt } = spectrum;
  if (skirt === undefined) return undefined;
  let power = 0;
  let error = 0;
  let evaluations = 0;
  let status: RoutedPower["status"] = "exact";
  for (const stretch of stretchesOf(skirt, fromHz, toHz)) {
    if (stretch.from === 0 && skirt.base.lowExponent >= 1)
      throw new DivergentIntegralError(
        `The skirt grows without limit towards its tone at ${skirt.toneHz} Hz, where the noise goes as 1/f^${skirt.base.lowExponent}; leave out a band around the tone with leaveOutHz or move fromHz above it.`,
        "fromHz",
      );
    const found = stretchPower(skirt.base, weighting, stretch, relativeTolerance);
    power += found.power * skirt.powerGain;
    error += found.error * skirt.powerGain;
    evaluations += found.evaluations;
    if (found.status === "limit" || status === "exact") status = found.status;
  }
  return { power, error: error + 4 * Number.EPSILON * power, status, evaluations };
}

function stretchesOf({ toneHz, leaveOutHz }: ToneSkirtForm, fromHz: number, toHz: number): Stretch[] {
  const below = { from: Math.max(leaveOutHz, toneHz - toHz), to: toneHz - fromHz, side: -1, shift: toneHz } as const;
  const above = { from: Math.max(leaveOutHz, fromHz - toneHz), to: toHz - toneHz, side: 1, shift: toneHz } as const;
  const lowerImage = {
    from: fromHz + toneHz,
    to: Math.min(toHz + toneHz, 2 * toneHz - leaveOutHz),
    side: 1,
    shift: -toneHz,
  } as const;
  const upperImage = {
    from: Math.max(fromHz + toneHz, 2 * toneHz + leaveOutHz),
    to: toHz + toneHz,
    side: 1,
    shift: -toneHz,
  } as const;
  return [below, above, lowerImage, upperImage].filter((stretch) => stretch.to > stretch.from);
}

function stretchPower(
  base: Spectrum,
  weighting: Weighting | undefined,
  { from, to, side, shift }: Stretch,
  relativeTolerance: number,
): RoutedPower {
  const exact = weighting === undefined ? exactPower(base, undefined, from, to) : undefined;
  if (exact !== undefined) return exact;
  const shifted = weighting === undefined ? undefined : seenFromTone(weighting, side, shift);
  return adaptivePower(base, shifted, [from, to], relativeTolerance);
}

/** The same gain as a function of the offset u; towards the tone it is level. */
function seenFromTone(weighting: Weighting, side: 1 | -1, shift: number): Weighting {
  const knots = [shift, ...weighting.knots].map((hz) => Math.abs(hz - shift)).filter((u) => u > 0);
  return {
    name: weighting.name,
    support: [0, Number.POSITIVE_INFINITY],
    knots: [...knots, Math.abs(shift)],
    lowExponent: 0,
    highExponent: weighting.highExponent,
    powerGainAt: (u) => weighting.powerGainAt(side * u + shift),
  };
}
