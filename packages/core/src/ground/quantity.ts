import { decimalValue, readDecimal } from "./decimal.js";
import { MalformedDataError } from "./errors.js";
import { prefixPower } from "./prefix.js";
import { resolveUnit } from "./unit.js";

/** A number and its unit without prefix: 1.2 kHz is 1200 Hz. */
export interface Quantity {
  readonly value: number;
  /** "" when none was typed. */
  readonly unit: string;
}

/** What {@link readQuantity} takes besides the text. */
export interface ReadQuantityOptions {
  /** The unit it must have; it may then be left out in the text: "4k7" of Ω. */
  readonly unit?: string | undefined;
  /** Read a comma as the decimal sign. */
  readonly decimalComma?: boolean | undefined;
}

const longestQuantity = 100;

/** Prefixes that nobody types alone: h is an hour. */
const seldomBare: ReadonlySet<string> = new Set(["h", "c", "d", "da"]);

/**
 * A quantity as an engineer types it: "0.1 Hz", "85n", "2.1 µV", "4k7" (IEC 60062), "10 min".
 *
 * The double is the one nearest to the decimal typed: "85 nV" is exactly 85e-9.
 *
 * @param text - a number, an SI prefix and a unit, blanks between them or not.
 * @param options - the unit expected, decimal comma.
 * @returns value and unit without prefix.
 * @throws MalformedDataError for text that is no quantity or has another unit, with what was expected.
 * @see IEC 60062 for letter notation: the prefix (or R for ohms) stands where the point would.
 *
 * @example
 * ```ts
 * import { readQuantity } from "@quietband/core";
 * readQuantity("1.2 kHz").value; // → 1200
 * readQuantity("4k7", { unit: "Ω" }).value; // → 4700
 * ```
 */
export function readQuantity(text: string, options: ReadQuantityOptions = {}): Quantity {
  const { unit: expected, decimalComma = false } = options;
  const found = parseQuantity(text.trim(), decimalComma);
  const wanted = expected === undefined ? "a number with its unit, for instance 1.2 kHz" : `a number of ${expected}`;
  if (found === undefined) throw new MalformedDataError(`Expected ${wanted}; got "${text.slice(0, 40)}".`);
  if (expected === undefined || found.unit === expected) return found;
  if (found.unit === "") return Object.freeze({ ...found, unit: expected });
  throw new MalformedDataError(`Expected ${wanted}; got "${text.slice(0, 40)}", which is in ${found.unit}.`);
}

/** A quantity, or undefined where the text is none. */
export function parseQuantity(text: string, decimalComma: boolean): Quantity | undefined {
  if (text.length > longestQuantity) return undefined;
  const number = readDecimal(text, decimalComma);
  if (number === undefined) return undefined;
  const rest = text.slice(number.end).trim();
  if (rest === "") return quantityOf(number.digits, number.power, "");
  const bare = seldomBare.has(rest) ? undefined : prefixPower(rest);
  if (bare !== undefined) return quantityOf(number.digits, number.power + bare, "");
  const unit = resolveUnit(rest);
  if (unit !== undefined) {
    const plain = quantityOf(number.digits, number.power + unit.power, unit.unit);
    return unit.scale === 1 || plain === undefined
      ? plain
      : Object.freeze({ ...plain, value: plain.value * unit.scale });
  }
  return letterNotation(number.digits, number.power, rest);
}

/** IEC 60062: 4k7 is 4.7 k, 2R2 is 2.2 Ω, 3n3 is 3.3 n; a unit may follow. */
function letterNotation(digits: string, power: number, rest: string): Quantity | undefined {
  const letter = rest[0] as string;
  if (power !== 0 || !digits.endsWith(".0")) return undefined;
  let end = 1;
  while (end < rest.length && rest.charCodeAt(end) >= 48 && rest.charCodeAt(end) <= 57) end += 1;
  if (end === 1) return undefined;
  const joined = `${digits.slice(0, -1)}${rest.slice(1, end)}`;
  const after = rest.slice(end).trim();
  if (letter === "R") return after === "" || after === "Ω" ? quantityOf(joined, 0, "Ω") : undefined;
  const prefix = prefixPower(letter);
  const unit = after === "" ? { unit: "", power: 0, scale: 1 } : resolveUnit(after);
  if (prefix === undefined || unit === undefined || unit.power !== 0 || unit.scale !== 1) return undefined;
  return quantityOf(joined, prefix, unit.unit);
}

function quantityOf(digits: string, power: number, unit: string): Quantity | undefined {
  const value = decimalValue(digits, power);
  return Number.isFinite(value) ? Object.freeze({ value, unit }) : undefined;
}
