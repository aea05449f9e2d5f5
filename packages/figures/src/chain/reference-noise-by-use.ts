import { OutOfDomainError } from "@quietband/core";
import { requireNotNegative } from "../convert/domain.js";
import { referencePathNoise } from "./reference-path-noise.js";
import type { ReferencePathOptions } from "./reference-path-options.js";

/** What {@link referenceNoiseByUse} takes: a path, the input's shape, and how much of the range is used. */
export interface ReferenceUseOptions extends Omit<ReferencePathOptions, "input"> {
  /** A dc input, or a sine whose peak is the share of the reference voltage. */
  readonly input: { readonly kind: "dc" } | { readonly kind: "sine"; readonly frequencyHz: number };
  /** Shares of the reference voltage, 0 to 1; tenths unless given. */
  readonly shares?: readonly number[] | undefined;
  /** All other noise in the same band, V RMS at the converter's input; 0 unless given. */
  readonly otherRms?: number | undefined;
}

/** One row: what the reference costs at this use of the range. */
export interface ReferenceUseRow {
  /** Input over reference voltage: of a dc, of the peak of a sine. */
  readonly share: number;
  /** V RMS. */
  readonly inputRms: number;
  /** V RMS from the reference alone. */
  readonly rms: number;
  /** V RMS with all other noise. */
  readonly totalRms: number;
  /** Input over total noise, dB; missing where there is no input or no noise. */
  readonly snrDb?: number;
}

const tenths: readonly number[] = Object.freeze(Array.from({ length: 11 }, (_, k) => k / 10));

/**
 * The reference's noise against the use of the range: a table for a plot. At zero input only the other noise is left; towards
 * full scale the reference's grows in proportion and may decide.
 *
 * @throws OutOfDomainError for shares outside 0..1 and whatever `referencePathNoise` refuses.
 *
 * @example
 * ```ts
 * import { whiteFlicker } from "@quietband/core";
 * import { referenceNoiseByUse } from "@quietband/figures";
 * const rows = referenceNoiseByUse({
 *   spectrum: whiteFlicker({ floor: 100e-9, cornerHz: 0 }),
 *   referenceVolts: 2.5,
 *   input: { kind: "dc" },
 *   shares: [0, 0.5, 1],
 *   otherRms: 5e-6,
 *   fromHz: 0,
 *   toHz: 10e3,
 * });
 * rows.map((row) => Number((row.totalRms * 1e6).toFixed(3))); // → [5,7.071,11.18]
 * ```
 */
export function referenceNoiseByUse(options: ReferenceUseOptions): readonly ReferenceUseRow[] {
  const { input, shares = tenths, otherRms = 0, ...path } = options;
  requireNotNegative("otherRms", otherRms, path.spectrum.unit);
  const { referenceVolts } = path;
  return Object.freeze(
    shares.map((share): ReferenceUseRow => {
      if (!(share >= 0 && share <= 1)) throw new OutOfDomainError(`Shares must be from 0 to 1; got ${share}.`);
      const peak = share * referenceVolts;
      const { rms } = referencePathNoise({
        ...path,
        input:
          input.kind === "dc"
            ? { kind: "dc", volts: peak }
            : { kind: "sine", amplitude: peak, frequencyHz: input.frequencyHz },
      });
      const inputRms = input.kind === "dc" ? peak : peak * Math.SQRT1_2;
      const totalRms = Math.hypot(rms, otherRms);
      return Object.freeze({
        share,
        inputRms,
        rms,
        totalRms,
        ...(inputRms > 0 && totalRms > 0 && { snrDb: 20 * Math.log10(inputRms / totalRms) }),
      });
    }),
  );
}
