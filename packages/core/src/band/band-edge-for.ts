import { requirePositive } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { completeOptions } from "../ground/options.js";
import { bracketedRoot } from "../numerics/bracketed-root.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";
import { bandNoiseTolerance, requireReached } from "./band-noise.js";
import { bandPower } from "./band-power.js";
import { requireConvergent } from "./convergence.js";

/** What {@link bandEdgeFor} takes. */
export interface BandEdgeOptions {
  /** The RMS to reach, in the spectrum's unit. */
  readonly rms: number;
  /** Fixed lower edge, Hz: the upper edge is sought (or the cutoff, with `family`). */
  readonly fromHz?: number | undefined;
  /** Fixed upper edge, Hz: the lower edge is sought (or the cutoff, with `family`). */
  readonly toHz?: number | undefined;
  /** What the noise passes besides. */
  readonly weighting?: Weighting | undefined;
  /** A family of filters by cutoff: the cutoff is sought while both edges stay. */
  readonly family?: ((cutoffHz: number) => Weighting) | undefined;
}

/** The edge or cutoff that gives an RMS. */
export interface BandEdge {
  readonly hz: number;
  readonly found: "toHz" | "fromHz" | "cutoffHz";
  /** The RMS there, in the spectrum's unit: it differs from the one asked for by rounding only. */
  readonly rms: number;
}

/** Hz: where a search that meets no end of the support gives up. */
const searchSpan = Object.freeze([1e-15, 1e18] as const);

/**
 * The band edge, or the cutoff of a family of filters, at which the band noise reaches a given RMS.
 *
 * @param spectrum - one-sided power density, unit²/Hz.
 * @param options - `rms` and one of: `fromHz` (seeks the upper edge), `toHz` (seeks the lower edge), or both with `family`
 *   (seeks the cutoff).
 * @throws OutOfDomainError when no edge gives that RMS, with the RMS that the ends of the search give.
 *
 * @example
 * ```ts
 * import { bandEdgeFor, whiteFlicker } from "@quietband/core";
 * // white noise of 10 nV/√Hz reaches 1 µV in 10 kHz
 * bandEdgeFor(whiteFlicker({ floor: 10e-9, cornerHz: 0 }), { rms: 1e-6, fromHz: 0 }).hz; // → 10000
 * ```
 */
export function bandEdgeFor(spectrum: Spectrum, options: BandEdgeOptions): BandEdge {
  const { rms, fromHz, toHz, weighting, family } = completeOptions<BandEdgeOptions>(
    "bandEdgeFor",
    { rms: Number.NaN, fromHz: undefined, toHz: undefined, weighting: undefined, family: undefined },
    options,
  );
  requirePositive("rms", rms, spectrum.unit);
  const target = rms * rms;
  const powerOver = (low: number, high: number, through: Weighting | undefined): number => {
    requireConvergent(spectrum, through, low, high);
    return requireReached(bandPower(spectrum, through, [low, high], bandNoiseTolerance), spectrum.unit).power;
  };
  const seek = (
    found: BandEdge["found"],
    [low, high]: readonly [number, number],
    powerAt: (hz: number) => number,
  ): BandEdge => {
    const hz = crossing(powerAt, target, [low, high]);
    if (hz !== undefined) return Object.freeze({ hz, found, rms: Math.sqrt(powerAt(hz)) });
    const [atLow, atHigh] = [Math.sqrt(powerAt(low)), Math.sqrt(powerAt(high))];
    throw new OutOfDomainError(
      `No ${found} gives ${rms} ${spectrum.unit} RMS: at ${low} Hz it is ${atLow} ${spectrum.unit}, at ${high} Hz ${atHigh} ${spectrum.unit}; ask for an RMS between them or change the band.`,
    );
  };
  const [first, last] = [Math.max(spectrum.support[0], searchSpan[0]), Math.min(spectrum.support[1], searchSpan[1])];
  if (family !== undefined) {
    if (fromHz === undefined || toHz === undefined)
      throw new OutOfDomainError("bandEdgeFor with a family of filters needs both band edges, fromHz and toHz.");
    return seek("cutoffHz", [first, last], (cutoffHz) => powerOver(fromHz, toHz, family(cutoffHz)));
  }
  if ((fromHz === undefined) === (toHz === undefined))
    throw new OutOfDomainError(
      "bandEdgeFor needs one fixed edge: fromHz, to seek the upper one, or toHz, to seek the lower one.",
    );
  if (fromHz !== undefined)
    return seek("toHz", [Math.max(fromHz * (1 + 1e-9), first), last], (hz) => powerOver(fromHz, hz, weighting));
  const high = toHz as number;
  return seek("fromHz", [first, Math.min(high, last) * (1 - 1e-9)], (hz) => powerOver(hz, high, weighting));
}

/** Where powerAt, monotonic in hz, crosses the target: decades first, then a bracketed root of the logarithm in ln f. */
function crossing(
  powerAt: (hz: number) => number,
  target: number,
  [low, high]: readonly [number, number],
): number | undefined {
  const excess = (hz: number): number => Math.log(Math.max(powerAt(hz), Number.MIN_VALUE) / target);
  let a = low;
  let atA = excess(a);
  while (a < high) {
    const b = Math.min(a * 10, high);
    const atB = excess(b);
    if (atA === 0) return a;
    if (atA > 0 !== atB > 0) {
      const root = bracketedRoot((x) => excess(a * Math.exp(x)), [0, Math.log(b / a)], 1e-15);
      // rounding at an end of the decade can take the sign change away: then the end itself is the place
      if (root === undefined) return Math.abs(atA) < Math.abs(atB) ? a : b;
      return a * Math.exp(root.x);
    }
    a = b;
    atA = atB;
  }
  return undefined;
}
