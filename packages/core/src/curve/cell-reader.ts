import { type DecimalMark, decimalIn, isMinus } from "../ground/decimal.js";
import { quoted } from "../ground/quoted.js";
import { levelValue, typedQuantity } from "../ground/typed-quantity.js";
import { readUnit, type UnitKind, type UnitProblem, type UnitReading } from "../ground/unit.js";
import { curveRange } from "./curve-range.js";
import { refusal } from "./refusal.js";
import { relativeUncertainty, uncertaintyScale } from "./relative-uncertainty.js";

/** Reads the cells [from, to) of one text; each reading refuses with the line, the cell and what was expected. */
export interface CellReader {
  /** Hz. */
  frequency(from: number, to: number, given: UnitReading | undefined, line: number): number;
  /** Amplitude density; all of one text must be of one quantity, that of the first. */
  density(from: number, to: number, given: UnitReading | undefined, line: number): number;
  /** Relative standard uncertainty of the density, NaN for an empty cell or a dash. Densities come first. */
  uncertainty(from: number, to: number, given: UnitReading | undefined, line: number): number;
  /** Relative effect of a common error on the density; may be zero or negative. */
  common(from: number, to: number, given: UnitReading | undefined, line: number): number;
  /** The quantity of the densities read so far. */
  quantity(): DensityQuantity | undefined;
}

export interface DensityQuantity {
  readonly signal: string;
  readonly kind: UnitKind;
  readonly line: number;
}

const headingHint =
  'write the unit in the cell, or a heading such as "frequency [Hz], density [nV/√Hz]" above the rows';

export function cellReader(text: string, mark: DecimalMark): CellReader {
  const remembered = new Map<string, UnitReading | UnitProblem>();
  const reader = (written: string): UnitReading | UnitProblem => {
    const known = remembered.get(written);
    if (known !== undefined) return known;
    const read = readUnit(written);
    remembered.set(written, read);
    return read;
  };
  let quantity: DensityQuantity | undefined;

  const typed = (from: number, to: number, given: UnitReading | undefined, line: number, expected: string) => {
    const cell = text.slice(from, to);
    const found = typedQuantity(cell, given, mark, reader);
    if (!("problem" in found)) return found;
    const hint = found.problem.endsWith("has no unit") ? `; ${headingHint}` : "";
    throw refusal(line, `expected ${expected}, but ${cell === "" ? "the cell is empty" : found.problem}${hint}`);
  };
  const checked = (value: number, from: number, to: number, line: number, expected: string): number => {
    if (value >= curveRange[0] && value <= curveRange[1]) return value;
    throw refusal(line, `expected ${expected}, above zero and finite, got ${quoted(text.slice(from, to))}`);
  };
  const settle = (unit: UnitReading, from: number, to: number, line: number): void => {
    if (unit.kind === "signal") {
      const shown = `${quoted(text.slice(from, to))} is in ${unit.unit}`;
      throw refusal(line, `expected ${aDensity}, but ${shown}, which is no density; did you mean ${unit.unit}/√Hz?`);
    }
    quantity ??= { signal: unit.signal, kind: unit.kind, line };
    if (quantity.signal === unit.signal && quantity.kind === unit.kind) return;
    throw refusal(
      line,
      `expected a density of the same quantity as on line ${quantity.line}, got ${quoted(text.slice(from, to))}, which is in ${unit.unit}`,
    );
  };

  return {
    quantity: () => quantity,
    frequency(from, to, given, line) {
      const plain = given === undefined ? Number.NaN : decimalIn(text, from, to, mark, given.exponent);
      if (plain >= curveRange[0] && plain <= curveRange[1]) return plain;
      const { value, unit } = typed(from, to, given, line, aFrequency);
      if (unit.unit !== "Hz")
        throw refusal(line, `expected ${aFrequency}, but ${quoted(text.slice(from, to))} is in ${unit.unit}`);
      return checked(value, from, to, line, aFrequency);
    },
    density(from, to, given, line) {
      const plain = given === undefined ? Number.NaN : plainDensity(text, from, to, mark, given);
      if (given !== undefined && plain > 0) {
        settle(given, from, to, line);
        return checked(amplitude(plain, given), from, to, line, aDensity);
      }
      const { value, unit } = typed(from, to, given, line, aDensity);
      settle(unit, from, to, line);
      return checked(amplitude(value, unit), from, to, line, aDensity);
    },
    uncertainty(from, to, given, line) {
      if (to === from || (to === from + 1 && isMinus(text.charCodeAt(from)))) return Number.NaN;
      const found = relativeUncertainty(text.slice(from, to), given, quantity?.kind ?? "density", mark, reader);
      if ("problem" in found) throw refusal(line, `expected ${anUncertainty}, but ${found.problem}`);
      if (found.value > 0 && found.value <= 1) return found.value;
      throw refusal(line, `expected ${anUncertainty}, above 0 and at most 100 %, got ${quoted(text.slice(from, to))}`);
    },
    common(from, to, given, line) {
      const { value, unit } = typed(from, to, given, line, "an effect of a common error such as 1.5 %");
      const scale = uncertaintyScale(unit, quantity?.kind ?? "density");
      if (scale !== undefined && Number.isFinite(value)) return scale * value;
      throw refusal(line, `expected an effect of a common error such as 1.5 %, got ${quoted(text.slice(from, to))}`);
    },
  };
}

const aFrequency = "a frequency such as 1.2 kHz";
const aDensity = "a density such as 85 nV/√Hz";
const anUncertainty = "an uncertainty such as 5 % or 0.4 dB";

function plainDensity(text: string, from: number, to: number, mark: DecimalMark, given: UnitReading): number {
  if (!given.isLevel) return decimalIn(text, from, to, mark, given.exponent);
  return levelValue(decimalIn(text, from, to, mark, 0), given);
}

function amplitude(value: number, { kind }: UnitReading): number {
  return kind === "powerDensity" ? Math.sqrt(value) : value;
}
