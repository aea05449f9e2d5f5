import { powerLaws, writeQuantity } from "@quietband/core";
import { refuseUnknownKeys, requirePositive } from "../convert/domain.js";
import { type NamedSpectrum, namedSpectrum } from "./named-spectrum.js";
import { elementaryCharge } from "./physical-constants.js";

/** What {@link shotNoise} takes. */
export interface ShotNoiseOptions {
  /** Direct current, A, positive. */
  readonly amperes: number;
  /** For reports; "shot noise of 1 µA" unless given. */
  readonly name?: string | undefined;
}

/**
 * Shot noise of a current: S = 2qI, white, in A²/Hz; q = 1.602176634e-19 C exactly.
 *
 * It is that of carriers which cross a barrier one by one: a junction, a photodiode. A current through a metal has far
 * less. As a voltage: `noiseAcross(shotNoise({ amperes }), { ohms })`.
 *
 * @throws OutOfDomainError for a current that is not positive.
 * @see W. Schottky, Ann. Phys. 362 (1918) 541.
 *
 * @example
 * ```ts
 * import { shotNoise } from "@quietband/figures";
 * Math.sqrt(shotNoise({ amperes: 1e-3 }).powerDensityAt(1)); // → 17.901e-12
 * ```
 */
export function shotNoise(options: ShotNoiseOptions): NamedSpectrum {
  refuseUnknownKeys("shotNoise", ["amperes", "name"], options);
  const { amperes } = options;
  requirePositive("amperes", amperes, "A");
  const spectrum = powerLaws([{ coefficient: 2 * elementaryCharge * amperes, exponent: 0 }], { unit: "A" });
  return namedSpectrum(spectrum, options.name ?? `shot noise of ${writeQuantity(amperes, "A")}`, [
    "Full shot noise: carriers cross a barrier one by one.",
  ]);
}
