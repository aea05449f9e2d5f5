import { OutOfDomainError } from "@quietband/core";

/** Refuses what is not a finite number above zero, in one sentence that names the parameter and its unit. */
export function requirePositive(name: string, value: number, unit = ""): number {
  if (typeof value === "number" && value > 0 && value < Number.POSITIVE_INFINITY) return value;
  throw new OutOfDomainError(`${name} must be a positive finite number${inUnit(unit)}; got ${shown(value)}.`);
}

/** Refuses what is not a finite number from zero up. */
export function requireNotNegative(name: string, value: number, unit = ""): number {
  if (typeof value === "number" && value >= 0 && value < Number.POSITIVE_INFINITY) return value;
  throw new OutOfDomainError(`${name} must be a finite number${inUnit(unit)}, not negative; got ${shown(value)}.`);
}

/** Refuses what is not a finite number. */
export function requireFinite(name: string, value: number, unit = ""): number {
  if (typeof value === "number" && Number.isFinite(value)) return value;
  throw new OutOfDomainError(`${name} must be a finite number${inUnit(unit)}; got ${shown(value)}.`);
}

/** Refuses what does not lie strictly between two numbers. */
export function requireInside(name: string, value: number, [low, high]: readonly [number, number]): number {
  if (typeof value === "number" && value > low && value < high) return value;
  throw new OutOfDomainError(`${name} must be above ${low} and below ${high}; got ${shown(value)}.`);
}

/** Refuses what is not a whole number in [least, most]. */
export function requireWhole(name: string, value: number, [least, most]: readonly [number, number]): number {
  if (Number.isInteger(value) && value >= least && value <= most) return value;
  throw new OutOfDomainError(`${name} must be a whole number from ${least} to ${most}; got ${shown(value)}.`);
}

/** Refuses keys nobody reads: a misspelt option must not pass as a default. */
export function refuseUnknownKeys(where: string, known: readonly string[], given: object | undefined): void {
  for (const key of Object.keys(given ?? {})) {
    if (known.includes(key)) continue;
    throw new OutOfDomainError(`${where} knows no option "${key}"; it takes ${known.join(", ")}.`);
  }
}

/** A value as a message shows it. */
export function shown(value: unknown): string {
  if (typeof value === "string") return `the text "${value.slice(0, 40)}"`;
  if (typeof value === "number" || typeof value === "boolean") return String(value);
  return value === undefined || value === null ? "nothing" : "something that is no number";
}

function inUnit(unit: string): string {
  return unit === "" ? "" : ` of ${unit}`;
}
