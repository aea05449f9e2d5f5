import { OutOfDomainError } from "./errors.js";

/** Refuses what is not a finite number above zero, in one sentence that names the parameter and its unit. */
export function requirePositive(name: string, value: number, unit = ""): number {
  if (typeof value === "number" && value > 0 && value < Number.POSITIVE_INFINITY) return value;
  throw new OutOfDomainError(`${name} must be a positive finite number${inUnit(unit)}; got ${shown(value)}.`);
}

/** Refuses what is not a finite number. */
export function requireFinite(name: string, value: number, unit = ""): number {
  if (typeof value === "number" && Number.isFinite(value)) return value;
  throw new OutOfDomainError(`${name} must be a finite number${inUnit(unit)}; got ${shown(value)}.`);
}

/** Refuses what is not a whole number in [least, most]. */
export function requireWhole(name: string, value: number, least: number, most: number): number {
  if (Number.isInteger(value) && value >= least && value <= most) return value;
  throw new OutOfDomainError(`${name} must be a whole number from ${least} to ${most}; got ${shown(value)}.`);
}

/** Refuses what is not a number in [least, most]; either end may be excluded by `open`. */
export function requireBetween(
  name: string,
  value: number,
  [least, most]: readonly [number, number],
  open: { readonly low?: boolean; readonly high?: boolean; readonly unit?: string } = {},
): number {
  const aboveLow = open.low === true ? value > least : value >= least;
  const belowHigh = open.high === true ? value < most : value <= most;
  if (typeof value === "number" && aboveLow && belowHigh) return value;
  const low = open.low === true ? `above ${least}` : `at least ${least}`;
  const high = open.high === true ? `below ${most}` : `at most ${most}`;
  throw new OutOfDomainError(`${name} must be ${low} and ${high}${inUnit(open.unit ?? "")}; got ${shown(value)}.`);
}

/** A band edge pair with 0 ≤ fromHz < toHz ≤ ∞. There is no default lower edge: where 1/f noise begins is a decision. */
export function requireBand(fromHz: number, toHz: number): void {
  if (typeof fromHz !== "number" || Number.isNaN(fromHz) || fromHz < 0 || fromHz === Number.POSITIVE_INFINITY)
    throw new OutOfDomainError(
      `fromHz, the lower band edge, must be a number of Hz from 0 up; got ${shown(fromHz)}; give the lowest frequency that matters, for instance one over the observation time.`,
    );
  if (typeof toHz !== "number" || !(toHz > fromHz))
    throw new OutOfDomainError(
      `toHz, the upper band edge, must be a number of Hz above fromHz = ${fromHz} (Infinity is allowed); got ${shown(toHz)}.`,
    );
}

function inUnit(unit: string): string {
  return unit === "" ? "" : ` of ${unit}`;
}

function shown(value: unknown): string {
  if (typeof value === "string") return `the text "${value.slice(0, 40)}"`;
  if (typeof value === "number" || typeof value === "boolean") return String(value);
  return value === undefined || value === null ? "nothing" : "something that is no number";
}
