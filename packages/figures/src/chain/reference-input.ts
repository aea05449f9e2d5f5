import { OutOfDomainError } from "@quietband/core";
import { refuseUnknownKeys, requireFinite, requirePositive, shown } from "../convert/domain.js";

/** What stands at a converter's input, in the unit of its reference. */
export type ReferenceInput =
  | { readonly kind: "dc"; readonly volts: number }
  | {
      readonly kind: "sine" | "square" | "triangle";
      /** Peak value. */
      readonly amplitude: number;
      readonly frequencyHz: number;
      /** Its mean; 0 unless given. */
      readonly offset?: number | undefined;
    }
  | {
      readonly kind: "samples";
      /** One record; it is taken to repeat. */
      readonly values: ArrayLike<number>;
      /** Rate of the samples, Hz; without it only the RMS counts. */
      readonly sampleRateHz?: number | undefined;
    };

/** A line of the input's spectrum. */
export interface InputLine {
  readonly hz: number;
  /** Peak amplitude. */
  readonly amplitude: number;
  /** Stands for many harmonics that lie close on the scale of the spectrum. */
  readonly together?: boolean;
}

/** An input taken apart: its mean and its lines; without lines where they are not known. */
export interface InputParts {
  readonly mean: number;
  /** RMS about the mean. */
  readonly alternatingRms: number;
  readonly lines: readonly InputLine[] | undefined;
}

/** Harmonics of a square or a triangle that stand alone; those above stand together in groups. */
const aloneHarmonics = 32;
const groupRatio = Math.exp(0.3);
const lastHarmonic = 2 ** 17;

/** Longest record whose lines are found. */
export const longestInput = 4096;

/** Share of the power below which a line of a record is rounding. */
const faintest = 1e-20;

export function inputParts(input: ReferenceInput): InputParts {
  if (input.kind === "dc") {
    refuseUnknownKeys("A dc input", ["kind", "volts"], input);
    const mean = requireFinite("volts", input.volts, "V");
    return { mean, alternatingRms: 0, lines: [] };
  }
  if (input.kind === "samples") return partsOfSamples(input);
  const shape = shapes[input.kind] as Shape | undefined;
  if (shape === undefined)
    throw new OutOfDomainError(
      `The kind of an input must be dc, sine, square, triangle or samples; got ${shown(input.kind)}.`,
    );
  refuseUnknownKeys(`A ${input.kind} input`, ["kind", "amplitude", "frequencyHz", "offset"], input);
  const { frequencyHz, offset = 0 } = input;
  const amplitude = requireFinite("amplitude", input.amplitude, "V");
  requirePositive("frequencyHz", frequencyHz, "Hz");
  requireFinite("offset", offset, "V");
  const lines =
    amplitude === 0
      ? []
      : harmonicsOf(shape).map(({ order, share, together }) => ({
          hz: frequencyHz * order,
          amplitude: Math.abs(amplitude) * Math.sqrt(2 * share * shape.power),
          ...(together && { together }),
        }));
  return { mean: offset, alternatingRms: Math.abs(amplitude) * Math.sqrt(shape.power), lines };
}

interface Shape {
  /** Mean square of the waveform with peak value 1. */
  readonly power: number;
  /** Share of the power in the harmonic of an odd order n is first/n^falls; 0: there is one harmonic. */
  readonly falls: number;
  readonly first: number;
}

const shapes: Readonly<Record<"sine" | "square" | "triangle", Shape>> = Object.freeze({
  sine: { power: 1 / 2, falls: 0, first: 1 },
  square: { power: 1, falls: 2, first: 8 / Math.PI ** 2 },
  triangle: { power: 1 / 3, falls: 4, first: 96 / Math.PI ** 4 },
});

interface Harmonic {
  readonly order: number;
  readonly share: number;
  readonly together: boolean;
}

/** The first odd harmonics alone; the rest in groups of equal width in ln f, whose shares make the total 1. */
function harmonicsOf({ falls, first }: Shape): Harmonic[] {
  if (falls === 0) return [{ order: 1, share: 1, together: false }];
  const harmonics: Harmonic[] = [];
  let left = 1;
  let order = 1;
  for (; harmonics.length < aloneHarmonics; order += 2) {
    const share = first * order ** -falls;
    harmonics.push({ order, share, together: false });
    left -= share;
  }
  while (order < lastHarmonic) {
    const end = order * groupRatio;
    let share = 0;
    let weighted = 0;
    for (; order < end; order += 2) {
      const own = first * order ** -falls;
      share += own;
      weighted += own * Math.log(order);
    }
    harmonics.push({ order: Math.exp(weighted / share), share, together: true });
    left -= share;
  }
  if (left > 0) harmonics.push({ order, share: left, together: true });
  return harmonics;
}

function partsOfSamples(input: Extract<ReferenceInput, { readonly kind: "samples" }>): InputParts {
  refuseUnknownKeys("A samples input", ["kind", "values", "sampleRateHz"], input);
  const { sampleRateHz } = input;
  const values = Float64Array.from(input.values);
  const count = values.length;
  if (count === 0) throw new OutOfDomainError("An input of samples needs at least one value; got none.");
  for (const [index, value] of values.entries()) requireFinite(`Sample ${index} of the input`, value, "V");
  const mean = values.reduce((sum, value) => sum + value, 0) / count;
  const square = values.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  const alternatingRms = Math.sqrt(square / count);
  if (sampleRateHz === undefined) return { mean, alternatingRms, lines: undefined };
  requirePositive("sampleRateHz", sampleRateHz, "Hz");
  if (count > longestInput)
    throw new OutOfDomainError(
      `The lines of an input are found for records of at most ${longestInput} samples; got ${count}; give one period of it, or leave its sampleRateHz out for the RMS rule alone.`,
    );
  return { mean, alternatingRms, lines: linesOf(values, mean, sampleRateHz) };
}

/** The discrete Fourier series of one record, by its definition. */
function linesOf(values: Float64Array, mean: number, rate: number): InputLine[] {
  const count = values.length;
  const cosines = Float64Array.from({ length: count }, (_, k) => Math.cos((2 * Math.PI * k) / count));
  const sines = Float64Array.from({ length: count }, (_, k) => Math.sin((2 * Math.PI * k) / count));
  const lines: InputLine[] = [];
  const power = values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / count;
  for (let line = 1; 2 * line <= count; line += 1) {
    let re = 0;
    let im = 0;
    for (let k = 0, turn = 0; k < count; k += 1, turn = (turn + line) % count) {
      re += ((values[k] as number) - mean) * (cosines[turn] as number);
      im += ((values[k] as number) - mean) * (sines[turn] as number);
    }
    // At half the rate a line has no image of its own: its mean square is the square of its one value.
    const amplitude = (Math.hypot(re, im) / count) * (2 * line === count ? Math.SQRT2 : 2);
    if (amplitude * amplitude > 2 * faintest * power) lines.push({ hz: (line * rate) / count, amplitude });
  }
  return lines;
}
