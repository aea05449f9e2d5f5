import { type DecimalMark, decimalIn } from "./decimal.js";
import { type NumberParts, numberParts } from "./number-parts.js";
import { prefixExponent } from "./prefix.js";
import { quoted } from "./quoted.js";
import { readUnit, type UnitProblem, type UnitReading } from "./unit.js";

/** A quantity as typed: its value in the canonical unit, and the unit it was read in. */
export interface TypedQuantity {
  readonly value: number;
  readonly unit: UnitReading;
}

/** Reads units; a table hands in one that remembers. */
export type UnitReader = (text: string) => UnitReading | UnitProblem;

const commaAdvice = "leave out thousands separators, and with decimal commas separate cells by ; or tabs";

/**
 * Reads `1.2 kHz`, `85n`, `4k7`, `-114 dBV/√Hz`. Where no unit follows the number, `given` is its unit; a prefix alone goes
 * before `given`, unless that has one already (85n under nV/√Hz could mean two things). The problem, if any, ends a sentence.
 */
export function typedQuantity(
  text: string,
  given: UnitReading | undefined,
  mark: DecimalMark = ".",
  reader: UnitReader = readUnit,
): TypedQuantity | UnitProblem {
  const parts = numberParts(text, mark);
  if (parts === undefined) return { problem: `${quoted(text)} does not begin with a number` };
  if (parts.rest.startsWith(","))
    return { problem: `${quoted(text)} has a comma that is no decimal mark here; ${commaAdvice}` };
  const unit = unitBehind(text, parts, given, reader);
  if ("problem" in unit)
    return /^[\d.]/.test(parts.rest) ? { problem: `${quoted(text)} holds two numbers; ${commaAdvice}` } : unit;
  if (parts.letterExponent !== 0 && hasPrefix(unit)) return twoPrefixes(text, unit.unit);
  const usedMark = parts.letter === "" ? mark : ".";
  return { value: valueIn(unit, parts.number, usedMark, parts.letterExponent), unit };
}

/** Value in the canonical unit of a number written in a unit; digits and prefix are rounded together. */
function valueIn(unit: UnitReading, number: string, mark: DecimalMark, exponent = 0): number {
  if (unit.isLevel) return levelValue(decimalIn(number, 0, number.length, mark, 0), unit);
  const power = unit.kind === "powerDensity" ? 2 : 1;
  return unit.factor * decimalIn(number, 0, number.length, mark, unit.exponent + exponent * power);
}

/** 10^(dB/20) for signals and densities, 10^(dB/10) for power densities, times the prefix of the reference. */
export function levelValue(decibel: number, { kind, exponent }: UnitReading): number {
  return 10 ** (decibel / (kind === "powerDensity" ? 10 : 20) + exponent);
}

function unitBehind(
  text: string,
  { rest, letter }: NumberParts,
  given: UnitReading | undefined,
  reader: UnitReader,
): UnitReading | UnitProblem {
  if (rest === "") {
    if (letter === "R" && given === undefined) return reader("Ω");
    return given ?? { problem: `${quoted(text)} has no unit` };
  }
  if (rest === "R" && (given === undefined || given.unit === "Ω")) return reader("Ω");
  const prefix = prefixExponent(rest);
  if (prefix === undefined) return reader(rest);
  if (given === undefined) {
    const unit = reader(rest);
    return "problem" in unit ? { problem: `${quoted(text)} has no unit` } : unit;
  }
  // "5 m" is five metres only where metres are expected
  const alone = reader(rest);
  if (!("problem" in alone) && alone.unit === given.unit) return alone;
  if (hasPrefix(given)) return twoPrefixes(text, given.unit);
  return { ...given, exponent: given.kind === "powerDensity" ? 2 * prefix : prefix };
}

function hasPrefix({ exponent, isLevel, factor }: UnitReading): boolean {
  return exponent !== 0 || isLevel || factor !== 1;
}

function twoPrefixes(text: string, unit: string): UnitProblem {
  return {
    problem: `${quoted(text)} has a prefix where the unit, ${unit}, already has one or is a level; write the full unit`,
  };
}
