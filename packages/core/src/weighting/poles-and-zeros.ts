import { requirePositive, requireWhole } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { wholePower } from "../numerics/whole-power.js";
import { makeWeighting } from "./make-weighting.js";
import type { ComplexHz, Weighting } from "./weighting.js";

/** What {@link polesAndZeros} takes; places in Hz, s/2π, complex ones with their conjugates. */
export interface PolesAndZerosOptions {
  readonly poles: readonly ComplexHz[];
  readonly zeros?: readonly ComplexHz[];
  /** Number of zeros at 0 Hz; 0 unless given. */
  readonly zerosAtOrigin?: number;
  /** Where the power gain is `powerGain`, Hz. */
  readonly atHz: number;
  /** Power gain at `atHz`; 1 unless given. */
  readonly powerGain?: number;
  /** For reports. */
  readonly name?: string;
}

/**
 * Any analog filter by its poles and zeros: |H|² = g · f^(2z) · Π|jf − zero|² / Π|jf − pole|², with g such that the power
 * gain is as given at one frequency.
 *
 * Conjugate pairs are taken together as (|p|² − f²)² + (2 Re p · f)², with the difference in factors.
 *
 * @throws OutOfDomainError for a pole that is not in the left half plane, a complex place without its conjugate, or more
 *   zeros than poles.
 *
 * @example
 * ```ts
 * import { polesAndZeros } from "@quietband/core";
 * const lag = polesAndZeros({ poles: [{ re: -1, im: 0 }], zeros: [{ re: -10, im: 0 }], atHz: 1e-9 });
 * lag.powerGainAt(1e6); // → 0.0100000
 * ```
 */
export function polesAndZeros(options: PolesAndZerosOptions): Weighting {
  const { poles, zeros = [], zerosAtOrigin = 0, atHz, powerGain = 1, name = "poles and zeros" } = options;
  requireWhole("zerosAtOrigin", zerosAtOrigin, 0, 100);
  requirePositive("atHz", atHz, "Hz");
  requirePositive("powerGain", powerGain);
  const polePairs = pairsOf("pole", poles);
  const zeroPairs = pairsOf("zero", zeros);
  const unstable = poles.find(({ re }) => !(re < 0));
  if (unstable !== undefined)
    throw new OutOfDomainError(`A pole must lie in the left half plane (re below 0 Hz); got ${unstable.re} Hz.`);
  if (poles.length < zeros.length + zerosAtOrigin)
    throw new OutOfDomainError(
      `A filter needs at least as many poles as zeros; got ${poles.length} poles and ${zeros.length + zerosAtOrigin} zeros.`,
    );
  const shapeAt = (hz: number): number => {
    let value = wholePower(hz, 2 * zerosAtOrigin);
    for (const pair of zeroPairs) value *= pair(hz);
    for (const pair of polePairs) value /= pair(hz);
    return value;
  };
  const gain = powerGain / shapeAt(atHz);
  return makeWeighting({
    name,
    knots: [...poles, ...zeros].flatMap(({ re, im }) => [Math.hypot(re, im), Math.abs(im)]),
    lowExponent: -2 * (zerosAtOrigin + zeros.filter(({ re, im }) => re === 0 && im === 0).length),
    highExponent: 2 * (poles.length - zeros.length - zerosAtOrigin),
    rational: { gain, zerosAtOrigin, zeros: [...zeros], poles: [...poles] },
    powerGainAt: (hz: number) => gain * shapeAt(hz),
  });
}

/** |jf − p|² for each real place and each conjugate pair. */
function pairsOf(what: string, places: readonly ComplexHz[]): ((hz: number) => number)[] {
  const rest = [...places];
  const factors: ((hz: number) => number)[] = [];
  while (rest.length > 0) {
    const { re, im } = rest.pop() as ComplexHz;
    if (!(Number.isFinite(re) && Number.isFinite(im)))
      throw new OutOfDomainError(`A ${what} must be a finite complex number of Hz; got ${re}, ${im}.`);
    if (im === 0) {
      factors.push((hz) => hz * hz + re * re);
      continue;
    }
    const partner = rest.findIndex((place) => place.re === re && place.im === -im);
    if (partner < 0) throw new OutOfDomainError(`The complex ${what} ${re}, ${im} Hz lacks its conjugate; give both.`);
    rest.splice(partner, 1);
    const size = Math.hypot(re, im);
    factors.push((hz) => {
      const off = (size - hz) * (size + hz);
      const loss = 2 * re * hz;
      return off * off + loss * loss;
    });
  }
  return factors;
}
