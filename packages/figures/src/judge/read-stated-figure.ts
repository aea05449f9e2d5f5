import { MalformedDataError, readBand, readQuantity } from "@quietband/core";

/** What a datasheet states of a band, or of one frequency, read from its own words. */
export interface StatedFigure {
  /** As it was written. */
  readonly text: string;
  readonly kind: "peak-to-peak" | "rms" | "density";
  /** SI: V, or a ratio for ppm; V/√Hz for a density. */
  readonly value: number;
  /** Unit of the signal; "1" for a ratio. */
  readonly unit: string;
  /** Half a unit of the last digit written, in the unit of `value`. */
  readonly halfUnit: number;
  /** The band, Hz; for a density both edges are the frequency. */
  readonly fromHz: number;
  readonly toHz: number;
}

const kinds: readonly (readonly [RegExp, "peak-to-peak" | "rms"])[] = [
  [/\b(?:peak-to-peak|p-p|pp)\b/i, "peak-to-peak"],
  [/\brms\b/i, "rms"],
];

/**
 * Reads a stated figure as datasheets write it: "7 µV peak-to-peak, 0.1 Hz to 10 Hz (typical)", "2.6 µV RMS, 10 Hz to 1 kHz",
 * "7.2 nV/√Hz at 1 kHz"; a decimal comma is understood.
 *
 * @throws MalformedDataError for text that names no value, kind or band, with what is expected.
 *
 * @example
 * ```ts
 * import { readStatedFigure } from "@quietband/figures";
 * const figure = readStatedFigure("7 µV peak-to-peak, 0.1 Hz to 10 Hz");
 * figure.value; // → 7e-6
 * figure.halfUnit; // → 0.5e-6
 * ```
 */
export function readStatedFigure(text: string): StatedFigure {
  // a remark in brackets says nothing of the value; "7,2" is a decimal comma, "7, 2" is not
  const plain = text
    .replace(/\([^)]*\)/g, " ")
    .replace(/(\d),(\d)/g, "$1.$2")
    .trim();
  const root = /\/\s*(?:√|sqrt|rt)\s*\(?Hz\)?/i.exec(plain);
  if (root !== null) return densityFigure(text, plain, root.index, root[0].length);
  for (const [words, kind] of kinds) {
    const found = words.exec(plain);
    if (found === null) continue;
    const { value, unit } = readQuantity(plain.slice(0, found.index).replace(/[,;]\s*$/, ""));
    const band = plain.slice(found.index + found[0].length).replace(/^\s*[,;:]?\s*(?:from\s+|in\s+)?/i, "");
    const { fromHz, toHz } = readBand(band.replace(/\s+(?:to|–|-)\s+/i, ":"));
    return Object.freeze({
      text,
      kind,
      value,
      unit: requireUnit(unit, text),
      halfUnit: halfUnitOf(plain, value),
      fromHz,
      toHz,
    });
  }
  throw new MalformedDataError(
    `Expected a stated figure such as "7 µV peak-to-peak, 0.1 Hz to 10 Hz", "2.6 µV RMS, 10 Hz to 1 kHz" or "7.2 nV/√Hz at 1 kHz"; got "${text.slice(0, 60)}".`,
  );
}

function densityFigure(text: string, plain: string, at: number, length: number): StatedFigure {
  const { value, unit } = readQuantity(plain.slice(0, at));
  const place = plain.slice(at + length).replace(/^\s*[,;]?\s*(?:at|@)\s*/i, "");
  const hz = readQuantity(place, { unit: "Hz" }).value;
  return Object.freeze({
    text,
    kind: "density",
    value,
    unit: requireUnit(unit, text),
    halfUnit: halfUnitOf(plain, value),
    fromHz: hz,
    toHz: hz,
  });
}

function requireUnit(unit: string, text: string): string {
  if (unit !== "") return unit;
  throw new MalformedDataError(
    `Expected a unit on the value of a stated figure, for instance 7 µV; got "${text.slice(0, 60)}".`,
  );
}

/** Half a unit of the last digit, from the digits as written: 7 means ± 0.5, 7.2 means ± 0.05. */
function halfUnitOf(plain: string, value: number): number {
  const digits = /^[\d.]+/.exec(plain)?.[0] ?? "";
  const mantissa = Number(digits);
  const decimals = /\.(\d+)$/.exec(digits)?.[1]?.length ?? 0;
  return mantissa > 0 ? (0.5 * 10 ** -decimals * value) / mantissa : 0;
}
