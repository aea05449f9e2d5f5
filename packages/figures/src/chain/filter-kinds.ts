import {
  averageOfReadings,
  aWeighting,
  besselLowPass,
  butterworthBandPass,
  butterworthHighPass,
  butterworthLowPass,
  chebyshevLowPass,
  cWeighting,
  firstOrderHighPass,
  firstOrderLowPass,
  identicalPoles,
  movingAverage,
  programmeWeighting,
  resonator,
  secondOrderLowPass,
  sincDecimator,
  telephoneWeighting,
  type Weighting,
} from "@quietband/core";

/** A number that a kind of filter asks for: its word, and its unit; "" for a plain number. */
export interface FilterNumber {
  readonly word: string;
  readonly unit: "Hz" | "s" | "dB" | "";
}

/** A kind of filter by its trade name. */
export interface FilterKind {
  readonly numbers: readonly FilterNumber[];
  /** Takes the numbers by their words, in SI units. */
  make(numbers: Readonly<Record<string, number>>): Weighting;
}

const hz = (word: string): FilterNumber => ({ word, unit: "Hz" });
const plain = (word: string): FilterNumber => ({ word, unit: "" });
const of = (numbers: Readonly<Record<string, number>>, word: string): number => numbers[word] ?? Number.NaN;

/** Every filter that a chain may name. */
export const filterKinds: Readonly<Record<string, FilterKind>> = Object.freeze({
  "first-order low-pass": {
    numbers: [hz("cutoff")],
    make: (n) => firstOrderLowPass({ cutoffHz: of(n, "cutoff") }),
  },
  "first-order high-pass": {
    numbers: [hz("cutoff")],
    make: (n) => firstOrderHighPass({ cutoffHz: of(n, "cutoff") }),
  },
  "identical poles": {
    numbers: [plain("order"), hz("cutoff")],
    make: (n) => identicalPoles({ order: of(n, "order"), cutoffHz: of(n, "cutoff") }),
  },
  "Butterworth low-pass": {
    numbers: [plain("order"), hz("cutoff")],
    make: (n) => butterworthLowPass({ order: of(n, "order"), cutoffHz: of(n, "cutoff") }),
  },
  "Butterworth high-pass": {
    numbers: [plain("order"), hz("cutoff")],
    make: (n) => butterworthHighPass({ order: of(n, "order"), cutoffHz: of(n, "cutoff") }),
  },
  "Butterworth band-pass": {
    numbers: [plain("order"), hz("from"), hz("to")],
    make: (n) => butterworthBandPass({ order: of(n, "order"), lowCutoffHz: of(n, "from"), highCutoffHz: of(n, "to") }),
  },
  "Bessel low-pass": {
    numbers: [plain("order"), hz("cutoff")],
    make: (n) => besselLowPass({ order: of(n, "order"), cutoffHz: of(n, "cutoff") }),
  },
  "Chebyshev low-pass": {
    numbers: [plain("order"), { word: "ripple", unit: "dB" }, hz("edge")],
    make: (n) => chebyshevLowPass({ order: of(n, "order"), rippleDb: of(n, "ripple"), edgeHz: of(n, "edge") }),
  },
  "second-order low-pass": {
    numbers: [plain("q"), hz("natural")],
    make: (n) => secondOrderLowPass({ q: of(n, "q"), naturalHz: of(n, "natural") }),
  },
  resonator: {
    numbers: [plain("q"), hz("centre")],
    make: (n) => resonator({ q: of(n, "q"), centreHz: of(n, "centre") }),
  },
  "moving average": {
    numbers: [{ word: "over", unit: "s" }],
    make: (n) => movingAverage({ seconds: of(n, "over") }),
  },
  "sinc decimator": {
    numbers: [plain("order"), plain("ratio"), hz("rate")],
    make: (n) => sincDecimator({ order: of(n, "order"), ratio: of(n, "ratio"), modulatorRateHz: of(n, "rate") }),
  },
  "average of readings": {
    numbers: [plain("count"), { word: "every", unit: "s" }],
    make: (n) => averageOfReadings({ count: of(n, "count"), periodSeconds: of(n, "every") }),
  },
  "A weighting": { numbers: [], make: () => aWeighting() },
  "C weighting": { numbers: [], make: () => cWeighting() },
  "programme weighting": { numbers: [], make: () => programmeWeighting() },
  "telephone weighting": { numbers: [], make: () => telephoneWeighting() },
});
