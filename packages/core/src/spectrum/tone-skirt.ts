import { requireFinite, requirePositive } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import type { Sensitivity, Spectrum } from "./spectrum.js";

/** What {@link toneSkirt} takes. */
export interface ToneSkirtOptions {
  /** Frequency of the sine, Hz. */
  readonly toneHz: number;
  /** Peak amplitude A of the sine, in the unit of `reference`. */
  readonly amplitude: number;
  /** What the spectrum's noise is relative to: the reference voltage V. */
  readonly reference: number;
  /** Half width around the tone that bands leave out, Hz; needed where the noise is 1/f or steeper. 0 unless given. */
  readonly leaveOutHz?: number;
}

/**
 * The skirt that reference noise makes around a tone: a converter divides by its reference, so noise S of the reference
 * multiplies the signal, and a sine of amplitude A carries (A/2V)² · (S(|f − f₀|) + S(f + f₀)) to its sides.
 *
 * Its total is S's total times (A/√2)²/V²: the input's RMS over the reference, squared.
 *
 * @param spectrum - noise of the reference; its support must reach from leaveOutHz up.
 * @returns a spectrum that is zero within ±leaveOutHz of the tone; its bands integrate in offsets from the tone, exactly
 *   for power laws.
 * @throws OutOfDomainError for a tone or reference that is not positive, a non-finite amplitude, or a leave-out that is
 *   negative or reaches 0 Hz.
 *
 * @example
 * ```ts
 * import { bandNoise, toneSkirt, whiteFlicker } from "@quietband/core";
 * const reference = whiteFlicker({ floor: 100e-9, cornerHz: 10 });
 * const skirt = toneSkirt(reference, { toneHz: 1000, amplitude: 2, reference: 2.5, leaveOutHz: 0.1 });
 * bandNoise(skirt, { fromHz: 900, toHz: 1100 }).rms; // → 928.44e-9
 * ```
 */
export function toneSkirt(spectrum: Spectrum, options: ToneSkirtOptions): Spectrum {
  const { toneHz, amplitude, reference, leaveOutHz = 0 } = options;
  requirePositive("toneHz", toneHz, "Hz");
  requirePositive("reference", reference, spectrum.unit);
  requireFinite("amplitude", amplitude, spectrum.unit);
  if (!(leaveOutHz >= 0 && leaveOutHz < toneHz))
    throw new OutOfDomainError(`leaveOutHz must be at least 0 and below toneHz = ${toneHz}, in Hz; got ${leaveOutHz}.`);
  const powerGain = (amplitude / (2 * reference)) ** 2;
  const densityAt = (hz: number): number => {
    const offset = Math.abs(hz - toneHz);
    if (offset < leaveOutHz) return 0;
    return powerGain * (spectrum.powerDensityAt(offset) + spectrum.powerDensityAt(hz + toneHz));
  };
  const highest =
    spectrum.support[1] === Number.POSITIVE_INFINITY ? Number.POSITIVE_INFINITY : spectrum.support[1] - toneHz;
  return Object.freeze({
    unit: spectrum.unit,
    support: Object.freeze([Math.max(0, spectrum.support[0] - toneHz), highest] as const),
    knots: Object.freeze(knotsAround(toneHz, leaveOutHz, spectrum.knots)),
    lowExponent: 0,
    highExponent: spectrum.highExponent,
    skirt: Object.freeze({ base: spectrum, toneHz, powerGain, leaveOutHz }),
    ...(spectrum.sensitivities !== undefined && {
      sensitivities: Object.freeze(spectrum.sensitivities.map((group) => aroundTone(group, spectrum, toneHz))),
    }),
    ...(spectrum.notes !== undefined && { notes: spectrum.notes }),
    powerDensityAt: densityAt,
  });
}

function knotsAround(toneHz: number, leaveOutHz: number, knots: readonly number[]): number[] {
  const around = [leaveOutHz, ...knots].flatMap((offset) => [toneHz - offset, toneHz + offset]);
  const images = knots.map((hz) => hz - toneHz);
  return [...new Set([toneHz, ...around, ...images])].filter((hz) => hz > 0).toSorted((one, other) => one - other);
}

/** Both images answer to the same parameters, in proportion to their power. */
function aroundTone(group: Sensitivity, spectrum: Spectrum, toneHz: number): Sensitivity {
  return Object.freeze({
    ...group,
    straight: false,
    knots: Object.freeze(knotsAround(toneHz, 0, group.knots)),
    gradientAt(hz: number, visit: (parameter: number, slope: number) => void): void {
      const offset = Math.abs(hz - toneHz);
      const near = spectrum.powerDensityAt(offset);
      const far = spectrum.powerDensityAt(hz + toneHz);
      group.gradientAt(offset, (parameter, slope) => visit(parameter, (slope * near) / (near + far)));
      group.gradientAt(hz + toneHz, (parameter, slope) => visit(parameter, (slope * far) / (near + far)));
    },
  });
}
