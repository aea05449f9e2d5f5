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
    one.pieces !== undefined && other.pieces !== undefined ? multiplyPieces(one.pieces, other.pieces) : undefined;
  const lobes = lobesOf(one, other);
  const repeatsHz = repeatsTogether(one, other);
  const factors = [...(one.factors ?? [one]), ...(other.factors ?? [other])];
  return makeWeighting({
    name: `${one.name}; ${other.name}`,
    support,
    knots: [...one.knots, ...other.knots],
    lowExponent: one.lowExponent + other.lowExponent,
    highExponent: one.highExponent + other.highExponent,
    ...(rational !== undefined && { rational }),
    ...(pieces !== undefined && { pieces }),
    ...(lobes !== undefined && { lobes }),
    ...(repeatsHz !== undefined && { repeatsHz }),
    factors,
    powerGainAt(hz: number): number {
      let gain = 1;
      for (const factor of factors) gain *= factor.powerGainAt(hz);
      return gain;
    },
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

/** Smooth filters join the smooth factor of a lobed gain; two lobed gains multiply wave by wave. */
function lobesOf(one: Weighting, other: Weighting): LobedGain | undefined {
  const [a, b] = [one.lobes, other.lobes];
  if (a === undefined && b === undefined) return undefined;
  if (a === undefined) return lobesOf(other, one);
  if (b === undefined) return { ...a, smoothAt: (hz: number) => a.smoothAt(hz) * other.powerGainAt(hz) };
  const count = (parts: LobedGain["parts"]): number => parts.reduce((sum, part) => sum + part.waves.length, 0);
  if (count(a.parts) * count(b.parts) > mostWaves) return undefined;
  return {
    lobeHz: Math.min(a.lobeHz, b.lobeHz),
    parts: multiplyParts(a.parts, b.parts),
    peaksEveryHz: [...new Set([...a.peaksEveryHz, ...b.peaksEveryHz])],
    ...(a.repeatsHz !== undefined && a.repeatsHz === b.repeatsHz && { repeatsHz: a.repeatsHz }),
    coreAt: (hz: number) => a.coreAt(hz) * b.coreAt(hz),
    smoothAt: (hz: number) => a.smoothAt(hz) * b.smoothAt(hz),
  };
}

/** A product repeats where both do and one rate is a whole multiple of the other, or where one does and the other is level. */
function repeatsTogether(one: Weighting, other: Weighting): number | undefined {
  if (isLevel(one)) return other.repeatsHz;
  if (isLevel(other)) return one.repeatsHz;
  if (one.repeatsHz === undefined || other.repeatsHz === undefined) return undefined;
  const [low, high] = [Math.min(one.repeatsHz, other.repeatsHz), Math.max(one.repeatsHz, other.repeatsHz)];
  const multiple = high / low;
  return Math.abs(multiple - Math.round(multiple)) <= 2 * Number.EPSILON * multiple ? high : undefined;
}

/** The same gain at all frequencies. */
function isLevel({ rational }: Weighting): boolean {
  return rational !== undefined && rational.poles.length + rational.zeros.length + rational.zerosAtOrigin === 0;
}
