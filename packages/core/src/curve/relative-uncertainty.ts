import type { DecimalMark } from "../ground/decimal.js";
import { quoted } from "../ground/quoted.js";
import { typedQuantity, type UnitReader } from "../ground/typed-quantity.js";
import type { UnitKind, UnitProblem, UnitReading } from "../ground/unit.js";

const nepersPerDb = Math.LN10 / 20;

/** Factor from an uncertainty as written to that of the density: dB are the same for both, a ratio of a square halves. */
export function uncertaintyScale(unit: UnitReading, of: UnitKind): number | undefined {
  if (unit.unit === "dB") return nepersPerDb;
  if (unit.unit !== "1") return undefined;
  return of === "powerDensity" ? 0.5 : 1;
}

/** Reads `5 %`, `± 0.4 dB`, or a number in the unit of its column, as relative standard uncertainty of the density. */
export function relativeUncertainty(
  text: string,
  given: UnitReading | undefined,
  of: UnitKind,
  mark?: DecimalMark,
  reader?: UnitReader,
): { readonly value: number } | UnitProblem {
  const plain = text.startsWith("±") ? text.slice(1).trimStart() : text;
  const found = typedQuantity(plain, given, mark, reader);
  if ("problem" in found) return found;
  const scale = uncertaintyScale(found.unit, of);
  if (scale === undefined) return { problem: `${quoted(text)} is in ${found.unit.unit}` };
  return { value: scale * found.value };
}
