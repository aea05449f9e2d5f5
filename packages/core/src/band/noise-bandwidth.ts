import { OutOfDomainError } from "../ground/errors.js";
import { refuseUnknownKeys } from "../ground/options.js";
import { powerLaws } from "../spectrum/power-laws.js";
import type { Weighting } from "../weighting/weighting.js";
import { bandNoiseTolerance, requireReached } from "./band-noise.js";
import { bandPower } from "./band-power.js";
import { requireConvergent } from "./convergence.js";
import { peakGain } from "./peak-gain.js";

/** Equivalent noise bandwidth of a weighting. */
export interface NoiseBandwidth {
  /** Hz. */
  readonly hz: number;
  /** Which gain the equivalent brick wall has: the one at 0 Hz or the largest. */
  readonly relativeTo: "dc" | "peak";
  /** Bound on the relative error of `hz`. */
  readonly numericalError: number;
}

/**
 * Equivalent noise bandwidth, ∫ |H(f)|² df / |H|²_reference: the width of the brick wall that passes the same white power.
 *
 * A gain that repeats (a digital filter) integrates over 0 to half its rate.
 *
 * @param weighting - any weighting whose integral is finite.
 * @param options - `relativeTo`: the gain at 0 Hz ('dc', the default where it is not zero) or the largest gain ('peak').
 *   A Chebyshev filter of even order has its dc gain a ripple below its peak: say which you mean.
 * @throws DivergentIntegralError where white noise gains power without limit (a high-pass); OutOfDomainError for 'dc' of a
 *   weighting that blocks dc.
 *
 * @example
 * ```ts
 * import { butterworthLowPass, noiseBandwidth } from "@quietband/core";
 * noiseBandwidth(butterworthLowPass({ order: 2, cutoffHz: 5 })).hz; // → 5.5536
 * ```
 */
export function noiseBandwidth(
  weighting: Weighting,
  options: { readonly relativeTo?: "dc" | "peak" | undefined } = {},
): NoiseBandwidth {
  refuseUnknownKeys("noiseBandwidth", ["relativeTo"], options);
  const [first, last] = weighting.support;
  const dc = first === 0 ? weighting.powerGainAt(0) : 0;
  const relativeTo = options.relativeTo ?? (dc > 0 ? "dc" : "peak");
  if (relativeTo === "dc" && dc === 0)
    throw new OutOfDomainError(`${weighting.name} has no gain at 0 Hz to relate to; ask for relativeTo: 'peak'.`);
  const repeats = weighting.repeatsHz;
  const band = [first, repeats === undefined ? last : Math.min(last, 0.5 * repeats)] as const;
  const white = powerLaws([{ coefficient: 1, exponent: 0 }], { unit: "1" });
  requireConvergent(white, weighting, ...band);
  const found = requireReached(bandPower(white, weighting, band, bandNoiseTolerance), "Hz");
  const reference = relativeTo === "dc" ? dc : peakGain(weighting, band);
  return Object.freeze({
    hz: found.power / reference,
    relativeTo,
    numericalError: found.error / found.power + 4 * Number.EPSILON,
  });
}
