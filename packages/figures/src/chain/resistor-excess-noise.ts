import { powerLaws, writeQuantity } from "@quietband/core";
import { refuseUnknownKeys, requireFinite, requirePositive } from "../convert/domain.js";
import { type NamedSpectrum, namedSpectrum } from "./named-spectrum.js";

/** What {@link resistorExcessNoise} takes. */
export interface ResistorExcessNoiseOptions {
  /** Direct voltage across the resistor, V, positive. */
  readonly volts: number;
  /** Noise index: microvolts RMS in one decade of frequency for each volt across the resistor, in dB (0 dB is 1 µV/V). */
  readonly noiseIndexDb: number;
  /** For reports; "excess noise at 5 V" unless given. */
  readonly name?: string | undefined;
}

/**
 * Excess noise of a resistor that carries current: S = K/f with K·ln 10 = (volts · 10^(noiseIndexDb/20) · 1 µV/V)², the
 * power of one decade. It comes on top of `thermalNoise` and vanishes without voltage.
 *
 * @throws OutOfDomainError for a voltage that is not positive or an index that is not finite.
 * @see IEC 60195, Method of measurement of current noise generated in fixed resistors.
 *
 * @example
 * ```ts
 * import { bandNoise } from "@quietband/core";
 * import { resistorExcessNoise } from "@quietband/figures";
 * const excess = resistorExcessNoise({ volts: 5, noiseIndexDb: -20 });
 * bandNoise(excess, { fromHz: 10, toHz: 100 }).rms; // → 500.00e-9
 * ```
 */
export function resistorExcessNoise(options: ResistorExcessNoiseOptions): NamedSpectrum {
  refuseUnknownKeys("resistorExcessNoise", ["volts", "noiseIndexDb", "name"], options);
  const { volts, noiseIndexDb } = options;
  requirePositive("volts", volts, "V");
  requireFinite("noiseIndexDb", noiseIndexDb, "dB");
  const perDecade = volts * 1e-6 * 10 ** (noiseIndexDb / 20);
  const spectrum = powerLaws([{ coefficient: (perDecade * perDecade) / Math.LN10, exponent: 1 }], { unit: "V" });
  const across = writeQuantity(volts, "V");
  const name = options.name ?? `excess noise at ${across}`;
  return namedSpectrum(spectrum, name, [
    `Noise index ${writeQuantity(noiseIndexDb, "dB")} at ${across} across the resistor; 1/f at all frequencies.`,
  ]);
}
