import {
  averageOfReadings,
  aWeighting,
  besselLowPass,
  butterworthBandPass,
  butterworthHighPass,
  butterworthLowPass,
  cascade,
  chebyshevLowPass,
  cWeighting,
  firstOrderHighPass,
  firstOrderLowPass,
  identicalPoles,
  MalformedDataError,
  movingAverage,
  OutOfDomainError,
  programmeWeighting,
  readQuantity,
  recordMeanRemoved,
  recordTrendRemoved,
  resonator,
  sampleDifference,
  secondOrderLowPass,
  sincDecimator,
  telephoneWeighting,
  twoSampleVariance,
  type Weighting,
} from "@quietband/core";
import { nearest } from "./command-options.js";

/** A number asked of the person who types: its word, and its unit ("" for a plain number). */
interface Asked {
  readonly word: string;
  readonly unit: string;
}

interface Kind {
  readonly asks: readonly Asked[];
  make(values: Readonly<Record<string, number>>): Weighting;
}

const hz = (word: string): Asked => ({ word, unit: "Hz" });
const seconds = (word: string): Asked => ({ word, unit: "s" });
const plain = (word: string): Asked => ({ word, unit: "" });
const need = (values: Readonly<Record<string, number>>, word: string): number => values[word] ?? Number.NaN;

/** What may stand before the first comma, and what it asks for. */
const kinds: Readonly<Record<string, Kind>> = Object.freeze({
  "first-order low-pass": { asks: [hz("cutoff")], make: (v) => firstOrderLowPass({ cutoffHz: need(v, "cutoff") }) },
  "first-order high-pass": { asks: [hz("cutoff")], make: (v) => firstOrderHighPass({ cutoffHz: need(v, "cutoff") }) },
  "identical poles": {
    asks: [plain("order"), hz("cutoff")],
    make: (v) => identicalPoles({ order: need(v, "order"), cutoffHz: need(v, "cutoff") }),
  },
  "Butterworth low-pass": {
    asks: [plain("order"), hz("cutoff")],
    make: (v) => butterworthLowPass({ order: need(v, "order"), cutoffHz: need(v, "cutoff") }),
  },
  "Butterworth high-pass": {
    asks: [plain("order"), hz("cutoff")],
    make: (v) => butterworthHighPass({ order: need(v, "order"), cutoffHz: need(v, "cutoff") }),
  },
  "Butterworth band-pass": {
    asks: [plain("order"), hz("from"), hz("to")],
    make: (v) =>
      butterworthBandPass({ order: need(v, "order"), lowCutoffHz: need(v, "from"), highCutoffHz: need(v, "to") }),
  },
  "Bessel low-pass": {
    asks: [plain("order"), hz("cutoff")],
    make: (v) => besselLowPass({ order: need(v, "order"), cutoffHz: need(v, "cutoff") }),
  },
  "Chebyshev low-pass": {
    asks: [plain("order"), { word: "ripple", unit: "dB" }, hz("edge")],
    make: (v) => chebyshevLowPass({ order: need(v, "order"), rippleDb: need(v, "ripple"), edgeHz: need(v, "edge") }),
  },
  "second-order low-pass": {
    asks: [plain("q"), hz("natural")],
    make: (v) => secondOrderLowPass({ q: need(v, "q"), naturalHz: need(v, "natural") }),
  },
  resonator: {
    asks: [plain("q"), hz("centre")],
    make: (v) => resonator({ q: need(v, "q"), centreHz: need(v, "centre") }),
  },
  "moving average": { asks: [seconds("over")], make: (v) => movingAverage({ seconds: need(v, "over") }) },
  "sinc decimator": {
    asks: [plain("order"), plain("ratio"), hz("rate")],
    make: (v) => sincDecimator({ order: need(v, "order"), ratio: need(v, "ratio"), modulatorRateHz: need(v, "rate") }),
  },
  "average of readings": {
    asks: [plain("count"), seconds("every")],
    make: (v) => averageOfReadings({ count: need(v, "count"), periodSeconds: need(v, "every") }),
  },
  "sample difference": { asks: [seconds("apart")], make: (v) => sampleDifference({ seconds: need(v, "apart") }) },
  "two-sample variance": { asks: [seconds("over")], make: (v) => twoSampleVariance({ seconds: need(v, "over") }) },
  "mean removed": { asks: [seconds("over")], make: (v) => recordMeanRemoved({ seconds: need(v, "over") }) },
  "trend removed": { asks: [seconds("over")], make: (v) => recordTrendRemoved({ seconds: need(v, "over") }) },
  "A weighting": { asks: [], make: () => aWeighting() },
  "C weighting": { asks: [], make: () => cWeighting() },
  "programme weighting": { asks: [], make: () => programmeWeighting() },
  "telephone weighting": { asks: [], make: () => telephoneWeighting() },
});

/** For help: every kind and what it asks for. */
export function throughKinds(): string[] {
  return Object.entries(kinds).map(([name, { asks }]) =>
    [name, ...asks.map(({ word, unit }) => (unit === "" ? `${word} N` : `${word} ${unit}`))].join(", "),
  );
}

/**
 * A filter in words: its kind, then its numbers after commas, each with its word ("order 2", "cutoff 5 Hz") or, where only
 * one number of that unit is asked for, without ("5 Hz"). Several make a cascade.
 */
export function readThrough(texts: readonly string[]): Weighting | undefined {
  const [first, ...others] = texts.map(readFilter);
  return first === undefined ? undefined : cascade(first, ...others);
}

function readFilter(text: string): Weighting {
  const [name = "", ...rest] = text.split(",").map((part) => part.trim());
  const known = Object.keys(kinds).find((kind) => kind.toLowerCase() === name.toLowerCase());
  if (known === undefined) {
    const near = nearest(name, Object.keys(kinds));
    throw new MalformedDataError(
      `No filter is called "${name.slice(0, 40)}"; ${near === undefined ? `known are ${Object.keys(kinds).join(", ")}` : `did you mean "${near}"?`}${near === undefined ? "." : ""}`,
    );
  }
  const kind = kinds[known] as Kind;
  const { asks } = kind;
  const values: Record<string, number> = {};
  for (const part of rest) readNumber(known, asks, part, values);
  const missing = asks.find(({ word }) => values[word] === undefined);
  if (missing !== undefined)
    throw new OutOfDomainError(
      `A ${known} needs ${asks.map(({ word, unit }) => (unit === "" ? word : `${word} in ${unit}`)).join(", ")}; ${missing.word} is missing.`,
    );
  return kind.make(values);
}

function readNumber(kind: string, asks: readonly Asked[], part: string, values: Record<string, number>): void {
  const named = asks.find(({ word }) => part.toLowerCase().startsWith(`${word} `));
  const text = named === undefined ? part : part.slice(named.word.length + 1);
  const found = readQuantity(text);
  const asked = named ?? onlyOne(asks.filter(({ word, unit }) => unit === found.unit && values[word] === undefined));
  if (asked === undefined || (found.unit !== asked.unit && found.unit !== ""))
    throw new MalformedDataError(
      `Expected the numbers of a ${kind} as ${asks.map(({ word, unit }) => `"${word} ${unit === "" ? "N" : `1 ${unit}`}"`).join(", ")}; got "${part.slice(0, 40)}".`,
    );
  values[asked.word] = found.value;
}

function onlyOne<Item>(items: readonly Item[]): Item | undefined {
  return items.length === 1 ? items[0] : undefined;
}
