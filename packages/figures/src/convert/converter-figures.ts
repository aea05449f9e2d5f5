import { OutOfDomainError } from "@quietband/core";
import { refuseUnknownKeys, requirePositive } from "./domain.js";
import { idealConverterSnrDb, leastSignificantBit, requireBits } from "./ideal-converter.js";
import { fullScaleSineRms } from "./level-dbfs.js";
import { peakToPeakDefaults } from "./peak-to-peak.js";
import { powerRatioDb, powerRatioFromDb } from "./power-ratio-db.js";
import { type Rms, rmsOf } from "./rms.js";

/** What {@link converterFigures} takes; all in one unit. */
export interface ConverterFiguresOptions {
  /** Noise at the converter's input, RMS, in the band that reaches its output; positive. */
  readonly rms: Rms;
  /** Largest minus smallest input; required, for every figure of bits is of a range. */
  readonly rangePeakToPeak: number;
  /** Resolution in bits; without it nothing is said of codes and nothing is limited by them. */
  readonly bits?: number | undefined;
  /** RMS of the signal; that of a full-scale sine unless given. */
  readonly signalRms?: Rms | undefined;
  /** V (or the unit of rms), for ppm of a reference. */
  readonly referenceVolts?: number | undefined;
  /** Distortion re the signal, negative dB (−100 means 100 dB below); for SINAD and effective bits. */
  readonly distortionDb?: number | undefined;
  /** Peak-to-peak / RMS of "noise-free"; 6.6 unless given. */
  readonly factor?: number | undefined;
}

/** Converter figures of a noise. */
export interface ConverterFigures {
  readonly rms: number;
  readonly rangePeakToPeak: number;
  /** One code, range/2^bits. */
  readonly lsb?: number;
  /** rms/lsb. */
  readonly rmsInLsb?: number;
  /** 1e6·rms/range. */
  readonly ppmOfRange: number;
  /** 1e6·rms/reference. */
  readonly ppmOfReference?: number;
  readonly signalRms: number;
  /** 20·log10(signalRms/rms). */
  readonly snrDb: number;
  /** 20·log10(RMS of a full-scale sine/rms): the largest signal over the noise that is there without one. */
  readonly dynamicRangeDb: number;
  /** Signal over noise and distortion, both added in power (IEEE 1241). */
  readonly sinadDb?: number;
  /** log2(range/(√12·RMS of noise and distortion)), IEEE 1241; for a full-scale sine (SINAD − 1.76)/6.02. */
  readonly effectiveBits?: number;
  /** log2(range/(√12·rms)): effective bits from the noise alone. */
  readonly noiseLimitedEffectiveBits: number;
  /** log2(range/rms). */
  readonly effectiveResolutionBits: number;
  /** log2(range/(factor·rms)): codes that do not flicker, but for the share of time outside the factor. */
  readonly noiseFreeBits: number;
  /** 2^noiseFreeBits, not rounded. */
  readonly noiseFreeCounts: number;
  /** The factor noise-free figures rest on. */
  readonly factor: number;
  /** Signal-to-noise ratio of an ideal converter of these bits with a full-scale sine. */
  readonly idealSnrDb?: number;
  /** Figures that the resolution limits and not the noise: they stand at `bits`, and the noise is below a code. */
  readonly limitedByBits: readonly string[];
}

const known = ["rms", "rangePeakToPeak", "bits", "signalRms", "referenceVolts", "distortionDb", "factor"];

/**
 * Converter figures of a noise on a range: ppm, LSB, SNR, SINAD, effective bits, effective resolution, noise-free bits.
 *
 * The rms is taken as all the noise there is: add `quantizationNoiseRms` in power first where the converter's own rounding
 * counts. With `bits` no figure exceeds them, and those that would are named in `limitedByBits`.
 *
 * @returns the figures, each defined at its field.
 * @throws OutOfDomainError for values that are not positive, noise or signal above half the range, distortion above 0 dB.
 * Source: IEEE Std 1241-2010 (SINAD, effective bits); noise-free bits and effective resolution by common practice.
 *
 * @example
 * ```ts
 * import { converterFigures } from "@quietband/figures";
 * const figures = converterFigures({ rms: 1.248e-6, rangePeakToPeak: 5, bits: 24, referenceVolts: 2.5 });
 * figures.noiseFreeBits; // → 19.21
 * figures.effectiveResolutionBits; // → 21.93
 * figures.ppmOfReference; // → 0.4992
 * ```
 */
export function converterFigures(options: ConverterFiguresOptions): ConverterFigures {
  refuseUnknownKeys("converterFigures", known, options);
  const range = requirePositive("rangePeakToPeak, largest minus smallest input,", options.rangePeakToPeak);
  const rms = requireOnRange("rms", rmsOf("rms", options.rms), range);
  const signalRms =
    options.signalRms === undefined
      ? fullScaleSineRms(range)
      : requireOnRange("signalRms", rmsOf("signalRms", options.signalRms), range);
  const factor = requirePositive("factor, peak-to-peak / RMS,", options.factor ?? peakToPeakDefaults.factor);
  const bits = options.bits === undefined ? undefined : requireBits(options.bits);
  const snrDb = 20 * Math.log10(signalRms / rms);
  const sinadDb = sinadOf(snrDb, options.distortionDb);
  const limitedByBits: string[] = [];
  const limited = (name: string, value: number): number => {
    if (bits === undefined || value <= bits) return value;
    limitedByBits.push(name);
    return bits;
  };
  const noiseLimitedEffectiveBits = limited("noiseLimitedEffectiveBits", effectiveBitsOf(range, rms));
  const effectiveResolutionBits = limited("effectiveResolutionBits", Math.log2(range / rms));
  const noiseFreeBits = limited("noiseFreeBits", Math.log2(range / (factor * rms)));
  const effectiveBits =
    sinadDb === undefined
      ? undefined
      : limited("effectiveBits", effectiveBitsOf(range, signalRms * 10 ** (-sinadDb / 20)));
  return Object.freeze({
    rms,
    rangePeakToPeak: range,
    ...codesOf(range, rms, bits),
    ppmOfRange: (1e6 * rms) / range,
    ...(options.referenceVolts !== undefined && {
      ppmOfReference: (1e6 * rms) / requirePositive("referenceVolts", options.referenceVolts, "V"),
    }),
    signalRms,
    snrDb,
    dynamicRangeDb: 20 * Math.log10(fullScaleSineRms(range) / rms),
    ...(sinadDb !== undefined && { sinadDb }),
    ...(effectiveBits !== undefined && { effectiveBits }),
    noiseLimitedEffectiveBits,
    effectiveResolutionBits,
    noiseFreeBits,
    noiseFreeCounts: 2 ** noiseFreeBits,
    factor,
    limitedByBits: Object.freeze(limitedByBits),
  });
}

/** log2(range/(√12·rms)): the resolution whose ideal rounding error has this RMS. */
function effectiveBitsOf(range: number, rms: number): number {
  return Math.log2(range / (Math.sqrt(12) * rms));
}

function sinadOf(snrDb: number, distortionDb: number | undefined): number | undefined {
  if (distortionDb === undefined) return undefined;
  if (typeof distortionDb !== "number" || !(distortionDb <= 0 && distortionDb > Number.NEGATIVE_INFINITY))
    throw new OutOfDomainError(
      `distortionDb must be the level of the distortion re the signal, a finite number of dB not above 0; got ${String(distortionDb)}; 100 dB below the signal is −100.`,
    );
  return -powerRatioDb(powerRatioFromDb(-snrDb) + powerRatioFromDb(distortionDb));
}

function codesOf(
  rangePeakToPeak: number,
  rms: number,
  bits: number | undefined,
): Pick<ConverterFigures, "lsb" | "rmsInLsb" | "idealSnrDb"> {
  if (bits === undefined) return {};
  const lsb = leastSignificantBit({ rangePeakToPeak, bits });
  return { lsb, rmsInLsb: rms / lsb, idealSnrDb: idealConverterSnrDb(bits) };
}

/** Nothing on a range has a larger RMS than the square wave that fills it. */
function requireOnRange(name: string, rms: number, range: number): number {
  if (rms <= range / 2) return rms;
  throw new OutOfDomainError(
    `${name} must not exceed half the range, ${range / 2}, the RMS of the square wave that fills it; got ${rms}; is the range peak-to-peak and in the same unit?`,
  );
}
