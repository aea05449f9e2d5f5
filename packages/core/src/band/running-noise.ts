import { requireBand } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { completeOptions } from "../ground/options.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";
import { bandNoiseTolerance, requireReached } from "./band-noise.js";
import { bandPower } from "./band-power.js";
import { requireConvergent } from "./convergence.js";
import { type RoutedPower, relativeErrorOfRms } from "./routed-power.js";

/** What {@link runningNoise} takes: one fixed edge, and the edges it runs over. */
export interface RunningNoiseOptions {
  /** Fixed lower edge, Hz: the result runs with the upper edge. Give this or toHz. */
  readonly fromHz?: number | undefined;
  /** Fixed upper edge, Hz: the result runs with the lower edge ("watching longer"). Give this or fromHz. */
  readonly toHz?: number | undefined;
  /** The moving edges, Hz, ascending. */
  readonly edgesHz: readonly number[];
  readonly weighting?: Weighting | undefined;
}

/** RMS against a moving band edge. */
export interface RunningNoise {
  readonly unit: string;
  /** Which edge moves. */
  readonly moving: "toHz" | "fromHz";
  readonly edgesHz: readonly number[];
  /** RMS of the band that ends (or begins) at each edge, in `unit`. */
  readonly rms: readonly number[];
  /** Bounds on the relative error of each rms. */
  readonly numericalError: readonly number[];
}

/**
 * RMS of a band against its upper edge, or against its lower edge, in one pass: each stretch between neighbouring edges is
 * integrated once and the powers add up.
 *
 * @param spectrum - one-sided power density, unit²/Hz.
 * @param options - the fixed edge, the moving edges, the weighting.
 * @throws OutOfDomainError for edges that do not ascend or cross the fixed one; DivergentIntegralError.
 *
 * @example
 * ```ts
 * import { powerLaws, runningNoise } from "@quietband/core";
 * // 1/f noise has the same power in every decade
 * const flicker = powerLaws([{ coefficient: 1e-12, exponent: 1 }]);
 * const { rms } = runningNoise(flicker, { fromHz: 0.1, edgesHz: [1, 10] });
 * (rms[1] ?? 0) / (rms[0] ?? 1); // → 1.41421
 * ```
 */
export function runningNoise(spectrum: Spectrum, options: RunningNoiseOptions): RunningNoise {
  const { fromHz, toHz, edgesHz, weighting } = completeOptions<RunningNoiseOptions>(
    "runningNoise",
    { fromHz: undefined, toHz: undefined, edgesHz: [], weighting: undefined },
    options,
  );
  if ((fromHz === undefined) === (toHz === undefined))
    throw new OutOfDomainError(
      "runningNoise needs one fixed edge: fromHz, to run with the upper edge, or toHz, to run with the lower one.",
    );
  if (edgesHz.length === 0) throw new OutOfDomainError("edgesHz must hold at least one frequency in Hz; got none.");
  for (const [index, edge] of edgesHz.entries())
    if (index > 0 && !(edge > (edgesHz[index - 1] as number)))
      throw new OutOfDomainError(
        `edgesHz must ascend; got ${edge} Hz after ${edgesHz[index - 1]} Hz at index ${index}.`,
      );
  const upward = fromHz !== undefined;
  const all = upward ? [fromHz, ...edgesHz] : [...edgesHz, toHz as number];
  const widest = [all[0] as number, all.at(-1) as number] as const;
  requireBand(widest[0], all[1] as number);
  requireBand(all.at(-2) as number, widest[1]);
  requireConvergent(spectrum, weighting, ...widest);
  const stretches = edgesHz.map((_, index) =>
    requireReached(
      bandPower(spectrum, weighting, [all[index] as number, all[index + 1] as number], bandNoiseTolerance),
      spectrum.unit,
    ),
  );
  const totals = upward ? running(stretches) : running(stretches.toReversed()).toReversed();
  return Object.freeze({
    unit: spectrum.unit,
    moving: upward ? "toHz" : "fromHz",
    edgesHz: Object.freeze([...edgesHz]),
    rms: Object.freeze(totals.map((total) => Math.sqrt(total.power))),
    numericalError: Object.freeze(totals.map(relativeErrorOfRms)),
  });
}

function running(stretches: readonly RoutedPower[]): RoutedPower[] {
  let power = 0;
  let error = 0;
  return stretches.map((stretch) => {
    power += stretch.power;
    error += stretch.error + Number.EPSILON * power;
    return { ...stretch, power, error };
  });
}
