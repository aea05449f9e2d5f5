import { MalformedDataError, readQuantity } from "@quietband/core";
import type { ParsedOptions } from "./command-options.js";

/** A quantity typed after an option, in a unit; undefined where the option was not typed. */
export function quantityOption(parsed: ParsedOptions, name: string, unit: string): number | undefined {
  const text = parsed.one(name);
  return text === undefined ? undefined : readQuantity(text, { unit }).value;
}

/** A plain number typed after an option. */
export function plainNumber(parsed: ParsedOptions, name: string): number | undefined {
  const text = parsed.one(name);
  if (text === undefined) return undefined;
  const value = Number(text);
  if (text.trim() !== "" && Number.isFinite(value)) return value;
  throw new MalformedDataError(`Expected a plain number for --${name}; got "${text.slice(0, 40)}".`);
}
