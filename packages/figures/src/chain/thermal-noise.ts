import { powerLaws, writeQuantity } from "@quietband/core";
import { refuseUnknownKeys, requirePositive } from "../convert/domain.js";
import { type NamedSpectrum, namedSpectrum } from "./named-spectrum.js";
import { boltzmannConstant } from "./physical-constants.js";
import { resolveTemperature, type Temperature } from "./temperature.js";

/** What {@link thermalNoise} takes. */
export interface ThermalNoiseOptions extends Temperature {
  /** Ω, positive. */
  readonly ohms: number;
  /** For reports; "thermal noise of 350 Ω" unless given. */
  readonly name?: string | undefined;
}

/**
 * Thermal noise of a resistor: S = 4kTR, white, in V²/Hz; k = 1.380649e-23 J/K exactly.
 *
 * It holds while hf is far below kT, to hundreds of gigahertz at room temperature. Current through the resistor adds
 * excess noise (`resistorExcessNoise`).
 *
 * @param options - `ohms`, and `kelvin` or `celsius`; 25 °C is assumed, and said to be, where neither is given.
 * @throws OutOfDomainError for a resistance or a temperature that is not positive, or two temperatures.
 * @see H. Nyquist, Phys. Rev. 32 (1928) 110; J. B. Johnson, Phys. Rev. 32 (1928) 97.
 *
 * @example
 * ```ts
 * import { thermalNoise } from "@quietband/figures";
 * Math.sqrt(thermalNoise({ ohms: 1000, kelvin: 300 }).powerDensityAt(1)); // → 4.0704e-9
 * ```
 */
export function thermalNoise(options: ThermalNoiseOptions): NamedSpectrum {
  refuseUnknownKeys("thermalNoise", ["ohms", "kelvin", "celsius", "name"], options);
  const { ohms } = options;
  requirePositive("ohms", ohms, "Ω");
  const { kelvin, words } = resolveTemperature(options);
  const spectrum = powerLaws([{ coefficient: 4 * boltzmannConstant * kelvin * ohms, exponent: 0 }], { unit: "V" });
  const resistor = writeQuantity(ohms, "Ω");
  return namedSpectrum(spectrum, options.name ?? `thermal noise of ${resistor}`, [`${resistor} at ${words}.`]);
}
