import { bandNoise, OutOfDomainError, type Spectrum, type Weighting } from "@quietband/core";
import { refuseUnknownKeys, requirePositive, requireWhole } from "./domain.js";
import { type PeakToPeak, peakToPeak } from "./peak-to-peak.js";
import { coupledBand, type RecordBand, type RecordCoupling, recordBandNoise, secondMoment } from "./record-band.js";
import { type RecordDensity, recordDensity } from "./record-density.js";
import { type RecordRange, recordRange } from "./record-range.js";
import { recordPower } from "./structure-function.js";

/** What {@link expectedPeakToPeak} takes. */
export interface ExpectedPeakToPeakOptions {
  /** Lower band edge, Hz. What is slower than the record moves it as a whole and hardly widens it. */
  readonly fromHz: number;
  /** Upper band edge, Hz; Infinity where a weighting limits the band. */
  readonly toHz: number;
  /** What the noise passes before it is sampled. */
  readonly weighting?: Weighting | undefined;
  /** Length of one record, s. */
  readonly recordSeconds: number;
  /** Samples per second; a continuous trace unless given. Required where the noise is rough (one RC pole). */
  readonly sampleRateHz?: number | undefined;
  /** The figure is the largest range of that many independent records; 1 unless given. */
  readonly records?: number | undefined;
  /** "dc" unless given. */
  readonly coupling?: RecordCoupling | undefined;
}

/** What a record will show. */
export interface ExpectedPeakToPeak {
  /** Not a level, like every peak-to-peak value. */
  readonly kind: "peak-to-peak";
  /** Mean of largest minus smallest sample, in `unit`. */
  readonly mean: number;
  /** Standard deviation of it from record to record (of the largest of `records`), in `unit`. */
  readonly spread: number;
  /** spread / mean. */
  readonly relativeSpread: number;
  /** mean / rms. */
  readonly multipleOfRms: number;
  /** RMS of the band, as `bandNoise` has it; where that is infinite at 0 Hz, about the record's mean (see `notes`). */
  readonly rms: number;
  /** RMS a record shows about its own mean, to 0.5 %. */
  readonly recordRms: number;
  readonly unit: string;
  /** Rice's rate √(m₂/m₀) of up-crossings of the band, Hz; absent where a moment is infinite. */
  readonly upCrossingRateHz?: number;
  readonly recordSeconds: number;
  readonly sampleRateHz?: number;
  readonly records: number;
  /** The same noise by the convention of 6.6, for a report to show both. */
  readonly convention: PeakToPeak;
  /** Relative standard uncertainty (k = 1) of rms, where the spectrum carries one; the spread is not in it. */
  readonly standardUncertainty?: number;
  /** What the figure rests on, for a report. */
  readonly basis: string;
  readonly notes: readonly string[];
}

const known = ["fromHz", "toHz", "weighting", "recordSeconds", "sampleRateHz", "records", "coupling"];
/** A continuous trace is taken so many times an up-crossing: its range comes out 0.04 % low. */
const samplesACrossing = 64;
const fewestTraceSamples = 257;
/** A traced curve may bring 1e5 knots; so many hold its shape. */
const mostKnots = 1000;

/**
 * Peak-to-peak value that a record of Gaussian noise will show: mean and spread of its range, or of the largest of several.
 *
 * Up-crossings of a level come as a Poisson process at Rice's rate; where samples are few the chance that a sample crosses
 * is taken exactly, and crossings that come in clumps count once. Noise slower than the record moves through it as a path
 * and is averaged over. White samples have the exact range of independent normals. Against simulation of some 50 spectra,
 * bands and records the mean is within 2.5 % and the spread within 7 % (a line out of a
 * broad floor: up to 7 % and 12 %, docs/method.md); a call takes 15 to 600 ms.
 *
 * @param spectrum - one-sided power density, unit²/Hz, of Gaussian, stationary noise.
 * @param options - `fromHz`, `toHz`, `weighting`, `recordSeconds`, `sampleRateHz`, `records`, `coupling`.
 * @returns mean, spread, the multiple of the band's RMS, and what they rest on.
 * @throws OutOfDomainError for values out of range, a record of less than two samples, and rough noise (one RC pole)
 *   without a sample rate; what `bandNoise` throws for the band.
 * Source: S. O. Rice, Bell Syst. Tech. J. 23 (1944) 282 and 24 (1945) 46; A. G. Davenport, Proc. ICE 28 (1964) 187;
 * L. H. C. Tippett, Biometrika 17 (1925) 364; D. Aldous, Probability Approximations via the Poisson Clumping Heuristic (1989).
 *
 * @example
 * ```ts
 * import { firstOrderLowPass, powerLaws } from "@quietband/core";
 * import { expectedPeakToPeak } from "@quietband/figures";
 * const white = powerLaws([{ coefficient: 1e-14, exponent: 0 }]);
 * expectedPeakToPeak(white, { fromHz: 0.1, toHz: 10, recordSeconds: 10 }).multipleOfRms; // → 6.0
 * // noise behind one RC pole is rough: the more samples, the wider
 * const weighting = firstOrderLowPass({ cutoffHz: 10 });
 * const record = { fromHz: 0, toHz: Infinity, weighting, recordSeconds: 10, sampleRateHz: 1000 };
 * expectedPeakToPeak(white, record).multipleOfRms; // → 7.2
 * ```
 */
export function expectedPeakToPeak(spectrum: Spectrum, options: ExpectedPeakToPeakOptions): ExpectedPeakToPeak {
  refuseUnknownKeys("expectedPeakToPeak", known, options);
  const recorder = recorderOf(options);
  const { recordSeconds, sampleRateHz, records } = recorder;
  const band = coupledBand(options, options.coupling ?? "dc");
  const { noise, aboutMean } = recordBandNoise(spectrum, band, recordSeconds);
  const moment = secondMoment(spectrum, band);
  if (moment === undefined && sampleRateHz === undefined)
    throw new OutOfDomainError(
      "sampleRateHz is required here: this noise is so rough (infinite second moment, like white noise behind one RC pole) that its range grows with the number of samples; give the samples per second, or a weighting of second order.",
    );
  const crossingHz = Math.sqrt((moment ?? 0) / noise.power);
  const record = densityOf(spectrum, band, recordSeconds, sampleRateHz ?? samplesACrossing * crossingHz);
  const scale = scaleOf(spectrum, band, record);
  const within = recordPower(record, (hz) => meanRemoved(hz * recordSeconds)) * scale * scale;
  const samples = samplesOf(recorder, Math.sqrt((moment ?? 0) / within));
  const sampleSeconds = sampleRateHz === undefined ? recordSeconds / (samples - 1) : 1 / sampleRateHz;
  const range = recordRange(record, { samples, sampleSeconds, records });
  const [mean, spread] = [range.mean * scale, range.standardDeviation * scale];
  return Object.freeze({
    kind: "peak-to-peak",
    mean,
    spread,
    relativeSpread: spread / mean,
    multipleOfRms: mean / noise.rms,
    rms: noise.rms,
    recordRms: Math.sqrt(within),
    unit: noise.unit,
    ...(moment !== undefined && !aboutMean && { upCrossingRateHz: crossingHz }),
    recordSeconds,
    ...(sampleRateHz !== undefined && { sampleRateHz }),
    records,
    convention: peakToPeak(noise),
    ...(noise.standardUncertainty !== undefined && { standardUncertainty: noise.standardUncertainty }),
    basis: inWords(range, recorder, samples),
    notes: noise.notes,
  });
}

interface Recorder {
  readonly recordSeconds: number;
  readonly sampleRateHz: number | undefined;
  readonly records: number;
}

function recorderOf(options: ExpectedPeakToPeakOptions): Recorder {
  const recordSeconds = requirePositive("recordSeconds", options.recordSeconds, "s");
  const records = requireWhole("records", options.records ?? 1, [1, 1e9]);
  if (options.sampleRateHz === undefined) return { recordSeconds, sampleRateHz: undefined, records };
  const sampleRateHz = requirePositive("sampleRateHz", options.sampleRateHz, "Hz");
  const samples = Math.round(recordSeconds * sampleRateHz);
  if (samples >= 2 && samples <= 1e15) return { recordSeconds, sampleRateHz, records };
  throw new OutOfDomainError(
    `A record must hold 2 to 1e15 samples; ${recordSeconds} s at ${sampleRateHz} samples a second are ${samples}.`,
  );
}

/** Samples of a record, or of the fine steps that stand for a continuous trace. */
function samplesOf({ recordSeconds, sampleRateHz }: Recorder, crossingHz: number): number {
  if (sampleRateHz !== undefined) return Math.round(recordSeconds * sampleRateHz);
  return Math.max(fewestTraceSamples, Math.ceil(samplesACrossing * recordSeconds * crossingHz));
}

function densityOf(spectrum: Spectrum, band: RecordBand, recordSeconds: number, fastestHz: number): RecordDensity {
  const { fromHz, toHz, weighting } = band;
  const all = [...spectrum.knots, ...(weighting?.knots ?? [])];
  const stride = Math.ceil(all.length / mostKnots);
  return recordDensity((hz) => spectrum.powerDensityAt(hz) * (weighting?.powerGainAt(hz) ?? 1), {
    fromHz,
    toHz,
    recordSeconds,
    fastestHz,
    knots: all.filter((_, index) => index % stride === 0),
  });
}

/** The nodes hold the power to some 0.2 %; this takes that error out of what they give. */
function scaleOf(spectrum: Spectrum, band: RecordBand, record: RecordDensity): number {
  const exact = bandNoise(spectrum, { ...band, fromHz: record.hz[0] as number }).power;
  return Math.sqrt(exact / (recordPower(record) - record.slowPower));
}

/** 1 − (sin πx/(πx))²: what is left of a component of x turns a record once the record's mean is gone. */
function meanRemoved(turns: number): number {
  if (turns === Number.POSITIVE_INFINITY) return 1;
  const angle = Math.PI * turns;
  if (angle < 1e-2) return (angle * angle) / 3;
  return 1 - (Math.sin(angle) / angle) ** 2;
}

const routes: Readonly<Record<RecordRange["route"], string>> = Object.freeze({
  "independent samples": "exact range of independent samples",
  "few samples": "range of correlated samples, drawn",
  "narrow band": "envelopes of a narrow band, drawn",
  "up-crossings": "up-crossings of Gaussian noise",
});

function inWords({ route }: RecordRange, { recordSeconds, sampleRateHz, records }: Recorder, samples: number): string {
  const taken = sampleRateHz === undefined ? "a continuous trace" : `${samples} samples at ${sampleRateHz} Hz`;
  const of = records === 1 ? "one record" : `the largest of ${records} records`;
  return `${routes[route]}, ${of} of ${recordSeconds} s, ${taken}`;
}
