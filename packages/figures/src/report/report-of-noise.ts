import type { BandNoise } from "@quietband/core";
import type { ConverterFigures } from "../convert/converter-figures.js";
import type { ExpectedPeakToPeak } from "../convert/expected-peak-to-peak.js";
import { peakToPeak } from "../convert/peak-to-peak.js";
import type { ReportEntry, ReportSection } from "./report.js";

/** The noise of a band as a report quotes it. */
export interface ReportedNoise {
  readonly noise: BandNoise;
  /** What stands in the heading: "Tilt channel". */
  readonly label?: string | undefined;
  /** What the spectrum is: "straight lines through the points". */
  readonly basis?: string | undefined;
  /** Peak-to-peak / RMS of the convention; 6.6 unless given. */
  readonly factor?: number | undefined;
  /** What a record will show, beside the convention. */
  readonly record?: ExpectedPeakToPeak | undefined;
  readonly converter?: ConverterFigures | undefined;
}

export const percent = (share: number, digits = 2): string => `${Number((100 * share).toPrecision(digits))} %`;

/** RMS, both kinds of peak-to-peak, and what a converter makes of it. */
export function reportOfNoise({ noise, label, basis, factor, record, converter }: ReportedNoise): ReportSection {
  const { rms, unit, fromHz, toHz, standardUncertainty, outsidePoints } = noise;
  const convention = peakToPeak(rms, { factor });
  const outside = outsidePoints.below + outsidePoints.above;
  const band = `${fromHz} Hz to ${toHz === Number.POSITIVE_INFINITY ? "∞" : `${toHz} Hz`}`;
  const known =
    standardUncertainty === undefined ? "no uncertainty stated" : `± ${percent(standardUncertainty)} (k = 1)`;
  const entries: ReportEntry[] = [
    {
      name: "RMS",
      value: rms,
      unit,
      basis: [band, basis, known, `arithmetic ± ${noise.numericalError.toExponential(0)}`].filter(Boolean).join(", "),
      ...(outside > 0 && { assumption: `${percent(outside)} of the power lies beyond the points` }),
    },
    { name: "peak-to-peak by convention", value: convention.peakToPeak, unit, basis: convention.convention },
  ];
  if (record !== undefined)
    entries.push({
      name: "peak-to-peak of a record",
      value: record.mean,
      unit,
      basis: `${record.basis}; ± ${percent(record.relativeSpread)} from record to record, ${record.multipleOfRms.toFixed(2)} × RMS`,
      assumption: "Gaussian, stationary noise",
    });
  return {
    heading: label ?? "Noise",
    entries: [...entries, ...converterEntries(converter)],
    notes: [...noise.notes, ...(record?.notes ?? [])],
  };
}

function converterEntries(converter: ConverterFigures | undefined): ReportEntry[] {
  if (converter === undefined) return [];
  const { rmsInLsb, lsb, ppmOfReference, noiseFreeBits, effectiveResolutionBits, snrDb, factor } = converter;
  const range = `range of ${converter.rangePeakToPeak} V`;
  return [
    ...(rmsInLsb === undefined ? [] : [{ name: "in codes", value: rmsInLsb, unit: "LSB", basis: `RMS over ${lsb} V` }]),
    ...(ppmOfReference === undefined
      ? []
      : [{ name: "of the reference", value: ppmOfReference, unit: "ppm", basis: "RMS over the reference voltage" }]),
    { name: "noise-free bits", value: noiseFreeBits, unit: "bit", basis: `log2(${range} / (${factor} × RMS))` },
    { name: "effective resolution", value: effectiveResolutionBits, unit: "bit", basis: `log2(${range} / RMS)` },
    {
      name: "SNR",
      value: snrDb,
      unit: "dB",
      basis: `RMS of the signal, ${converter.signalRms} V, over RMS of the noise`,
    },
  ];
}
