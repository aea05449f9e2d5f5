import type { Weighting } from "./weighting.js";

type Given = Omit<Weighting, "support" | "knots"> & Partial<Pick<Weighting, "support" | "knots">>;

const everywhere: readonly [number, number] = Object.freeze([0, Number.POSITIVE_INFINITY] as const);

/** Freezes a weighting, sorts its knots and fills in the support that most have: all frequencies. */
export function makeWeighting(given: Given): Weighting {
  const support = given.support ?? everywhere;
  const knots = [...new Set(given.knots ?? [])]
    .filter((hz) => hz > support[0] && hz < support[1])
    .toSorted((one, other) => one - other);
  return Object.freeze({ ...given, support: Object.freeze([...support] as const), knots: Object.freeze(knots) });
}

/** A number of Hz or s in a weighting's name: five digits are plenty. */
export function inName(value: number): string {
  return String(Number(value.toPrecision(5)));
}
