import { type BandNoise, writeQuantity } from "@quietband/core";
import { type ConverterFigures, converterFigures } from "../convert/converter-figures.js";
import { levelDbv } from "../convert/level-dbv.js";
import { type PeakToPeak, peakToPeak } from "../convert/peak-to-peak.js";
import type { OptionSpec, ParsedOptions } from "./command-options.js";
import { plainNumber, quantityOption } from "./typed-values.js";

/** Options of every command that quotes a noise. */
export const figureOptions: readonly OptionSpec[] = Object.freeze([
  { name: "factor", value: "N", help: "peak-to-peak / RMS; 6.6 by common practice" },
  { name: "range", value: "VOLTS", help: "range of the converter, largest minus smallest input, for bits and LSB" },
  { name: "bits", value: "N", help: "resolution of the converter" },
  { name: "reference", value: "VOLTS", help: "reference voltage, for ppm" },
]);

/** One figure to print: its name, its value, and what it rests on. */
export interface FigureLine {
  readonly name: string;
  readonly value: string;
  readonly basis: string;
}

/** Everything that is quoted of one band noise. */
export interface NoiseFigures {
  readonly peakToPeak: PeakToPeak;
  readonly levelDbv?: number;
  readonly ppmOfReference?: number;
  readonly converter?: ConverterFigures;
}

export function noiseFigures(noise: BandNoise, parsed: ParsedOptions): NoiseFigures {
  const reference = quantityOption(parsed, "reference", noise.unit);
  const range = quantityOption(parsed, "range", noise.unit);
  const bits = plainNumber(parsed, "bits");
  const factor = plainNumber(parsed, "factor");
  return {
    peakToPeak: peakToPeak(noise.rms, { factor }),
    ...(noise.unit === "V" && { levelDbv: levelDbv(noise.rms) }),
    ...(reference !== undefined && { ppmOfReference: (1e6 * noise.rms) / reference }),
    ...(range !== undefined && {
      converter: converterFigures({ rms: noise.rms, rangePeakToPeak: range, bits, referenceVolts: reference, factor }),
    }),
  };
}

/** The figures as lines, each with its unit and what it rests on. */
export function figureLines(noise: BandNoise, figures: NoiseFigures, basis: string): FigureLine[] {
  const lines: FigureLine[] = [
    { name: "RMS", value: short(noise.rms, noise.unit), basis: `${uncertaintyText(noise)}, ${basis}` },
    {
      name: "peak-to-peak",
      value: short(figures.peakToPeak.peakToPeak, noise.unit),
      basis: figures.peakToPeak.convention,
    },
  ];
  if (figures.levelDbv !== undefined)
    lines.push({ name: "level", value: `${signed(figures.levelDbv, 2)} dBV`, basis: "of the RMS" });
  if (figures.ppmOfReference !== undefined)
    lines.push({
      name: "of the reference",
      value: `${Number(figures.ppmOfReference.toPrecision(4))} ppm`,
      basis: "RMS / reference",
    });
  return [...lines, ...converterLines(figures.converter)];
}

function converterLines(converter: ConverterFigures | undefined): FigureLine[] {
  if (converter === undefined) return [];
  const range = `log2 of the range of ${writeQuantity(converter.rangePeakToPeak, "V")}`;
  const lines: FigureLine[] = [];
  if (converter.rmsInLsb !== undefined)
    lines.push({
      name: "in LSB",
      value: `${Number(converter.rmsInLsb.toPrecision(4))} LSB`,
      basis: `RMS, LSB of ${short(converter.lsb ?? 0, "V")}`,
    });
  lines.push(
    {
      name: "noise-free bits",
      value: `${converter.noiseFreeBits.toFixed(2)} bit`,
      basis: `${range} / (${converter.factor} × RMS)`,
    },
    {
      name: "effective resolution",
      value: `${converter.effectiveResolutionBits.toFixed(2)} bit`,
      basis: `${range} / RMS`,
    },
  );
  return lines;
}

function uncertaintyText({ standardUncertainty }: BandNoise): string {
  return standardUncertainty === undefined
    ? "no uncertainty stated"
    : `± ${(100 * standardUncertainty).toFixed(1)} % (k = 1)`;
}

export function short(value: number, unit: string): string {
  return writeQuantity(value, unit, { digits: 4 });
}

export function signed(value: number, decimals: number): string {
  return `${value < 0 ? "−" : value > 0 ? "+" : ""}${Math.abs(value).toFixed(decimals)}`;
}

/** Lines in three columns. */
export function inColumns(lines: readonly FigureLine[]): string[] {
  const [nameWidth, valueWidth] = [
    Math.max(...lines.map(({ name }) => name.length)),
    Math.max(...lines.map(({ value }) => value.length)),
  ];
  return lines.map(({ name, value, basis }) =>
    `  ${name.padEnd(nameWidth)}  ${value.padStart(valueWidth)}   ${basis}`.trimEnd(),
  );
}
