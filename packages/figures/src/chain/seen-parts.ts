import {
  bandNoise,
  OutOfDomainError,
  type Sensitivity,
  type Spectrum,
  scaleSpectrum,
  sumSpectra,
  toneSkirt,
  type Weighting,
  writeQuantity,
} from "@quietband/core";
import type { InputLine } from "./reference-input.js";

/** One part of the input and the noise it brings in. */
export interface ReferencePart {
  readonly name: string;
  /** V RMS of the input in it. */
  readonly inputRms: number;
  /** V RMS of noise from it. */
  readonly rms: number;
}

/** One part of the input and the spectrum of the noise it brings in. */
export interface SeenPart {
  readonly name: string;
  readonly inputRms: number;
  readonly spectrum: Spectrum;
  readonly together: boolean;
}

/** How the noise of a reference is seen: what divides, and by how much. */
export interface SeenThrough {
  readonly mean: number;
  readonly lines: readonly InputLine[];
  readonly referenceVolts: number;
  /** Hz; half of a line's frequency at most where it is the default. */
  readonly leaveOutHz: (lineHz: number) => number;
}

export function seenParts(base: Spectrum, { mean, lines, referenceVolts, leaveOutHz }: SeenThrough): SeenPart[] {
  const parts: SeenPart[] = [];
  if (mean !== 0)
    parts.push({
      name: "dc",
      inputRms: Math.abs(mean),
      spectrum: scaleSpectrum(base, mean / referenceVolts),
      together: false,
    });
  for (const { hz, amplitude, together = false } of lines)
    parts.push({
      name: together
        ? `harmonics near ${writeQuantity(hz, "Hz", { digits: 2 })}`
        : writeQuantity(hz, "Hz", { digits: 4 }),
      inputRms: amplitude * Math.SQRT1_2,
      spectrum: toneSkirt(base, { toneHz: hz, amplitude, reference: referenceVolts, leaveOutHz: leaveOutHz(hz) }),
      together,
    });
  return parts;
}

/** A line as a sampler sees it: at its alias in 0 .. half the rate. */
export function aliasOf(line: InputLine, rate: number): InputLine {
  const hz = Math.abs(line.hz - rate * Math.round(line.hz / rate));
  const tolerance = 1e-9 * rate;
  if (hz > tolerance && hz <= 0.5 * rate + tolerance) return { ...line, hz };
  throw new OutOfDomainError(
    `A line at ${line.hz} Hz is sampled at ${rate} Hz at one and the same phase, which no frequency describes; give the input as samples.`,
  );
}

/** What a group of harmonics that stand together may be off by, relative to its power: their spacing is 0.3 in ln f. */
export const groupError = 0.02;

/** How many parts are named; the rest of them is put together. */
const mostNamed = 9;

export interface SeenTotal {
  readonly rms: number;
  readonly numericalError: number;
  readonly standardUncertainty?: number;
  readonly parts: readonly ReferencePart[];
}

/** Powers add; uncertainties add too, since all parts rest on one curve. */
export function seenTotal(
  seen: readonly SeenPart[],
  band: { readonly fromHz: number; readonly toHz: number; readonly weighting: Weighting | undefined },
  relativeErrorOfGroups: number,
): SeenTotal {
  const measured = seen.map((part) => ({ ...part, found: bandNoise(part.spectrum, band) }));
  let power = 0;
  let error = 0;
  let uncertain = 0;
  for (const { found, together } of measured) {
    power += found.power;
    error +=
      found.power * (2 * found.numericalError + (together ? relativeErrorOfGroups : 0) + seen.length * Number.EPSILON);
    uncertain += found.power * (found.standardUncertainty ?? 0);
  }
  const known = power > 0 && measured.some(({ found }) => found.standardUncertainty !== undefined);
  return {
    rms: Math.sqrt(power),
    numericalError: power === 0 ? 0 : (0.5 * error) / power + Number.EPSILON,
    ...(known && { standardUncertainty: uncertain / power }),
    parts: Object.freeze(
      named(measured.map(({ name, inputRms, found }) => Object.freeze({ name, inputRms, rms: found.rms }))),
    ),
  };
}

/** The largest parts by name, the others together. */
function named(parts: readonly ReferencePart[]): ReferencePart[] {
  if (parts.length <= mostNamed) return [...parts];
  const largest = new Set(parts.toSorted((one, other) => other.inputRms - one.inputRms).slice(0, mostNamed - 1));
  const others = parts.filter((part) => !largest.has(part));
  const together = (key: "rms" | "inputRms"): number => Math.hypot(...others.map((part) => part[key]));
  return [
    ...parts.filter((part) => largest.has(part)),
    Object.freeze({ name: `${others.length} others`, inputRms: together("inputRms"), rms: together("rms") }),
  ];
}

/** Beyond this number of parts a spectrum does without their uncertainties, which the result states all the same. */
const mostCarried = 3;

/** All parts as one spectrum. Each answers to the same errors of the reference's curve, group by group. */
export function oneSpectrum(seen: readonly SeenPart[], base: Spectrum): Spectrum {
  const spectra = seen.map(({ spectrum }) => spectrum);
  const { sensitivities: _, ...sum } = sumSpectra(...spectra);
  const groups = base.sensitivities;
  if (groups === undefined || spectra.length > mostCarried) return Object.freeze(sum);
  return Object.freeze({
    ...sum,
    sensitivities: Object.freeze(groups.map((group, index) => sharedGroup(group, index, spectra))),
  });
}

function sharedGroup(group: Sensitivity, index: number, spectra: readonly Spectrum[]): Sensitivity {
  const own = spectra.map((spectrum) => spectrum.sensitivities?.[index]);
  return Object.freeze({
    ...group,
    straight: false,
    knots: Object.freeze([...new Set(own.flatMap((each) => [...(each?.knots ?? [])]))].toSorted((a, b) => a - b)),
    gradientAt(hz: number, visit: (parameter: number, slope: number) => void): void {
      const densities = spectra.map((spectrum) => spectrum.powerDensityAt(hz));
      const total = densities.reduce((sum, density) => sum + density, 0);
      if (total === 0) return;
      for (const [part, sensitivity] of own.entries()) {
        const share = (densities[part] as number) / total;
        if (share > 0) sensitivity?.gradientAt(hz, (parameter, slope) => visit(parameter, slope * share));
      }
    },
  });
}
