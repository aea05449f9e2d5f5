import { amplitudeRatioFromDb } from "./amplitude-ratio-db.js";
import { refuseUnknownKeys, requirePositive } from "./domain.js";
import { type Rms, rmsOf } from "./rms.js";

/** The range of a converter or recorder, as a peak-to-peak value. */
export interface FullScale {
  /** Largest minus smallest input, in the unit of the RMS value; ± 2.5 V is 5 V. Positive. */
  readonly rangePeakToPeak: number;
}

/**
 * Level re the RMS of a full-scale sine: 20·log10(rms·2√2/range), dBFS. A full-scale sine reads 0 dBFS, a full-scale
 * square wave +3.01 dBFS. Re the full-scale amplitude it is `levelDbFullScaleAmplitude`, 3.01 dB lower.
 *
 * @param rms - RMS value, positive, or a result with an rms.
 * @param fullScale - `rangePeakToPeak` in the same unit, required.
 * @throws OutOfDomainError for what is not positive, and for a peak-to-peak value.
 * Source: AES17.
 *
 * @example
 * ```ts
 * import { levelDbfs } from "@quietband/figures";
 * levelDbfs(1.248e-6, { rangePeakToPeak: 5 }); // → -123.02
 * ```
 */
export function levelDbfs(rms: Rms, fullScale: FullScale): number {
  return 20 * Math.log10(rmsOf("rms", rms) / fullScaleSineRms(rangeOf("levelDbfs", fullScale)));
}

/**
 * RMS value of a level in dBFS (0 dBFS: the RMS of a full-scale sine), in the unit of the range.
 *
 * @example
 * ```ts
 * import { rmsFromDbfs } from "@quietband/figures";
 * rmsFromDbfs(-100, { rangePeakToPeak: 5 }); // → 1.76777e-5
 * ```
 */
export function rmsFromDbfs(dbfs: number, fullScale: FullScale): number {
  return amplitudeRatioFromDb(dbfs) * fullScaleSineRms(rangeOf("rmsFromDbfs", fullScale));
}

/**
 * Power density re the power of a full-scale sine: 20·log10(density·2√2/range), dBFS/Hz.
 *
 * @param density - amplitude density, unit/√Hz, positive.
 * @param fullScale - `rangePeakToPeak` in that unit, required.
 * @throws OutOfDomainError for what is not positive.
 *
 * @example
 * ```ts
 * import { densityDbfsPerHz } from "@quietband/figures";
 * densityDbfsPerHz(70e-9, { rangePeakToPeak: 5 }); // → -148.05
 * ```
 */
export function densityDbfsPerHz(density: number, fullScale: FullScale): number {
  const range = rangeOf("densityDbfsPerHz", fullScale);
  return 20 * Math.log10(requirePositive("density", density) / fullScaleSineRms(range));
}

/**
 * Level of an RMS value re the full-scale amplitude (half the range): 20·log10(rms·2/range), dB. A full-scale square wave
 * reads 0 dB, a full-scale sine −3.01 dB.
 *
 * @param rms - RMS value, positive, or a result with an rms.
 * @param fullScale - `rangePeakToPeak` in the same unit, required.
 * @throws OutOfDomainError for what is not positive, and for a peak-to-peak value.
 *
 * @example
 * ```ts
 * import { levelDbFullScaleAmplitude } from "@quietband/figures";
 * levelDbFullScaleAmplitude(1.248e-6, { rangePeakToPeak: 5 }); // → -126.03
 * ```
 */
export function levelDbFullScaleAmplitude(rms: Rms, fullScale: FullScale): number {
  return 20 * Math.log10((2 * rmsOf("rms", rms)) / rangeOf("levelDbFullScaleAmplitude", fullScale));
}

/** RMS of the sine that fills a range. */
export function fullScaleSineRms(rangePeakToPeak: number): number {
  return rangePeakToPeak / (2 * Math.SQRT2);
}

function rangeOf(where: string, fullScale: FullScale): number {
  refuseUnknownKeys(where, ["rangePeakToPeak"], fullScale);
  return requirePositive(
    "rangePeakToPeak, largest minus smallest input,",
    (fullScale as FullScale | undefined)?.rangePeakToPeak as number,
  );
}
