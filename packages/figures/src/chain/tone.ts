import { OutOfDomainError, writeQuantity } from "@quietband/core";
import { refuseUnknownKeys, requirePositive, shown } from "../convert/domain.js";

/** A line among the noise: hum, a clock, ripple. It adds in power to an RMS and in amplitude to a peak-to-peak value. */
export interface Tone {
  readonly kind: "tone";
  readonly name: string;
  readonly unit: string;
  readonly frequencyHz: number;
  /** In `unit`. */
  readonly rms: number;
  /** In `unit`. */
  readonly peakToPeak: number;
  readonly assumptions: readonly string[];
}

/** What {@link tone} takes. */
export interface ToneOptions {
  /** Hz, positive. */
  readonly frequencyHz: number;
  /** Peak amplitude of a sine, in `unit`, positive. Give this or peakToPeak. */
  readonly amplitude?: number | undefined;
  /** Peak-to-peak value of a ripple, in `unit`, positive. Give this or amplitude. */
  readonly peakToPeak?: number | undefined;
  /** Shape of the ripple: decides its RMS; 'sine' unless given. */
  readonly shape?: RippleShape | undefined;
  /** "V" unless given. */
  readonly unit?: string | undefined;
  readonly name?: string | undefined;
}

/** Shapes a ripple may have. */
export type RippleShape = "sine" | "triangle" | "square";

/** RMS / peak-to-peak of each shape. */
const rmsOfSwing: Readonly<Record<RippleShape, number>> = Object.freeze({
  sine: Math.SQRT1_2 / 2,
  triangle: 1 / (2 * Math.sqrt(3)),
  square: 1 / 2,
});

/**
 * A tone or a ripple as a source: rms = amplitude/√2 for a sine; peak-to-peak/(2√3) for a triangle or sawtooth,
 * peak-to-peak/2 for a square wave. A weighting acts on it at its fundamental; harmonics of a ripple are taken to fare alike.
 *
 * @throws OutOfDomainError for values that are not positive, both or neither of amplitude and peakToPeak, or a shape beside
 *   an amplitude.
 *
 * @example
 * ```ts
 * import { tone } from "@quietband/figures";
 * tone({ frequencyHz: 50, amplitude: 2e-6 }).rms; // → 1.4142e-6
 * tone({ frequencyHz: 100e3, peakToPeak: 6e-3, shape: "triangle" }).rms; // → 1.7321e-3
 * ```
 */
export function tone(options: ToneOptions): Tone {
  refuseUnknownKeys("tone", ["frequencyHz", "amplitude", "peakToPeak", "shape", "unit", "name"], options);
  const { frequencyHz, amplitude, peakToPeak, shape = "sine", unit = "V" } = options;
  requirePositive("frequencyHz", frequencyHz, "Hz");
  if ((amplitude === undefined) === (peakToPeak === undefined))
    throw new OutOfDomainError("A tone needs its peak amplitude or its peak-to-peak value, one of them.");
  if (amplitude !== undefined && shape !== "sine")
    throw new OutOfDomainError(`A tone with an amplitude is a sine; give the peak-to-peak value of a ${shape}.`);
  const ratio = (rmsOfSwing as Readonly<Record<string, number | undefined>>)[shape];
  if (ratio === undefined)
    throw new OutOfDomainError(`shape must be one of ${Object.keys(rmsOfSwing).join(", ")}; got ${shown(shape)}.`);
  const swing =
    peakToPeak === undefined
      ? 2 * requirePositive("amplitude", amplitude as number, unit)
      : requirePositive("peakToPeak", peakToPeak, unit);
  const at = writeQuantity(frequencyHz, "Hz");
  return Object.freeze({
    kind: "tone",
    name: options.name ?? `tone at ${at}`,
    unit,
    frequencyHz,
    rms: swing * ratio,
    peakToPeak: swing,
    assumptions: Object.freeze([
      `A ${shape} of ${writeQuantity(swing, unit)} peak-to-peak at ${at}; weightings act at that frequency.`,
    ]),
  });
}
