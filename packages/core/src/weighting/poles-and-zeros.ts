import { requirePositive, requireWhole } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { completeOptions } from "../ground/options.js";
import { inName, makeWeighting } from "./make-weighting.js";
import { placeFactors } from "./place-factors.js";
import { flankKnots } from "./resonance.js";
import type { ComplexHz, Weighting } from "./weighting.js";

/** What {@link polesAndZeros} takes; places in Hz, s/2π, complex ones with their conjugates. */
export interface PolesAndZerosOptions {
  /** At least one, in the left half plane. */
  readonly poles: readonly ComplexHz[];
  /** None unless given. */
  readonly zeros?: readonly ComplexHz[];
  /** Number of zeros at 0 Hz; 0 unless given. */
  readonly zerosAtOrigin?: number;
  /** Where the power gain is `powerGain`, Hz; positive. */
  readonly atHz: number;
  /** Power gain at `atHz`; positive, 1 unless given. */
  readonly powerGain?: number;
}

const defaults: Required<PolesAndZerosOptions> = Object.freeze({
  poles: Object.freeze([]),
  zeros: Object.freeze([]),
  zerosAtOrigin: 0,
  atHz: Number.NaN,
  powerGain: 1,
});

/**
 * Any analog filter by its poles and zeros: |H|² = g · f^(2z) · Π|jf − zero|² / Π|jf − pole|², with g such that the power
 * gain is as given at one frequency.
 *
 * @throws OutOfDomainError for no poles, a pole that is not in the left half plane, a complex place without its conjugate, more
 *   zeros than poles, or a gain that is fixed where the filter has none.
 *
 * @example
 * ```ts
 * import { polesAndZeros } from "@quietband/core";
 * const lag = polesAndZeros({ poles: [{ re: -1, im: 0 }], zeros: [{ re: -10, im: 0 }], atHz: 1e-9 });
 * lag.powerGainAt(1e6); // → 0.0100000
 * ```
 */
export function polesAndZeros(options: PolesAndZerosOptions): Weighting {
  const given = completeOptions("polesAndZeros", defaults, options);
  const atHz = requirePositive("atHz", given.atHz, "Hz");
  const powerGain = requirePositive("powerGain", given.powerGain);
  const poles = copyOf("pole", given.poles);
  const placed = copyOf("zero", given.zeros);
  const zeros = placed.filter(({ re, im }) => re !== 0 || im !== 0);
  const zerosAtOrigin = requireWhole("zerosAtOrigin", given.zerosAtOrigin, 0, 100) + (placed.length - zeros.length);
  const above = placeFactors("zero", zeros);
  const below = placeFactors("pole", poles);
  requireProper(poles, zeros.length + zerosAtOrigin);
  const reference = geometricMean(poles);
  const shapeAt = (hz: number): number => {
    const u = hz / reference;
    let value = 1;
    // Poles and zeros in turn keep the product within range at high orders.
    for (let k = 0; k < poles.length; k += 1) {
      value /= below[k]?.(hz) ?? 1;
      value *= above[k]?.(hz) ?? 1;
      if (k < zerosAtOrigin) value *= u * u;
    }
    return value;
  };
  const shapeThere = shapeAt(atHz);
  const scale = powerGain / shapeThere;
  if (!(scale > 0 && scale < Number.POSITIVE_INFINITY))
    throw new OutOfDomainError(
      `atHz must be a frequency in Hz where the filter has a gain; at ${atHz} Hz it has none.`,
    );
  return makeWeighting({
    name: `poles and zeros (${poles.length} and ${placed.length + given.zerosAtOrigin}), power gain ${inName(powerGain)} at ${inName(atHz)} Hz`,
    knots: [...poles, ...zeros].flatMap(knotsOf),
    lowExponent: -2 * zerosAtOrigin,
    highExponent: 2 * (poles.length - zeros.length - zerosAtOrigin),
    rational: {
      gain: scale * sizeRatio(poles, zeros) * reference ** (-2 * zerosAtOrigin),
      zerosAtOrigin,
      zeros,
      poles,
    },
    powerGainAt: (hz: number) => powerGain * (shapeAt(hz) / shapeThere),
  });
}

function copyOf(what: string, places: readonly ComplexHz[]): ComplexHz[] {
  if (!Array.isArray(places)) throw new OutOfDomainError(`The ${what}s must be a list of complex numbers of Hz.`);
  return (places as readonly ComplexHz[]).map(({ re, im }) => ({ re, im }));
}

function requireProper(poles: readonly ComplexHz[], zeroCount: number): void {
  const unstable = poles.find(({ re }) => !(re < 0));
  if (unstable !== undefined)
    throw new OutOfDomainError(
      `Every pole must lie in the left half plane, re below 0 Hz; got re = ${unstable.re} Hz.`,
    );
  if (poles.length === 0 || poles.length < zeroCount)
    throw new OutOfDomainError(
      `A filter needs at least one pole and no more zeros than poles; got ${poles.length} poles and ${zeroCount} zeros.`,
    );
}

/** Π|p|²/Π|z|², in turn for the same reason. */
function sizeRatio(poles: readonly ComplexHz[], zeros: readonly ComplexHz[]): number {
  let ratio = 1;
  for (const [k, pole] of poles.entries()) {
    ratio *= pole.re * pole.re + pole.im * pole.im;
    const zero = zeros[k];
    if (zero !== undefined) ratio /= zero.re * zero.re + zero.im * zero.im;
  }
  return ratio;
}

function geometricMean(places: readonly ComplexHz[]): number {
  let sum = 0;
  for (const { re, im } of places) sum += Math.log(Math.hypot(re, im));
  return Math.exp(sum / places.length);
}

function knotsOf({ re, im }: ComplexHz): number[] {
  const size = Math.hypot(re, im);
  return im === 0 ? [size] : flankKnots(size, Math.max(Math.abs(re), 1e-9 * size));
}
