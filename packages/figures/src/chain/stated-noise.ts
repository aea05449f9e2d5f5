import { OutOfDomainError, writeQuantity } from "@quietband/core";
import { refuseUnknownKeys, requireNotNegative, requirePositive } from "../convert/domain.js";
import { factorOf, type PeakToPeakConvention } from "../convert/peak-to-peak.js";
import { rmsFromPeakToPeak } from "../convert/rms-from-peak-to-peak.js";

/** A source of which only one figure is known: an RMS value in a band, no spectrum. No weighting can act on it. */
export interface StatedNoise {
  readonly kind: "stated";
  readonly name: string;
  readonly unit: string;
  /** In `unit`. */
  readonly rms: number;
  /** The band it is stated for, Hz, where known. */
  readonly band?: readonly [number, number];
  /** Relative standard uncertainty of the rms (k = 1), where known. */
  readonly standardUncertainty?: number;
  readonly assumptions: readonly string[];
}

/** What {@link statedNoise} takes. */
export interface StatedNoiseOptions {
  /** RMS value, in `unit`, positive. Give this or peakToPeak. */
  readonly rms?: number | undefined;
  /** Peak-to-peak value, in `unit`, positive. Give this or rms. */
  readonly peakToPeak?: number | undefined;
  /** How the peak-to-peak value was made; the factor 6.6 unless given. */
  readonly convention?: PeakToPeakConvention | undefined;
  /** The band it is stated for, Hz. */
  readonly fromHz?: number | undefined;
  readonly toHz?: number | undefined;
  /** Relative, k = 1. */
  readonly standardUncertainty?: number | undefined;
  /** "V" unless given. */
  readonly unit?: string | undefined;
  readonly name?: string | undefined;
}

/**
 * A stated RMS or peak-to-peak value as a source: rms = peak-to-peak/factor. It enters a budget as it is, whatever the
 * budget's band and filters; the budget says where its band differs.
 *
 * @throws OutOfDomainError for values that are not positive, both or neither of rms and peakToPeak, one band edge alone.
 *
 * @example
 * ```ts
 * import { statedNoise } from "@quietband/figures";
 * statedNoise({ peakToPeak: 7.5e-6, fromHz: 0.1, toHz: 10 }).rms; // → 1.1364e-6
 * ```
 */
export function statedNoise(options: StatedNoiseOptions): StatedNoise {
  const known = ["rms", "peakToPeak", "convention", "fromHz", "toHz", "standardUncertainty", "unit", "name"];
  refuseUnknownKeys("statedNoise", known, options);
  const { rms, peakToPeak, convention, standardUncertainty, unit = "V", name = "stated noise" } = options;
  if ((rms === undefined) === (peakToPeak === undefined))
    throw new OutOfDomainError("A stated noise needs rms or peakToPeak, one of them.");
  if (rms !== undefined && convention !== undefined)
    throw new OutOfDomainError("A convention belongs to a peak-to-peak value; a stated rms needs none.");
  if (standardUncertainty !== undefined) requireNotNegative("standardUncertainty", standardUncertainty);
  const band = statedBand(options);
  const value =
    peakToPeak === undefined
      ? requirePositive("rms", rms as number, unit)
      : rmsFromPeakToPeak(requirePositive("peakToPeak", peakToPeak, unit), convention);
  const where = band === undefined ? "" : `, ${bandWords(band)}`;
  const made =
    peakToPeak === undefined
      ? `Stated as ${writeQuantity(value, unit)} RMS${where}`
      : `Stated as ${writeQuantity(peakToPeak, unit)} peak-to-peak${where}; divided by ${Number(factorOf("statedNoise", convention ?? {}).toPrecision(4))}`;
  return Object.freeze({
    kind: "stated",
    name,
    unit,
    rms: value,
    ...(band !== undefined && { band }),
    ...(standardUncertainty !== undefined && { standardUncertainty }),
    assumptions: Object.freeze([`${made}; taken as it is, filters do not act on it.`]),
  });
}

/** "0.1 Hz to 10 Hz" */
export function bandWords([fromHz, toHz]: readonly [number, number]): string {
  const upper = toHz === Number.POSITIVE_INFINITY ? "∞" : writeQuantity(toHz, "Hz");
  return `${writeQuantity(fromHz, "Hz")} to ${upper}`;
}

function statedBand({ fromHz, toHz }: StatedNoiseOptions): readonly [number, number] | undefined {
  if (fromHz === undefined && toHz === undefined) return undefined;
  if (fromHz !== undefined && toHz !== undefined && fromHz >= 0 && toHz > fromHz)
    return Object.freeze([fromHz, toHz] as const);
  throw new OutOfDomainError(
    `A stated band needs fromHz and toHz with 0 ≤ fromHz < toHz, in Hz; got ${fromHz} and ${toHz}.`,
  );
}
