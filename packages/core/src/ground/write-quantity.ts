import { OutOfDomainError } from "./errors.js";
import { engineeringPrefix } from "./prefix.js";

/** What {@link writeQuantity} takes besides value and unit. */
export interface WriteQuantityOptions {
  /** Significant digits, 1 to 17; all there are, at most 15, unless given. */
  readonly digits?: number | undefined;
}

/** Units that stay without prefix from 0.01 up: 0.1 Hz is what a data sheet prints, not 100 mHz. */
const plainBelowOne: ReadonlySet<string> = new Set(["Hz", "s"]);
const neverPrefixed: ReadonlySet<string> = new Set([
  "",
  "1",
  "%",
  "dB",
  "dBV",
  "dBu",
  "dBm",
  "ppm",
  "bit",
  "LSB",
  "°C",
  "µε",
]);

/**
 * A number with its unit in engineering notation, as an engineer writes it: "1.248 µV", "0.1 Hz", "85 nV/√Hz".
 *
 * @param value - in the unit without prefix, finite.
 * @param unit - "V", "Hz", "V/√Hz"...; a power density's "V²/Hz" takes no prefix but a power of ten.
 * @param options - `digits`.
 * @throws OutOfDomainError for a value that is not finite.
 *
 * @example
 * ```ts
 * import { writeQuantity } from "@quietband/core";
 * writeQuantity(1.24832e-6, "V", { digits: 4 }); // → 1.248 µV
 * writeQuantity(0.1, "Hz"); // → 0.1 Hz
 * ```
 */
export function writeQuantity(value: number, unit: string, { digits }: WriteQuantityOptions = {}): string {
  if (!Number.isFinite(value))
    throw new OutOfDomainError(`A quantity must be a finite number of ${unit}; got ${value}.`);
  const size = Math.abs(value);
  const squared = /²|\^2/.test(unit) && !unit.startsWith("m/s");
  const plain =
    size === 0 ||
    neverPrefixed.has(unit.replace(/\/√Hz$/, "")) ||
    (size >= 0.01 && size < 1 && plainBelowOne.has(unit));
  if (plain || squared) return join(rounded(value, digits), unit);
  // Rounding first: 999.96 of four digits is 1000, and its prefix the next one.
  const scientific = digits === undefined ? size : Number(size.toPrecision(digits));
  const power = 3 * Math.floor(Math.floor(Math.log10(scientific) + 1e-12) / 3);
  const prefix = engineeringPrefix(power);
  if (prefix === undefined) return join(rounded(value, digits), unit);
  // One conversion from decimal text keeps 85e-9 from becoming 84.99999999999999 n.
  const [mantissa = "0", exponent = "0"] = value.toExponential(digits === undefined ? 14 : digits - 1).split("e");
  return join(rounded(Number(`${mantissa}e${Number(exponent) - power}`), digits), `${prefix}${unit}`);
}

function join(number: string, unit: string): string {
  return unit === "" || unit === "1" ? number : `${number} ${unit}`;
}

function rounded(value: number, digits: number | undefined): string {
  const text = digits === undefined ? String(Number(value.toPrecision(15))) : value.toPrecision(digits);
  return (text.includes("e") ? String(Number(text)) : text).replace("-", "−");
}
