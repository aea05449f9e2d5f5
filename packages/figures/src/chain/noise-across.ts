import { OutOfDomainError, type Spectrum, scaleSpectrum, writeQuantity } from "@quietband/core";
import { refuseUnknownKeys, requirePositive } from "../convert/domain.js";
import { type NamedSpectrum, namedSpectrum } from "./named-spectrum.js";

/** What {@link noiseAcross} takes besides the current noise. */
export interface NoiseAcrossOptions {
  /** Ω, positive. */
  readonly ohms: number;
  /** For reports; "shot noise of 1 µA across 10 kΩ" unless given. */
  readonly name?: string | undefined;
}

/**
 * The voltage that a current noise makes across a resistance: S_V = R² · S_I. The resistor's own thermal noise is not in
 * it.
 *
 * @param current - power density in A²/Hz.
 * @throws OutOfDomainError for a spectrum that is no current, or a resistance that is not positive.
 *
 * @example
 * ```ts
 * import { noiseAcross, shotNoise } from "@quietband/figures";
 * const photodiode = noiseAcross(shotNoise({ amperes: 1e-6 }), { ohms: 100e3 });
 * Math.sqrt(photodiode.powerDensityAt(1)); // → 56.607e-9
 * ```
 */
export function noiseAcross(current: Spectrum, options: NoiseAcrossOptions): NamedSpectrum {
  refuseUnknownKeys("noiseAcross", ["ohms", "name"], options);
  const ohms = requirePositive("ohms", options.ohms, "Ω");
  if (current.unit !== "A")
    throw new OutOfDomainError(`noiseAcross takes a current noise, in A/√Hz; got one in ${current.unit}/√Hz.`);
  const called = (current as Partial<NamedSpectrum>).name ?? "current noise";
  const name = options.name ?? `${called} across ${writeQuantity(ohms, "Ω")}`;
  return namedSpectrum(scaleSpectrum(current, ohms, { unit: "V" }), name);
}
