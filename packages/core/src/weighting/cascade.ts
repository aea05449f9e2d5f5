import { OutOfDomainError } from "../ground/errors.js";
import { multiplyPieces } from "../numerics/power-law-product.js";
import { makeWeighting } from "./make-weighting.js";
import { multiplyParts } from "./waves.js";
import type { LobedGain, RationalGain, Weighting } from "./weighting.js";

/** Products of sums of waves grow as the product of their numbers; beyond this many lobes are resolved one by one. */
const mostWaves = 20_000;

/**
 * Weightings in a row: the product of their power gains, on the frequencies all of them have.
 *
 * Exact routes survive: poles and zeros are collected, tables multiply to a table, lobes to lobes. A cascade is of the same
 * kind as what it is made of, so cascades nest.
 *
 * @param weightings - at least one.
 * @throws OutOfDomainError for none, or for supports that do not overlap.
 *
 * @example
 * ```ts
 * import { cascade, firstOrderLowPass, noiseBandwidth } from "@quietband/core";
 * // a bench filter quoted by its poles: three at 1 kHz
 * const pole = firstOrderLowPass({ cutoffHz: 1000 });
 * noiseBandwidth(cascade(pole, pole, pole)).hz; // → 589.05
 * ```
 */
export function cascade(...weightings: readonly Weighting[]): Weighting {
  const [first, ...others] = weightings;
  if (first === undefined) throw new OutOfDomainError("A cascade needs at least one weighting; got none.");
  if (others.length === 0) return first;
  return others.reduce(inRow, first);
}

function inRow(one: Weighting, other: Weighting): Weighting {
  const support = [Math.max(one.support[0], other.support[0]), Math.min(one.support[1], other.support[1])] as const;
  if (!(support[1] > support[0]))
    throw new OutOfDomainError(
      `The weightings of a cascade must share frequencies; ${one.name} and ${other.name} share none.`,
    );
  const rational = collected(one.rational, other.rational);
  const pieces =
    one.pieces !== undefined && other.pieces !== undefined
      ? Object.freeze(multiplyPieces(one.pieces, other.pieces))
      : undefined;
  const lobes = lobesOf(one, other);
  const repeatsHz = repeatsTogether(one, other);
  return makeWeighting({
    name: `${one.name}, ${other.name}`,
    support,
    knots: [...one.knots, ...other.knots],
    lowExponent: one.lowExponent + other.lowExponent,
    highExponent: one.highExponent + other.highExponent,
    ...(rational !== undefined && { rational }),
    ...(pieces !== undefined && { pieces }),
    ...(lobes !== undefined && { lobes }),
    ...(repeatsHz !== undefined && { repeatsHz }),
    powerGainAt: (hz: number) => one.powerGainAt(hz) * other.powerGainAt(hz),
  });
}

function collected(one: RationalGain | undefined, other: RationalGain | undefined): RationalGain | undefined {
  if (one === undefined || other === undefined) return undefined;
  return {
    gain: one.gain * other.gain,
    zerosAtOrigin: one.zerosAtOrigin + other.zerosAtOrigin,
    zeros: [...one.zeros, ...other.zeros],
    poles: [...one.poles, ...other.poles],
  };
}

/** A lobed gain times a smooth one has the smooth one in its envelopes; two lobed gains multiply wave by wave. */
function lobesOf(one: Weighting, other: Weighting): LobedGain | undefined {
  if (one.lobes === undefined && other.lobes === undefined) return undefined;
  if (one.lobes === undefined) return lobesOf(other, one);
  const smooth = [{ envelopeAt: (hz: number) => other.powerGainAt(hz), waves: [{ seconds: 0, cosine: 1, sine: 0 }] }];
  const factor = other.lobes?.parts ?? smooth;
  const waves = (parts: LobedGain["parts"]): number => parts.reduce((sum, part) => sum + part.waves.length, 0);
  if (waves(one.lobes.parts) * waves(factor) > mostWaves) return undefined;
  return {
    lobeHz: Math.min(one.lobes.lobeHz, other.lobes?.lobeHz ?? Number.POSITIVE_INFINITY),
    peaksEveryHz: [...new Set([...one.lobes.peaksEveryHz, ...(other.lobes?.peaksEveryHz ?? [])])],
    parts: multiplyParts(one.lobes.parts, factor),
  };
}

/** A product repeats where both do, at the same rate, or where one does and the other is level. */
function repeatsTogether(one: Weighting, other: Weighting): number | undefined {
  return one.repeatsHz === other.repeatsHz ? one.repeatsHz : undefined;
}
