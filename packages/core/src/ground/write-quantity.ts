import { takesPrefix } from "./base-unit.js";
import { requireFinite, requireWhole } from "./domain.js";
import { refuseUnknownKeys } from "./options.js";
import { prefixSymbol } from "./prefix.js";
import { readUnit } from "./unit.js";
import { decimalExponent, writeNumber } from "./write-number.js";

/** What {@link writeQuantity} takes besides value and unit. */
export interface WriteQuantityOptions {
  /** Significant digits, 1 to 17, zeros included; all there are, at most 15, unless given. */
  readonly digits?: number | undefined;
}

/** Units that stay without prefix from 0.01 up: 0.1 Hz is what a data sheet prints, not 100 mHz. */
const plainBelowOne: ReadonlySet<string> = new Set(["Hz", "s"]);

/**
 * A quantity in engineering notation, as an engineer writes it: "1.248 µV", "0.1 Hz", "85 nV/√Hz". The prefix is a power of a
 * thousand and the number lies from 1 to 1000; rounding comes first, so 999.96 nV in four digits is 1.000 µV.
 *
 * Hz and s stay plain from 0.01 up. A ratio (unit "1") below 1e-3, and any ratio's density below 1, is written in ppm, below
 * 1e-8 in ppb. Squares (V²/Hz), levels and counts take no prefix, and a unit that is unknown is put behind the number as it
 * is. `readQuantity` reads all but the latter back.
 *
 * @param value - in the unit without prefix, finite.
 * @param unit - "V", "Hz", "V/√Hz" ...; "" for a pure number.
 * @param options - `digits`.
 * @throws OutOfDomainError for a value that is not finite, or digits outside 1 to 17.
 *
 * @example
 * ```ts
 * import { writeQuantity } from "@quietband/core";
 * writeQuantity(1.24832e-6, "V", { digits: 4 }); // → 1.248 µV
 * writeQuantity(0.1, "Hz"); // → 0.1 Hz
 * writeQuantity(85e-9, "V/√Hz"); // → 85 nV/√Hz
 * writeQuantity(2.4e-6, "1"); // → 2.4 ppm
 * ```
 */
export function writeQuantity(value: number, unit: string, options: WriteQuantityOptions = {}): string {
  refuseUnknownKeys("writeQuantity", ["digits"], options);
  requireFinite("A quantity to write", value, unit);
  const { digits } = options;
  if (digits !== undefined) requireWhole("digits", digits, 1, 17);
  // fifteen digits drop what a sum of doubles has gathered in the last place: 0.1 + 0.2 is 0.3
  const kept = digits === undefined ? Number(value.toPrecision(15)) : value;
  const { text, exponent } = scaleFor(Math.abs(kept), unit, digits);
  return `${writeNumber(kept, { shift: -exponent, digits })} ${text}`.trimEnd().replaceAll("-", "−");
}

interface Scale {
  /** The unit with its prefix. */
  readonly text: string;
  readonly exponent: number;
}

function scaleFor(size: number, unit: string, digits: number | undefined): Scale {
  if (unit === "1" || unit === "1/√Hz") return ratioScale(size, unit);
  const first = decimalExponent(size, digits);
  const plain = size === 0 || !isPrefixed(unit) || (first < 0 && first >= -2 && plainBelowOne.has(unit));
  const exponent = plain ? 0 : 3 * Math.floor(first / 3);
  const prefix = prefixSymbol(exponent);
  return prefix === undefined ? { text: unit, exponent: 0 } : { text: `${prefix}${unit}`, exponent };
}

function ratioScale(size: number, unit: string): Scale {
  const density = unit.slice(1);
  if (size === 0 || size >= (density === "" ? 1e-3 : 1)) return { text: density === "" ? "" : unit, exponent: 0 };
  return size < 1e-8 ? { text: `ppb${density}`, exponent: -9 } : { text: `ppm${density}`, exponent: -6 };
}

function isPrefixed(text: string): boolean {
  const unit = readUnit(text);
  return !("problem" in unit) && unit.unit === text && unit.kind !== "powerDensity" && takesPrefix(unit.signal);
}
