import type { LobedGain, Weighting } from "./weighting.js";

type Given = Omit<Weighting, "support" | "knots"> & Partial<Pick<Weighting, "support" | "knots">>;

const everywhere: readonly [number, number] = Object.freeze([0, Number.POSITIVE_INFINITY] as const);

/**
 * Freezes a weighting to its last array, sorts its knots, drops those outside and fills in the support that most have: all
 * frequencies. A rational form whose gain the doubles cannot hold (a hundred poles at 1 kHz: 1e600) is left out. What is given
 * must be the maker's own, not the caller's.
 */
export function makeWeighting(given: Given): Weighting {
  const { support = everywhere, rational, ...rest } = given;
  const knots = [...new Set(given.knots ?? [])]
    .filter((hz) => hz > support[0] && hz < support[1])
    .toSorted((one, other) => one - other);
  const held = rational !== undefined && rational.gain > 0 && rational.gain < Number.POSITIVE_INFINITY;
  return deepFrozen({
    ...rest,
    ...(held && { rational }),
    // −2·0 is −0, which a report would print.
    lowExponent: given.lowExponent + 0,
    highExponent: given.highExponent + 0,
    support: [...support] as const,
    knots,
  });
}

type GivenLobed = Omit<Given, "lobes"> & { readonly lobes: Pick<LobedGain, "lobeHz" | "parts" | "peaksEveryHz"> };

/** A weighting whose lobes are all there is to it: its own gain is the lobed factor, the smooth one is 1. */
export function makeLobed(given: GivenLobed): Weighting {
  const { lobes, repeatsHz } = given;
  const coreAt = (hz: number): number => given.powerGainAt(hz);
  return makeWeighting({
    ...given,
    lobes: { ...lobes, ...(repeatsHz !== undefined && { repeatsHz }), coreAt, smoothAt: () => 1 },
  });
}

/** A number of Hz or s in a weighting's name: five digits are plenty. */
export function inName(value: number): string {
  return String(Number(value.toPrecision(5)));
}

function deepFrozen<Value>(value: Value): Value {
  if (typeof value !== "object" || value === null || Object.isFrozen(value)) return value;
  for (const inner of Object.values(value)) deepFrozen(inner);
  return Object.freeze(value);
}
