import * as core from "../../src/index.js";
import type { Weighting } from "../../src/weighting/weighting.js";

/** What the contract needs to know of one factory. */
export interface Case {
  /** Options that make good weightings. */
  readonly good: readonly object[];
  /** Bad options and what the refusal must name: the parameter, or the fault. */
  readonly bad: readonly (readonly [object, string])[];
  /** For given good options, frequencies at which the power gain is exactly one half. */
  readonly halfPowerAt?: (options: never) => readonly number[];
}

const notPositive = [0, -1, Number.NaN, Number.POSITIVE_INFINITY, "1 kHz"] as const;

function badly(good: object, name: string, values: readonly unknown[]): (readonly [object, string])[] {
  return values.map((value) => [{ ...good, [name]: value }, name] as const);
}

const byCutoff = { cutoffHz: 1234.5 };
const byOrder = { order: 3, cutoffHz: 20 };
const band = { order: 2, lowCutoffHz: 300, highCutoffHz: 3400 };
const ripple = { order: 5, rippleDb: 0.5, edgeHz: 1e4 };
const natural = { naturalHz: 100, q: 3 };
const centred = { centreHz: 100, q: 3 };
const bySeconds = { seconds: 0.02 };
const decimator = { order: 3, ratio: 64, modulatorRateHz: 1e6 };
const readings = { count: 10, periodSeconds: 1e-3 };
const taps = { taps: [0.1, 0.2, 0.4, 0.2, 0.1], sampleRateHz: 1000 };
const recursive = { numerator: [0.2, 0.2], denominator: [1, -1.2, 0.8], sampleRateHz: 1000 };
const pair = [
  { re: -20, im: 300 },
  { re: -20, im: -300 },
];
const placed = { poles: [...pair, { re: -5, im: 0 }], zeros: [{ re: 40, im: 0 }], zerosAtOrigin: 1, atHz: 100 };
const rows = [
  { frequencyHz: 10, gainDb: -3 },
  { frequencyHz: 100, gainDb: 0 },
  { frequencyHz: 1000, gainDb: -47.5 },
];

const orders = (most: number): readonly unknown[] => [0, 1.5, most + 1, Number.NaN, "2"];

/** Every factory of the room by its name. */
export const cases: Readonly<Record<string, Case>> = {
  firstOrderLowPass: {
    good: [byCutoff, { cutoffHz: 1e-6 }],
    bad: badly(byCutoff, "cutoffHz", notPositive),
    halfPowerAt: ({ cutoffHz }: core.FirstOrderLowPassOptions) => [cutoffHz],
  },
  firstOrderHighPass: {
    good: [byCutoff, { cutoffHz: 1e7 }],
    bad: badly(byCutoff, "cutoffHz", notPositive),
    halfPowerAt: ({ cutoffHz }: core.FirstOrderHighPassOptions) => [cutoffHz],
  },
  identicalPoles: {
    good: [1, 2, 7, 100].map((order) => ({ order, cutoffHz: 70 })),
    bad: [...badly(byOrder, "order", orders(100)), ...badly(byOrder, "cutoffHz", notPositive)],
    halfPowerAt: ({ cutoffHz }: core.IdenticalPolesOptions) => [cutoffHz],
  },
  butterworthLowPass: {
    good: [1, 2, 5, 12].map((order) => ({ order, cutoffHz: 5e3 })),
    bad: [...badly(byOrder, "order", orders(12)), ...badly(byOrder, "cutoffHz", notPositive)],
    halfPowerAt: ({ cutoffHz }: core.ButterworthLowPassOptions) => [cutoffHz],
  },
  butterworthHighPass: {
    good: [1, 2, 5, 12].map((order) => ({ order, cutoffHz: 0.03 })),
    bad: [...badly(byOrder, "order", orders(12)), ...badly(byOrder, "cutoffHz", notPositive)],
    halfPowerAt: ({ cutoffHz }: core.ButterworthHighPassOptions) => [cutoffHz],
  },
  butterworthBandPass: {
    good: [1, 3, 12].flatMap((order) => [
      { order, lowCutoffHz: 20, highCutoffHz: 2e4 },
      { order, lowCutoffHz: 990, highCutoffHz: 1010 },
    ]),
    bad: [
      ...badly(band, "order", orders(12)),
      ...badly(band, "lowCutoffHz", [...notPositive, 5000].slice(0, -1)),
      ...badly(band, "highCutoffHz", [...notPositive, 300, 200]),
    ],
    halfPowerAt: ({ lowCutoffHz, highCutoffHz }: core.ButterworthBandPassOptions) => [lowCutoffHz, highCutoffHz],
  },
  besselLowPass: {
    good: Array.from({ length: 10 }, (_, index) => ({ order: index + 1, cutoffHz: 31.7 })),
    bad: [...badly(byOrder, "order", orders(10)), ...badly(byOrder, "cutoffHz", notPositive)],
    halfPowerAt: ({ cutoffHz }: core.BesselLowPassOptions) => [cutoffHz],
  },
  chebyshevLowPass: {
    good: [1, 2, 5, 12].flatMap((order) => [0.01, 3, 30].map((rippleDb) => ({ order, rippleDb, edgeHz: 440 }))),
    bad: [
      ...badly(ripple, "order", orders(12)),
      ...badly(ripple, "rippleDb", [0, -1, 31, Number.NaN]),
      ...badly(ripple, "edgeHz", notPositive),
    ],
  },
  secondOrderLowPass: {
    good: [0.01, 0.5, 1, 1000].map((q) => ({ naturalHz: 50, q })),
    bad: [...badly(natural, "naturalHz", notPositive), ...badly(natural, "q", notPositive)],
  },
  resonator: {
    good: [0.01, 0.5, 1, 1000].map((q) => ({ centreHz: 50, q })),
    bad: [...badly(centred, "centreHz", notPositive), ...badly(centred, "q", notPositive)],
  },
  polesAndZeros: {
    good: [
      placed,
      { poles: pair, zeros: [{ re: 0, im: 0 }], atHz: 300 },
      {
        poles: [...pair, ...pair],
        zeros: [
          { re: 0, im: 50 },
          { re: 0, im: -50 },
        ],
        atHz: 1,
        powerGain: 4,
      },
    ],
    bad: [
      ...badly(placed, "atHz", notPositive),
      ...badly(placed, "powerGain", [0, -1, Number.NaN]),
      ...badly(placed, "zerosAtOrigin", [-1, 0.5]),
      ...badly(placed, "zeros", [pair.slice(1), [{ re: Number.NaN, im: 0 }]]).map(([bad]) => [bad, "zero"] as const),
      [{ ...placed, poles: [] }, "at least one pole"],
      [{ ...placed, poles: pair.slice(1) }, "conjugate"],
      [{ ...placed, poles: [...pair, { re: 5, im: 0 }] }, "left half plane"],
      [{ ...placed, poles: [{ re: -5, im: 0 }] }, "no more zeros than poles"],
      [{ ...placed, zeros: [...placedOnAxis(100)], zerosAtOrigin: 0 }, "atHz"],
    ],
  },
  movingAverage: { good: [bySeconds, { seconds: 3.3e-7 }], bad: badly(bySeconds, "seconds", notPositive) },
  sampleDifference: { good: [bySeconds, { seconds: 11 }], bad: badly(bySeconds, "seconds", notPositive) },
  twoSampleVariance: { good: [bySeconds, { seconds: 11 }], bad: badly(bySeconds, "seconds", notPositive) },
  recordMeanRemoved: { good: [bySeconds, { seconds: 11 }], bad: badly(bySeconds, "seconds", notPositive) },
  recordTrendRemoved: { good: [bySeconds, { seconds: 11 }], bad: badly(bySeconds, "seconds", notPositive) },
  sincDecimator: {
    good: [1, 2, 3, 6].map((order) => ({ order, ratio: 1 << (order + 1), modulatorRateHz: 2520981.2320096176 })),
    bad: [
      ...badly(decimator, "order", orders(12)),
      ...badly(decimator, "ratio", [1, 2.5, Number.NaN]),
      ...badly(decimator, "modulatorRateHz", notPositive),
    ],
  },
  averageOfReadings: {
    good: [readings, { count: 2, periodSeconds: 7 }],
    bad: [...badly(readings, "count", [1, 2.5, Number.NaN]), ...badly(readings, "periodSeconds", notPositive)],
  },
  firFilter: {
    good: [
      taps,
      { taps: [1], sampleRateHz: 3 },
      { taps: [1, -2, 1], sampleRateHz: 48e3 },
      { taps: Array.from({ length: 300 }, (_, k) => Math.cos(k) + 0.01 * k), sampleRateHz: 48e3 },
    ],
    bad: [
      ...badly(taps, "sampleRateHz", notPositive),
      ...badly(taps, "taps", [[], [1, Number.NaN], [1, Number.POSITIVE_INFINITY], [0, 0], 7]),
    ],
  },
  iirFilter: {
    good: [
      recursive,
      { numerator: [1, -1], denominator: [2, -1.9], sampleRateHz: 48e3 },
      { numerator: [2 ** -10], denominator: [1, 2 ** -10 - 1], sampleRateHz: 1 },
    ],
    bad: [
      ...badly(recursive, "sampleRateHz", notPositive),
      ...badly(recursive, "numerator", [[], [Number.NaN], [0]]),
      ...badly(recursive, "denominator", [[], [1, Number.NaN], [0, 1], [1, -1], [1, -2.1, 1.2], [1, 0, 1]]),
    ],
  },
  aWeighting: { good: [], bad: [] },
  cWeighting: { good: [], bad: [] },
  programmeWeighting: { good: [], bad: [] },
  telephoneWeighting: { good: [], bad: [] },
  gainTable: {
    good: [rows],
    bad: [
      [[], "at least two rows"],
      [rows.slice(0, 1), "at least two rows"],
      [rows.toReversed(), "Row 2"],
      [[{ frequencyHz: 0, gainDb: 0 }, ...rows], "Row 1"],
      [[...rows, { frequencyHz: Number.POSITIVE_INFINITY, gainDb: 0 }], "Row 4"],
      [[...rows, { frequencyHz: 2000, gainDb: Number.NEGATIVE_INFINITY }], "Row 4"],
      [[...rows, { frequencyHz: 1000, gainDb: 0 }], "Row 4"],
    ],
  },
  gain: {
    good: [{ factor: -20 }, { factor: 1e-9 }],
    bad: badly({ factor: 1 }, "factor", [0, Number.NaN, Number.POSITIVE_INFINITY, 1e200, "2"]),
  },
  cascade: { good: [], bad: [] },
};

/** Cascades of everything that has a form of its own. */
const cascades: readonly Weighting[] = [
  core.cascade(core.firstOrderLowPass(byCutoff), core.firstOrderHighPass({ cutoffHz: 2 }), core.gain({ factor: 0.1 })),
  core.cascade(core.movingAverage(bySeconds), core.butterworthLowPass({ order: 2, cutoffHz: 400 })),
  core.cascade(core.sincDecimator(decimator), core.firFilter({ taps: [0.25, 0.5, 0.25], sampleRateHz: 1e6 / 64 })),
  core.cascade(core.recordMeanRemoved(bySeconds), core.movingAverage({ seconds: 0.003 })),
  core.cascade(core.recordTrendRemoved(bySeconds), core.sampleDifference({ seconds: 0.007 }), core.gain({ factor: 3 })),
  core.cascade(core.gainTable(rows), core.telephoneWeighting(), core.gain({ factor: 2 })),
  core.cascade(core.gainTable(rows), core.resonator(centred)),
  core.cascade(core.cascade(core.aWeighting(), core.besselLowPass(byOrder)), core.polesAndZeros(placed)),
];

/** Every good weighting of a factory, with the options that made it. */
export function madeBy(name: string): readonly { readonly options: object | undefined; readonly made: Weighting }[] {
  if (name === "cascade") return cascades.map((made) => ({ options: undefined, made }));
  const { good } = cases[name] as Case;
  const options: readonly (object | undefined)[] = good.length === 0 ? [undefined] : good;
  return options.map((given) => ({ options: given, made: make(name, given) }));
}

/** Calls a factory of the roof by its name. */
export function make(name: string, options: unknown): Weighting {
  return (core as unknown as Record<string, (given: unknown) => Weighting>)[name]?.(options) as Weighting;
}

function placedOnAxis(hz: number): { readonly re: number; readonly im: number }[] {
  return [
    { re: 0, im: hz },
    { re: 0, im: -hz },
  ];
}
