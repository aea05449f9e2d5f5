import { prefixExponent } from "./prefix.js";

/** A unit before any root or square: its symbol, and how it may be spelled. */
interface BaseUnit {
  readonly symbol: string;
  readonly spelled: readonly string[];
  readonly takesPrefix: boolean;
}

function base(symbol: string, ...spelled: readonly string[]): BaseUnit {
  return Object.freeze({ symbol, spelled: Object.freeze([symbol, ...spelled]), takesPrefix: true });
}

function bare(symbol: string, ...spelled: readonly string[]): BaseUnit {
  return Object.freeze({ ...base(symbol, ...spelled), takesPrefix: false });
}

const seconds = base("s", "sec");
const ratio = bare("1");

/** Spellings are those that {@link plainSpelling} leaves: ² is ^2, blanks are gone. */
const baseUnits: readonly BaseUnit[] = Object.freeze([
  base("Hz"),
  base("V", "volt", "volts"),
  base("A", "amp", "amps", "ampere"),
  base("g", "gn", "g_n"),
  base("m/s²", "m/s^2", "m/s2", "m·s^-2", "m/s/s"),
  base("Ω", "ohm", "ohms", "Ohm", "Ohms"),
  base("W"),
  base("C"),
  base("F"),
  base("H"),
  base("K"),
  base("Pa"),
  base("T"),
  base("N"),
  base("m"),
  base("m/s"),
  base("ε"),
  base("rad"),
  base("rad/s"),
  base("°", "deg"),
  base("°/s", "deg/s", "dps"),
  base("°/h", "deg/h", "deg/hr", "°/hr"),
  base("FS"),
  seconds,
  ratio,
  bare("°C", "degC"),
  bare("LSB"),
  bare("bit", "bits"),
  bare("dB"),
]);

/** Units that are multiples of another: factor and power of ten. */
const multiples: ReadonlyMap<string, PrefixedUnit> = new Map(
  (
    [
      ["%", ratio, 1, -2],
      ["ppm", ratio, 1, -6],
      ["ppb", ratio, 1, -9],
      ["min", seconds, 60, 0],
      ["h", seconds, 3600, 0],
      ["d", seconds, 86_400, 0],
      ["day", seconds, 86_400, 0],
      ["days", seconds, 86_400, 0],
    ] as const
  ).map(([spelled, { symbol }, factor, exponent]) => [spelled, Object.freeze({ unit: symbol, exponent, factor })]),
);

const bySpelling: ReadonlyMap<string, BaseUnit> = new Map(
  baseUnits.flatMap((unit) => unit.spelled.map((spelled) => [spelled, unit] as const)),
);

/** A base unit with its prefix: 1 of what was written is factor · 10^exponent of the unit. */
export interface PrefixedUnit {
  readonly unit: string;
  readonly exponent: number;
  readonly factor: number;
}

/** Reads a base unit with at most one prefix, in plain spelling; undefined when it is none. */
export function readPrefixedUnit(spelled: string): PrefixedUnit | undefined {
  const text = withoutRms(unwrapped(spelled));
  const whole = bySpelling.get(text);
  if (whole !== undefined) return { unit: whole.symbol, exponent: 0, factor: 1 };
  const multiple = multiples.get(text);
  if (multiple !== undefined) return multiple;
  for (const letters of [2, 1]) {
    const exponent = prefixExponent(text.slice(0, letters));
    const rest = bySpelling.get(text.slice(letters));
    if (exponent !== undefined && rest?.takesPrefix === true) return { unit: rest.symbol, exponent, factor: 1 };
  }
  return undefined;
}

/** Whether a unit takes an SI prefix; unknown ones do not. */
export function takesPrefix(symbol: string): boolean {
  return bySpelling.get(symbol.replace("²", "^2"))?.takesPrefix === true;
}

/** The unit that differs from a text by capitals only; m may have been meant as M then. */
export function otherCapitals(spelled: string): string | undefined {
  const lower = spelled.toLowerCase();
  for (const { symbol, takesPrefix: prefixed } of baseUnits) {
    if (symbol.toLowerCase() === lower && symbol !== spelled) return symbol;
    const prefix = spelled.slice(0, spelled.length - symbol.length);
    if (!prefixed || prefixExponent(prefix) === undefined || lower !== `${prefix}${symbol}`.toLowerCase()) continue;
    return prefix === "m" ? `m${symbol} or M${symbol}` : `${prefix}${symbol}`;
  }
  return undefined;
}

/** The content of parentheses that enclose all of a text. */
export function unwrapped(text: string): string {
  if (!text.startsWith("(") || !text.endsWith(")")) return text;
  const inside = text.slice(1, -1);
  let depth = 0;
  for (const character of inside) {
    if (character === "(") depth += 1;
    if (character === ")") depth -= 1;
    if (depth < 0) return text;
  }
  return inside;
}

/** Densities are RMS here, so saying it adds nothing: V rms, V_rms, V(rms). */
function withoutRms(text: string): string {
  for (const ending of ["_rms", "(rms)", "rms", "RMS"])
    if (text.length > ending.length && text.endsWith(ending)) return text.slice(0, -ending.length);
  return text;
}

/** One spelling for what keyboards and documents write differently; blanks go. */
export function plainSpelling(text: string): string {
  return text
    .replace(/[\s\u200b\ufeff]/gu, "")
    .replaceAll("**", "^")
    .replaceAll("^½", "½")
    .replace(/[\u03bc\u2126²⁴½−⋅∙*]/gu, (character) => plainCharacters[character] ?? character);
}

/** Greek µ, the ohm sign, raised digits, other dots and minuses. */
const plainCharacters: Readonly<Record<string, string>> = Object.freeze({
  "\u03bc": "µ",
  "\u2126": "Ω",
  "²": "^2",
  "⁴": "^4",
  "½": "^0.5",
  "−": "-",
  "⋅": "·",
  "∙": "·",
  "*": "·",
});
