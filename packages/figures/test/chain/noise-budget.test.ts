import {
  bandNoise,
  butterworthLowPass,
  cascade,
  curveFromPoints,
  DivergentIntegralError,
  firstOrderLowPass,
  OutOfDomainError,
  polyline,
  powerLaws,
  scaleSpectrum,
  whiteFlicker,
} from "@quietband/core";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import type { BudgetSource } from "../../src/chain/budget-options.js";
import type { NoiseBudget } from "../../src/chain/budget-result.js";
import { noiseBudget } from "../../src/chain/noise-budget.js";
import { quantization } from "../../src/chain/quantization.js";
import { statedNoise } from "../../src/chain/stated-noise.js";
import { thermalNoise } from "../../src/chain/thermal-noise.js";
import { tone } from "../../src/chain/tone.js";
import { demoPaths, demoTruth } from "./support/demo-truth.js";

const band = { fromHz: 0.1, toHz: 10 } as const;
const white = (floor: number) => whiteFlicker({ floor, cornerHz: 0 });
const share = (budget: NoiseBudget, name: string) => {
  const found = budget.shares.find((line) => line.name === name);
  if (found === undefined) throw new Error(`no share ${name}`);
  return found;
};

describe("the strain channel of the demonstration", () => {
  const truth = demoPaths.bridge_channel_rti;
  const weighting = butterworthLowPass({ order: 2, cutoffHz: 5 });
  const channel = (amplifier: "A1" | "J1", ratiometric = false): NoiseBudget =>
    noiseBudget({
      path: [{ name: "amplifier", gain: 250 }, { name: "filter", weighting }, { name: "converter" }],
      sources: [
        { source: thermalNoise({ ohms: 350, kelvin: 298.15 }), name: "bridge" },
        { source: demoTruth[amplifier], name: amplifier },
        ...(ratiometric
          ? []
          : [
              { source: demoTruth.X1, name: "X1", gain: 4e-3 / 5 },
              { source: demoTruth.R1, name: "R1", gain: (250 * 4e-3) / 4.096, enters: "filter" },
            ]),
      ],
      fromHz: 0.1,
      toHz: Number.POSITIVE_INFINITY,
    });

  test.each([
    ["bridge", "bridge 350 ohm, 298.15 K"],
    ["A1", "A1"],
    ["X1", "X1 x 4 mV/5 V"],
    ["R1", "R1 x 4 mV/4.096 V"],
  ])("%s contributes what the truth says, referred to the bridge", (name, key) => {
    expectRelative(share(channel("A1"), name).rms, truth[key] as number, 3e-6);
  });

  test("totals are those of the truth, with either amplifier and ratiometric", () => {
    expectRelative(channel("A1").rms, truth["total_with_A1"] as number, 3e-6);
    expectRelative(channel("J1").rms, truth["total_with_J1"] as number, 3e-6);
    expectRelative(share(channel("J1"), "J1").rms, truth["J1 instead"] as number, 3e-6);
    expectRelative(channel("A1", true).rms, truth["total_with_A1_ratiometric"] as number, 3e-6);
  });

  test("the amplifier decides and a better reference buys nothing", () => {
    const budget = channel("A1");
    expect(budget.shares.map(({ name }) => name)).toEqual(["A1", "bridge", "X1", "R1"]);
    expect(share(budget, "R1").totalIfHalved / budget.rms).toBeGreaterThan(0.998);
  });

  test("at the output everything is 250 times as large, and shares stay", () => {
    const options = {
      path: [{ name: "amplifier", gain: -250, weighting }],
      sources: [
        { source: white(5e-9), name: "a" },
        { source: white(1e-6), name: "b", enters: "output" },
      ],
      ...band,
    };
    const [input, output] = [noiseBudget(options), noiseBudget({ ...options, referredTo: "output" })];
    expectRelative(output.rms, 250 * input.rms, 1e-14);
    for (const { name, share: part } of input.shares) expectRelative(share(output, name).share, part, 1e-14);
    expectRelative(share(input, "b").rms, (1e-6 / 250) * Math.sqrt(9.9), 1e-14);
  });
});

test("a source passes its own filter and the stages from where it enters on", () => {
  const [own, one, two, last] = [20, 40, 80, 160].map((cutoffHz) => firstOrderLowPass({ cutoffHz })) as [
    ReturnType<typeof firstOrderLowPass>,
    ReturnType<typeof firstOrderLowPass>,
    ReturnType<typeof firstOrderLowPass>,
    ReturnType<typeof firstOrderLowPass>,
  ];
  const spectrum = whiteFlicker({ floor: 1e-9, cornerHz: 3 });
  const budget = noiseBudget({
    path: [
      { name: "one", gain: 10, weighting: one },
      { name: "two", gain: 5, weighting: two },
    ],
    sources: [
      { source: spectrum, name: "first", weighting: own },
      { source: spectrum, name: "second", enters: "two", gain: 3 },
    ],
    weighting: last,
    fromHz: 1,
    toHz: Number.POSITIVE_INFINITY,
    referredTo: "two",
  });
  const through = (weighting: ReturnType<typeof cascade>) =>
    bandNoise(spectrum, { fromHz: 1, toHz: Number.POSITIVE_INFINITY, weighting }).rms;
  expectRelative(share(budget, "first").rms, 10 * through(cascade(own, one, two, last)), 1e-12);
  expectRelative(share(budget, "second").rms, 3 * through(cascade(two, last)), 1e-12);
});

describe("shares", () => {
  const three = noiseBudget({
    sources: [
      { source: white(1e-9), name: "small" },
      { source: white(2e-9), name: "twin" },
      { source: white(2e-9), name: "other twin" },
    ],
    ...band,
  });

  test("add up to one, largest first, equal ones in the order given", () => {
    expect(three.shares.map(({ name, rank }) => [name, rank])).toEqual([
      ["twin", 1],
      ["other twin", 2],
      ["small", 3],
    ]);
    expectRelative(
      three.shares.reduce((sum, part) => sum + part.share, 0),
      1,
      1e-15,
    );
    expectRelative(three.shares[1]?.cumulativeShare ?? 0, 8 / 9, 1e-14);
    expectRelative(three.rms, 3e-9 * Math.sqrt(9.9), 1e-14);
  });

  test("halving a source gives the total of a budget with half of it", () => {
    const sources = [white(1e-9), whiteFlicker({ floor: 3e-9, cornerHz: 2 })];
    const correlations = [{ between: ["a", "b"] as const, coefficient: -0.4 }];
    const withGain = (gain: number) =>
      noiseBudget({
        sources: [
          { source: sources[0] as (typeof sources)[0], name: "a" },
          { source: sources[1] as (typeof sources)[0], name: "b", gain },
        ],
        correlations,
        ...band,
      });
    expectRelative(share(withGain(1), "b").totalIfHalved, withGain(0.5).rms, 1e-12);
  });
});

describe("correlation", () => {
  const pair = (coefficient: number, gains: readonly [number, number], same = true): NoiseBudget =>
    noiseBudget({
      sources: [
        { source: white(3e-9), name: "a", gain: gains[0] },
        { source: same ? white(4e-9) : whiteFlicker({ floor: 4e-9, cornerHz: 5 }), name: "b", gain: gains[1] },
      ],
      correlations: [{ between: ["a", "b"], coefficient }],
      ...band,
    });

  test("adds amplitudes at 1, takes them away at −1 or against the gains, and does nothing at 0", () => {
    const width = Math.sqrt(9.9);
    expectRelative(pair(1, [1, 1]).rms, 7e-9 * width, 1e-13);
    expectRelative(pair(-1, [1, 1]).rms, 1e-9 * width, 1e-12);
    expectRelative(pair(1, [1, -1]).rms, 1e-9 * width, 1e-12);
    expectRelative(pair(0, [1, 1]).rms, 5e-9 * width, 1e-15);
    expectRelative(pair(0.5, [1, 1]).rms, Math.sqrt(37) * 1e-9 * width, 1e-13);
  });

  test("acts at every frequency: unlike spectra share less than their powers would allow", () => {
    const grid = 20_000;
    let cross = 0;
    for (let k = 0; k < grid; k += 1) {
      const hz = 0.1 * 100 ** ((k + 0.5) / grid);
      cross += (3e-9 * 4e-9 * Math.sqrt(1 + 5 / hz) * hz * Math.log(100)) / grid;
    }
    const budget = pair(1, [1, 1], false);
    const alone = budget.shares.reduce((sum, { rms }) => sum + rms * rms, 0);
    expectRelative(budget.power, alone + 2 * cross, 1e-6);
  });

  test("one source on two ways of opposite sign cancels, and the rest is the budget", () => {
    const drift = whiteFlicker({ floor: 1e-6, cornerHz: 30 });
    const budget = noiseBudget({
      sources: [
        { source: drift, name: "to the bridge", gain: 0.3 },
        { source: drift, name: "to the converter", gain: -0.3 },
        { source: white(1e-9), name: "bridge" },
      ],
      correlations: [{ between: ["to the bridge", "to the converter"], coefficient: 1 }],
      ...band,
    });
    expectRelative(budget.rms, 1e-9 * Math.sqrt(9.9), 1e-8);
    expect(Math.abs(budget.rms / (1e-9 * Math.sqrt(9.9)) - 1)).toBeLessThanOrEqual(budget.numericalError);
  });

  test("coefficients that contradict each other are refused", () => {
    const three = [white(1e-9), white(1e-9), white(1e-9)].map((source, index) => ({ source, name: `s${index}` }));
    const among = (ab: number, bc: number, ca: number) => () =>
      noiseBudget({
        sources: three,
        correlations: [
          { between: ["s0", "s1"], coefficient: ab },
          { between: ["s1", "s2"], coefficient: bc },
          { between: ["s2", "s0"], coefficient: ca },
        ],
        ...band,
      });
    expect(among(0.9, 0.9, -0.9)).toThrow(OutOfDomainError);
    expect(among(-0.6, -0.6, -0.6)).toThrow(/positive semidefinite/);
    expect(among(1, 1, 1)().rms).toBeGreaterThan(0);
    expectRelative(among(-0.5, -0.5, -0.5)().rms + 1, 1, 1e-12);
  });
});

test("tones add in power to the RMS and in amplitude to the peak-to-peak value, and the band decides which", () => {
  const budget = noiseBudget({
    sources: [
      { source: white(1e-6), name: "noise" },
      { source: tone({ frequencyHz: 5, amplitude: 2e-6 }), name: "hum", weighting: firstOrderLowPass({ cutoffHz: 5 }) },
      { source: tone({ frequencyHz: 7, amplitude: 1e-6, name: "beat" }) },
      { source: tone({ frequencyHz: 50, amplitude: 1 }), name: "outside" },
    ],
    ...band,
  });
  expectRelative(budget.power, 9.9e-12 + 1e-12 + 0.5e-12, 1e-13);
  expectRelative(budget.peakToPeak.random, 6.6e-6 * Math.sqrt(9.9), 1e-13);
  expectRelative(budget.peakToPeak.tones, (4 * Math.SQRT1_2 + 2) * 1e-6, 1e-13);
  expectRelative(budget.peakToPeak.total, budget.peakToPeak.random + budget.peakToPeak.tones, 1e-15);
  expect(share(budget, "outside").rms).toBe(0);
});

describe("uncertainty", () => {
  const curve = curveFromPoints(
    [1, 10, 100].map((frequency) => ({ frequency, density: 5e-9 })),
    { unit: "V", pointUncertainty: 0.1 },
  );
  const points = polyline(curve, { beyond: "hold" });

  test("the total's is that of its shares in quadrature", () => {
    const own = bandNoise(points, band).standardUncertainty ?? 0;
    const budget = noiseBudget({
      sources: [
        { source: points, name: "curve", standardUncertainty: 0.03 },
        { source: white(5e-9), name: "exact" },
        { source: statedNoise({ rms: 5e-9 * Math.sqrt(9.9), standardUncertainty: 0.2 }), name: "stated" },
      ],
      ...band,
    });
    expectRelative(budget.standardUncertainty ?? 0, Math.hypot(own / 3, 0.03 / 3, 0.2 / 3), 1e-12);
    expectRelative(budget.uncertaintyCovers, 2 / 3, 1e-12);
    expect(budget.expandedUncertainty?.coverageFactor).toBe(2);
    expect(budget.notes.some((note) => note.includes("66.7 %"))).toBe(true);
  });

  test("a curve that is used twice errs twice in the same direction", () => {
    const own = bandNoise(points, band).standardUncertainty ?? 0;
    const twice = noiseBudget({
      sources: [
        { source: points, name: "one" },
        { source: scaleSpectrum(points, 2), name: "other" },
      ],
      ...band,
    });
    expectRelative(twice.standardUncertainty ?? 0, own, 1e-12);
  });

  test("is missing where no source states one", () => {
    expect("standardUncertainty" in noiseBudget({ sources: [{ source: white(1e-9) }], ...band })).toBe(false);
  });
});

test("the spread from part to part stands on its own line, with the stated factors or none", () => {
  const sources: BudgetSource[] = [
    { source: white(3e-9), name: "a", partFactor: 1.5 },
    { source: white(4e-9), name: "b" },
  ];
  const budget = noiseBudget({ sources, ...band });
  expectRelative(budget.partSpread.rms ?? 0, Math.hypot(4.5e-9, 4e-9) * Math.sqrt(9.9), 1e-14);
  expect(budget.partSpread.text).toContain("a × 1.5 as stated; of the others not included");
  expect(noiseBudget({ sources: [{ source: white(1e-9) }], ...band }).partSpread).toEqual({ text: "not included" });
});

test("a total in the measured quantity is the total through the gain with a unit", () => {
  const budget = noiseBudget({ sources: [{ source: white(1e-9) }], measured: { unit: "µε", perUnit: 4e5 }, ...band });
  expectRelative(budget.measured?.rms ?? 0, 4e5 * budget.rms, 1e-15);
  expectRelative(budget.measured?.peakToPeak ?? 0, 4e5 * budget.peakToPeak.total, 1e-15);
});

describe("a target", () => {
  const sources = [
    { source: white(10e-9), name: "white" },
    { source: statedNoise({ rms: 6e-8 }), name: "stated" },
  ];

  test("names the upper band edge that meets it", () => {
    const { target } = noiseBudget({ sources, fromHz: 0, toHz: 400, target: { rms: 1e-7 } });
    expect(target?.met).toBe(false);
    expectRelative(target?.toHz ?? 0, 64, 1e-12);
  });

  test("names the cutoff of a family of filters", () => {
    const family = (cutoffHz: number) => firstOrderLowPass({ cutoffHz });
    const { target } = noiseBudget({
      sources,
      fromHz: 0,
      toHz: Number.POSITIVE_INFINITY,
      weighting: family(10),
      target: { rms: 1e-7, family },
    });
    expect(target?.met).toBe(true);
    expectRelative(target?.cutoffHz ?? 0, (64 * 2) / Math.PI, 1e-11);
  });

  test("is met with correlated sources and different filters where the total is the target", () => {
    const options = {
      sources: [
        {
          source: whiteFlicker({ floor: 10e-9, cornerHz: 3 }),
          name: "a",
          weighting: firstOrderLowPass({ cutoffHz: 50 }),
        },
        { source: white(8e-9), name: "b" },
      ],
      correlations: [{ between: ["a", "b"] as const, coefficient: -0.7 }],
      fromHz: 0.1,
    };
    const toHz = noiseBudget({ ...options, toHz: 10, target: { rms: 5e-8 } }).target?.toHz ?? 0;
    expectRelative(noiseBudget({ ...options, toHz }).rms, 5e-8, 1e-11);
  });

  test("is met among a hundred curves that bend at places of their own, each through its own filter", () => {
    const curves = Array.from({ length: 100 }, (_, k) => ({
      name: `curve ${k}`,
      source: polyline(
        curveFromPoints(
          [0.1, 1.1 + k / 100, 30 + k, 1e4].map((frequency) => ({ frequency, density: 1e-9 * (1 + 3 / frequency) })),
          { unit: "V" },
        ),
      ),
      weighting: k % 2 === 0 ? undefined : firstOrderLowPass({ cutoffHz: 100 + k }),
    }));
    const toHz = noiseBudget({ sources: curves, fromHz: 0.1, toHz: 1e3, target: { rms: 1e-7 } }).target?.toHz ?? 0;
    expectRelative(noiseBudget({ sources: curves, fromHz: 0.1, toHz }).rms, 1e-7, 1e-12);
  });

  test("that stated figures alone exceed is met by no bandwidth, and says so", () => {
    const { target } = noiseBudget({ sources, fromHz: 0, toHz: 400, target: { rms: 5e-8 } });
    expect(target).not.toHaveProperty("toHz");
    expect(target?.text).toContain("60.00 nV");
  });
});

test("the other noise is compared with half a step of the converter", () => {
  const through = (floor: number) =>
    noiseBudget({
      path: [{ name: "amplifier", gain: 100 }],
      sources: [
        { source: white(floor), name: "sensor" },
        { source: quantization({ lsb: 1e-6, sampleRateHz: 1000 }), enters: "output" },
      ],
      fromHz: 0,
      toHz: 500,
    }).notes.some((note) => note.includes("follows the signal"));
  const halfStep = 0.5e-6 / 100 / Math.sqrt(500);
  expect(through(0.99 * halfStep)).toBe(true);
  expect(through(1.01 * halfStep)).toBe(false);
});

test("the result is plain data: the same after a round trip through JSON", () => {
  const budget = noiseBudget({
    sources: [
      { source: thermalNoise({ ohms: 1e3 }), partFactor: 1.1 },
      { source: powerLaws([{ coefficient: 1e-15, exponent: 2 }]), name: "drift", standardUncertainty: 0.2 },
      { source: tone({ frequencyHz: 1, amplitude: 1e-7 }) },
    ],
    fromHz: 0.1,
    toHz: Number.POSITIVE_INFINITY,
    weighting: butterworthLowPass({ order: 2, cutoffHz: 5 }),
    measured: { unit: "µg", perUnit: 1e6 },
    target: { rms: 1e-6 },
  });
  expect(JSON.parse(JSON.stringify(budget))).toStrictEqual(budget);
  expect(budget.toHz).toBe("Infinity");
});

test("any order of the sources gives the same total and the same shares", () => {
  fc.assert(
    fc.property(
      fc.array(fc.double({ min: 1e-12, max: 1e-3, noNaN: true }), { minLength: 2, maxLength: 12 }),
      (floors) => {
        const sources = floors.map((floor, index) => ({ source: white(floor), name: `s${index}` }));
        const [one, other] = [
          noiseBudget({ sources, ...band }),
          noiseBudget({ sources: sources.toReversed(), ...band }),
        ];
        expectRelative(other.rms, one.rms, 1e-14);
        for (const { name, share: part } of one.shares) expectRelative(share(other, name).share, part, 1e-13);
      },
    ),
    { seed: 5, numRuns: 60 },
  );
});

describe("refusals say what to do", () => {
  const one = { source: white(1e-9), name: "a" };
  test.each([
    ["no sources", { sources: [], ...band }, /at least one source/],
    ["two of one name", { sources: [one, one], ...band }, /different names/],
    [
      "units that do not meet",
      { sources: [one, { source: powerLaws([{ coefficient: 1, exponent: 0 }], { unit: "A" }), name: "i" }], ...band },
      /in A where the others are in V/,
    ],
    ["a stage that is not there", { sources: [{ ...one, enters: "filter" }], ...band }, /input, output/],
    ["an unknown place", { sources: [one], referredTo: "nowhere", ...band }, /no stage/],
    ["an unknown option", { sources: [one], bandwidth: 3, ...band }, /knows no option/],
    [
      "a correlation with a stranger",
      { sources: [one], correlations: [{ between: ["a", "z"] as const, coefficient: 0.1 }], ...band },
      /no source of the budget/,
    ],
    ["a factor below 1", { sources: [{ ...one, partFactor: 0.5 }], ...band }, /partFactor/],
    ["crossed edges", { sources: [one], fromHz: 10, toHz: 1 }, /toHz/],
  ])("%s", (_, options, message) => {
    expect(() => noiseBudget(options)).toThrow(message);
  });

  test("an integral that diverges names the source", () => {
    const sources = [one, { source: whiteFlicker({ floor: 1e-9, cornerHz: 1 }), name: "drifting" }];
    expect(() => noiseBudget({ sources, fromHz: 0, toHz: 10 })).toThrow(DivergentIntegralError);
    expect(() => noiseBudget({ sources, fromHz: 0, toHz: 10 })).toThrow(/^Source "drifting": /);
  });
});

test("a gain beyond the range of numbers is refused, not turned into nothing or into infinity", () => {
  for (const gain of [1e200, 1e-200])
    expect(() => noiseBudget({ sources: [{ source: white(1e-9), name: "a", gain }], ...band })).toThrow(
      /^Source "a": its gain/,
    );
});
