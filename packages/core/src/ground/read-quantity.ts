import type { DecimalMark } from "./decimal.js";
import { commaUse } from "./decimal-mark.js";
import { MalformedDataError } from "./errors.js";
import { refuseUnknownKeys } from "./options.js";
import { quoted, sentence } from "./quoted.js";
import { type TypedQuantity, typedQuantity } from "./typed-quantity.js";
import { readUnit, type UnitProblem, type UnitReading } from "./unit.js";

/** A value in SI units. */
export interface Quantity {
  /** In `unit`, without prefix. */
  readonly value: number;
  /** "Hz", "V", "V/√Hz", "V²/Hz" ...; "1" for ratios, "" where none was typed. */
  readonly unit: string;
}

/** What {@link readQuantity} takes besides the text. */
export interface ReadQuantityOptions {
  /** The unit expected: "Hz", "V/√Hz" ... A number without unit, or with a prefix alone, takes it; any other is refused. */
  readonly unit?: string | undefined;
}

/** More characters than any quantity needs. */
const longestQuantity = 100;

/**
 * Reads a quantity as people type it: `0.1 Hz`, `1k`, `85 nV/√Hz`, `4k7` (IEC 60062), `2,4 ppm`, `10 min`, `-120 dBV`.
 *
 * The value is the double nearest to what was written, prefix included: `85 nV` is exactly 85e-9. Levels become amplitudes,
 * 10^(dB/20) for signals and densities; %, ppm and ppb become ratios of unit "1"; min, h and d become seconds. A plain dB has
 * no reference and stays dB. A number without unit has the unit "", unless one is expected.
 *
 * @param text - a number and a unit; either µ, or u; point or comma as decimal mark.
 * @param options - `unit`: what is expected.
 * @returns the value in the unit without prefix.
 * @throws MalformedDataError for text that is no quantity, has another unit than expected, is not finite, or can be
 *   read in two ways (`1,000 Hz`).
 *
 * @example
 * ```ts
 * import { readQuantity } from "@quietband/core";
 * readQuantity("85 nV/√Hz"); // → {"value":8.5e-8,"unit":"V/√Hz"}
 * readQuantity("1k", { unit: "Hz" }).value; // → 1000
 * readQuantity("4k7", { unit: "Ω" }).value; // → 4700
 * readQuantity("-120 dBV").value; // → 1e-6
 * ```
 */
export function readQuantity(text: string, options: ReadQuantityOptions = {}): Quantity {
  refuseUnknownKeys("readQuantity", ["unit"], options);
  const wanted = options.unit === undefined ? undefined : expectedUnit(options.unit);
  const expected = `Expected a quantity ${wanted === undefined ? "such as 0.1 Hz or 85 nV/√Hz" : `in ${wanted.unit}`}`;
  if (typeof text !== "string") throw new MalformedDataError(`${expected}; got something that is no text.`);
  const typed = text.trim();
  if (typed.length > longestQuantity)
    throw new MalformedDataError(
      `${expected}; got a text of ${typed.length} characters, more than ${longestQuantity}.`,
    );
  const found = typedOrPure(typed, wanted);
  if ("problem" in found) throw new MalformedDataError(sentence(`${expected}, but ${found.problem}`));
  const { value, unit } = found;
  if (wanted !== undefined && unit.unit !== wanted.unit)
    throw new MalformedDataError(`${expected}, but ${quoted(typed)} is in ${unit.unit}.`);
  if (!Number.isFinite(value)) throw new MalformedDataError(`${expected}, but ${quoted(typed)} is no finite number.`);
  return Object.freeze({ value, unit: unit.unit });
}

/** Where nothing is expected, `5 m` is five metres, and `5` and `4k7` are numbers of no unit. */
function typedOrPure(text: string, wanted: UnitReading | undefined): TypedQuantity | UnitProblem {
  const mark = decimalMarkOf(text);
  const found = typedQuantity(text, wanted, mark);
  if (wanted !== undefined || !("problem" in found)) return found;
  const pure = typedQuantity(text, pureNumber, mark);
  return "problem" in pure ? found : pure;
}

const pureNumber: UnitReading = Object.freeze({
  unit: "",
  signal: "",
  kind: "signal",
  exponent: 0,
  factor: 1,
  isLevel: false,
});

function expectedUnit(text: string): UnitReading {
  const unit = readUnit(text);
  if ("problem" in unit)
    throw new MalformedDataError(sentence(`The unit that readQuantity expects cannot be read: ${unit.problem}`));
  return unit;
}

function decimalMarkOf(text: string): DecimalMark {
  const use = commaUse(text);
  if (use === "ambiguous")
    throw new MalformedDataError(
      `${quoted(text)} could mean a decimal comma or thousands; write 1000 for a thousand and 1.000 for one.`,
    );
  return use === "decimal" ? "," : ".";
}
