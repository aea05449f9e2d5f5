import { type Curve, OutOfDomainError, type Spectrum } from "@quietband/core";
import { refuseUnknownKeys, requirePositive } from "../convert/domain.js";

/** What {@link densityPlot} draws; at least one curve or model. */
export interface DensityPlotOptions {
  /** Points, with bars of one standard uncertainty; those left out of the fit are hollow. */
  readonly curves?: readonly Curve[] | undefined;
  /** Lines: dotted where they go beyond the points that support them. */
  readonly models?: readonly DensityModel[] | undefined;
  /** Band to shade, Hz; 0 and Infinity reach to the picture's edge. */
  readonly band?: { readonly fromHz: number; readonly toHz: number } | undefined;
  /** White floor to mark, unit/√Hz. */
  readonly floor?: number | undefined;
  /** Corner to mark, Hz. */
  readonly cornerHz?: number | undefined;
  /** An interval of the model, e.g. where it lies with 95 % coverage. */
  readonly interval?: DensityInterval | undefined;
  /** Frequencies, Hz, of points suspected to be misread: they are circled. */
  readonly suspected?: readonly number[] | undefined;
  /** Ends of the frequency axis, Hz; by default what holds points, band and corner. */
  readonly fromHz?: number | undefined;
  readonly toHz?: number | undefined;
  readonly title?: string | undefined;
  readonly note?: string | undefined;
  /** Pixels, 400 to 4000; 760 unless given. */
  readonly width?: number | undefined;
  /** Pixels, 280 to 4000; 480 unless given. */
  readonly height?: number | undefined;
}

/** A spectrum to draw and its name in the key. */
export interface DensityModel {
  readonly spectrum: Spectrum;
  readonly label: string;
}

/** Lower and upper density (unit/√Hz) over ascending frequencies (Hz); three arrays of one length. */
export interface DensityInterval {
  readonly frequencies: readonly number[];
  readonly lower: readonly number[];
  readonly upper: readonly number[];
  /** Name in the key: "95 % of the model". */
  readonly label: string;
}

const optionNames: readonly (keyof DensityPlotOptions)[] = [
  ...(["curves", "models", "band", "floor", "cornerHz", "interval", "suspected"] as const),
  ...(["fromHz", "toHz", "title", "note", "width", "height"] as const),
];

/** Refuses what cannot be drawn and returns the unit of the signal. */
export function checkDensityOptions(options: DensityPlotOptions): string {
  refuseUnknownKeys("densityPlot", optionNames, options);
  const { curves = [], models = [], band, floor, interval } = options;
  const units = new Set([...curves.map(({ unit }) => unit), ...models.map(({ spectrum }) => spectrum.unit)]);
  const [unit] = units;
  if (unit === undefined)
    throw new OutOfDomainError("densityPlot needs at least one curve or one model to draw; got none.");
  if (units.size > 1)
    throw new OutOfDomainError(
      `densityPlot draws one unit on one axis; got ${[...units].join(", ")}; make a plot for each unit.`,
    );
  if (band !== undefined && !(band.fromHz >= 0 && band.toHz > band.fromHz))
    throw new OutOfDomainError(
      `band must run from fromHz, 0 Hz or more, up to a higher toHz; got ${band.fromHz} Hz to ${band.toHz} Hz.`,
    );
  if (floor !== undefined) requirePositive("floor", floor, `${unit}/√Hz`);
  for (const name of ["cornerHz", "fromHz", "toHz"] as const)
    if (options[name] !== undefined) requirePositive(name, options[name], "Hz");
  if (options.fromHz !== undefined && options.toHz !== undefined && options.fromHz >= options.toHz)
    throw new OutOfDomainError(
      `The frequency axis must run from fromHz up to toHz; got ${options.fromHz} Hz to ${options.toHz} Hz.`,
    );
  if (interval !== undefined) checkInterval(interval);
  return unit;
}

function checkInterval({ frequencies, lower, upper }: DensityInterval): void {
  if (frequencies.length < 2 || lower.length !== frequencies.length || upper.length !== frequencies.length)
    throw new OutOfDomainError(
      `interval needs two or more frequencies and as many lower and upper densities; got ${frequencies.length}, ${lower.length} and ${upper.length}.`,
    );
  for (const [index, hz] of frequencies.entries()) {
    const low = lower[index] as number;
    const high = upper[index] as number;
    const ascending = index === 0 ? hz > 0 : hz > (frequencies[index - 1] as number);
    if (ascending && hz < Number.POSITIVE_INFINITY && low > 0 && high >= low && high < Number.POSITIVE_INFINITY)
      continue;
    throw new OutOfDomainError(
      `interval must hold ascending positive frequencies and 0 < lower ≤ upper; got ${low} to ${high} at ${hz} Hz (index ${index}).`,
    );
  }
}
