import { requirePositive, requireWhole } from "./domain.js";

/** A converter's range and resolution. */
export interface ConverterScale {
  /** Largest minus smallest input, in the unit of the signal; positive. */
  readonly rangePeakToPeak: number;
  /** Resolution, a whole number of bits from 1 to 64. */
  readonly bits: number;
}

/**
 * One code of a converter: range/2^bits.
 *
 * @example
 * ```ts
 * import { leastSignificantBit } from "@quietband/figures";
 * leastSignificantBit({ rangePeakToPeak: 5, bits: 16 }); // → 7.6294e-5
 * ```
 */
export function leastSignificantBit({ rangePeakToPeak, bits }: ConverterScale): number {
  return requirePositive("rangePeakToPeak", rangePeakToPeak) / 2 ** requireBits(bits);
}

/**
 * RMS of the rounding error of an ideal converter, LSB/√12, for signals and noise that spread over several codes.
 *
 * Source: W. R. Bennett, Bell Syst. Tech. J. 27 (1948) 446–472.
 *
 * @example
 * ```ts
 * import { quantizationNoiseRms } from "@quietband/figures";
 * quantizationNoiseRms({ rangePeakToPeak: 5, bits: 16 }); // → 2.2024e-5
 * ```
 */
export function quantizationNoiseRms(scale: ConverterScale): number {
  return leastSignificantBit(scale) / Math.sqrt(12);
}

/**
 * Signal-to-noise ratio of an ideal converter with a full-scale sine: 20·log10(2^bits) + 10·log10(3/2), dB; the
 * textbook's 6.02·bits + 1.76 is up to 0.015 dB lower at 24 bits.
 *
 * Source: Bennett 1948; IEEE Std 1241-2010.
 *
 * @example
 * ```ts
 * import { idealConverterSnrDb } from "@quietband/figures";
 * idealConverterSnrDb(16); // → 98.0905
 * ```
 */
export function idealConverterSnrDb(bits: number): number {
  return 20 * Math.log10(2) * requireBits(bits) + 10 * Math.log10(1.5);
}

/** Refuses what is not a resolution. */
export function requireBits(bits: number): number {
  return requireWhole("bits", bits, [1, 64]);
}
