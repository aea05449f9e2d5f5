import { MalformedDataError } from "../ground/errors.js";

/** A copy of a list of filter coefficients: at least one, all finite, not all zero. */
export function requireCoefficients(name: string, values: readonly number[]): readonly number[] {
  if (!Array.isArray(values)) throw new MalformedDataError(`${name} must be a list of numbers; got ${String(values)}.`);
  const copy = [...(values as readonly number[])];
  if (copy.length === 0) throw new MalformedDataError(`${name} must hold at least one coefficient; got none.`);
  const index = copy.findIndex((value) => !Number.isFinite(value));
  if (index >= 0)
    throw new MalformedDataError(`${name} must be finite numbers; number ${index + 1} is ${copy[index]}.`, { index });
  if (copy.every((value) => value === 0))
    throw new MalformedDataError(`${name} must hold a coefficient other than zero; got ${copy.length} zeros.`);
  return Object.freeze(copy);
}
