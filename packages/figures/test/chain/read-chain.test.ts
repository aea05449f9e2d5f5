import { readFileSync } from "node:fs";
import {
  butterworthLowPass,
  type Curve,
  cascade,
  firstOrderLowPass,
  fitCurve,
  NoiseError,
  polyline,
  powerLaws,
  readCurve,
  secondOrderLowPass,
  whiteFlicker,
} from "@quietband/core";
import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { amplifierStage } from "../../src/chain/amplifier-stage.js";
import type { NoiseBudgetOptions } from "../../src/chain/budget-options.js";
import { noiseAcross } from "../../src/chain/noise-across.js";
import { noiseBudget } from "../../src/chain/noise-budget.js";
import { parallelParts } from "../../src/chain/parallel-parts.js";
import { quantization } from "../../src/chain/quantization.js";
import { readChain } from "../../src/chain/read-chain.js";
import { referenceSpectrum } from "../../src/chain/reference-spectrum.js";
import { resistorExcessNoise } from "../../src/chain/resistor-excess-noise.js";
import { shotNoise } from "../../src/chain/shot-noise.js";
import { statedNoise } from "../../src/chain/stated-noise.js";
import { thermalNoise } from "../../src/chain/thermal-noise.js";
import { tone } from "../../src/chain/tone.js";
import { everyKind } from "./support/every-kind.js";

const demoFile = (name: string): string =>
  readFileSync(new URL(`../../../../fixtures/demo/${name}`, import.meta.url), "utf8");
const loadCurve = (file: string): Curve => readCurve(demoFile(file));

test("the strain channel of the demonstration, from its file: the amplifier decides, 18 nV in all", () => {
  const { title, budget } = readChain(demoFile("strain-channel.json"), { loadCurve });
  expect(title).toContain("INVENTED");
  const found = noiseBudget(budget);
  // Typed points, not the truth: 18.13 nV by the truth models, within the 5 % of a point.
  expectRelative(found.rms, 18.13e-9, 0.02);
  expect(found.shares[0]?.name).toBe("amplifier A1");
  expect(found.target?.met).toBe(true);
});

test("every kind of source in a file is the one made by hand", () => {
  const a1 = loadCurve("A1.csv");
  const model = (floor: number, cornerHz: number, unit = "V") => whiteFlicker({ floor, cornerHz, unit });
  const low = (cutoffHz: number) => firstOrderLowPass({ cutoffHz });
  const stage = amplifierStage({
    name: "stage",
    connection: "nonInverting",
    voltageNoise: model(20e-9, 200),
    currentNoise: model(0.5e-12, 2000, "A"),
    invertingCurrentNoise: model(0.7e-12, 2000, "A"),
    groundOhms: 100e3,
    feedbackOhms: 200e3,
    sourceOhms: 68e3,
    gainBandwidthHz: 1e6,
    inputFarads: 5e-12,
    feedbackFarads: 1e-12,
    celsius: 25,
  });
  const references = [
    referenceSpectrum({
      spectrum: polyline(loadCurve("R1.csv"), { beyond: { above: 0, below: 1 } }),
      referenceVolts: 4.096,
      input: { kind: "sine", amplitude: 1, frequencyHz: 130, offset: 0.5 },
      fromHz: 0.1,
      referenceWeighting: low(30),
      biasVolts: 0.1,
      leaveOutHz: 0.1,
    }),
    referenceSpectrum({
      spectrum: model(50e-9, 10),
      referenceVolts: 5,
      input: { kind: "dc", volts: 1 },
      fromHz: 0.1,
      converter: "sampler",
      sampleRateHz: 20e3,
      referenceWeighting: low(100e3),
    }),
  ] as const;
  const [reference, sampled] = references;
  if (reference === undefined || sampled === undefined) throw new Error("a reference is not seen");
  const byHand: NoiseBudgetOptions = {
    fromHz: 0.1,
    toHz: 1000,
    path: [
      { name: "amplifier", gain: 100, weighting: low(20e3) },
      {
        name: "filter",
        gain: 2,
        weighting: cascade(
          butterworthLowPass({ order: 3, cutoffHz: 400 }),
          secondOrderLowPass({ naturalHz: 2000, q: 0.6 }),
        ),
      },
    ],
    weighting: low(3000),
    sources: [
      { source: parallelParts(polyline(a1, { beyond: { above: 0, below: 1 } }), 4), name: "curve" },
      {
        source: fitCurve(a1, { model: "floorAndFlicker", exponent: 1, toHz: 10e3, beyond: "segments" }),
        name: "fitted",
      },
      {
        source: whiteFlicker({ floor: 7e-9, cornerHz: 3, exponent: 1.1 }),
        name: "model",
        standardUncertainty: 0.05,
        partFactor: 1.4,
      },
      { source: thermalNoise({ ohms: 350, celsius: 25 }), name: "resistor", gain: 4e-3 / 5 },
      { source: resistorExcessNoise({ volts: 2.5, noiseIndexDb: -20 }), name: "excess", enters: "filter" },
      { source: noiseAcross(shotNoise({ amperes: 1e-6 }), { ohms: 10e3 }), name: "shot" },
      { source: noiseAcross(model(0.5e-12, 2000, "A"), { ohms: 47e3 }), name: "current" },
      ...stage.parts.map((part) => ({ ...part, enters: "filter" })),
      { source: quantization({ lsb: 20e-6, sampleRateHz: 2000 }), name: "rounding", enters: "output" },
      { source: tone({ amplitude: 1e-6, frequencyHz: 50 }), name: "hum" },
      {
        source: tone({ peakToPeak: 10e-3, frequencyHz: 500, shape: "triangle" }),
        name: "switching",
        enters: "output",
      },
      { source: statedNoise({ rms: 1e-6, fromHz: 0.1, toHz: 1000 }), name: "stated", enters: "output" },
      {
        source: statedNoise({ peakToPeak: 7e-6, convention: { factor: 6.6 }, fromHz: 0.1, toHz: 10 }),
        name: "stated swing",
        enters: "output",
      },
      { source: reference, name: "reference", enters: "output" },
      { source: sampled, name: "sampled reference", enters: "output" },
    ],
    correlations: [{ between: ["model", "resistor"], coefficient: -0.3 }],
    measured: { unit: "µε", perUnit: 4e5 },
    target: { rms: 1e-6 },
  };
  const [read, made] = [noiseBudget(readChain(everyKind, { loadCurve }).budget), noiseBudget(byHand)];
  expect(read.shares.map(({ name }) => name)).toEqual(made.shares.map(({ name }) => name));
  for (const [index, { name, rms }] of made.shares.entries())
    expectRelative(read.shares[index]?.rms ?? 0, rms, 1e-13, name);
  expectRelative(read.rms, made.rms, 1e-13);
  expectRelative(read.standardUncertainty ?? 0, made.standardUncertainty ?? 1, 1e-9);
  expect(read.partSpread).toEqual(made.partSpread);
});

describe("gains", () => {
  const withGain = (gain: unknown, floor = "1 nV/√Hz") =>
    readChain({
      title: "t",
      band: "1 Hz : 2 Hz",
      sources: [{ name: "s", kind: "model", floor, corner: "0 Hz", gain }],
    }).budget.sources[0];
  test("are numbers, ratios or dB, and a ratio may change the unit", () => {
    expect(withGain(-3)?.gain).toBe(-3);
    expectRelative(withGain("4 mV / 5 V")?.gain ?? 0, 8e-4, 1e-15);
    expectRelative(withGain("-20 dB")?.gain ?? 0, 0.1, 1e-15);
    expect(withGain("10 mV / 1 g", "5 µg/√Hz")).toMatchObject({ gain: 0.01, unit: "V" });
  });
  test.each(["10", "10 V", "1 V / 0 V", "1 V / 2", "1 V / 2 V / 3 V", "10 mV / 1 g"])("%s is refused", (gain) => {
    expect(() => withGain(gain)).toThrow(/^At \/sources\/0\/gain: /);
  });
});

test("an input of 0 V does not see its reference", () => {
  const { budget } = readChain({
    title: "t",
    band: "1 Hz : 2 Hz",
    sources: [
      { name: "white", kind: "model", floor: "1 nV/√Hz", corner: "0 Hz" },
      {
        name: "reference",
        kind: "reference",
        noise: { kind: "model", floor: "1 µV/√Hz", corner: "9 Hz" },
        voltage: "5 V",
        input: { kind: "dc", level: "0 V" },
      },
    ],
  });
  expectRelative(noiseBudget(budget).rms, 1e-9, 1e-14);
});

type Json = null | boolean | number | string | readonly Json[] | { readonly [key: string]: Json };

/** Every mutation of one kind: the file with one thing changed, and where. */
function* mutations(value: Json, pointer = ""): Generator<{ readonly what: string; readonly file: Json }> {
  if (typeof value !== "object" || value === null) return;
  const replaced = (key: string, inner: Json): Json =>
    Array.isArray(value)
      ? value.map((each: Json, index) => (String(index) === key ? inner : each))
      : { ...(value as Readonly<Record<string, Json>>), [key]: inner };
  for (const [key, inner] of Object.entries(value)) {
    const at = `${pointer}/${key}`;
    for (const wrong of [null, true, [], [[]], {}, "", "?", -1e308])
      if (JSON.stringify(wrong) !== JSON.stringify(inner))
        yield { what: `${at} = ${JSON.stringify(wrong)}`, file: replaced(key, wrong) };
    if (!Array.isArray(value)) {
      const { [key]: _, ...rest } = value as Readonly<Record<string, Json>>;
      yield { what: `${at} misspelt`, file: { ...rest, [`${key}s`]: inner } };
    }
    if (typeof inner === "string" && /^-?\d/.test(inner)) {
      const other = inner.includes("V") ? "1 Hz" : "1 V";
      for (const wrong of [inner.replace(/[^\d.: e-]/g, "").trim(), other, `${inner} extra`, "NaN V", "1e999 V"])
        if (wrong !== inner) yield { what: `${at} = ${wrong}`, file: replaced(key, wrong) };
    }
    for (const { what, file } of mutations(inner, at)) yield { what, file: replaced(key, file) };
  }
}

describe("a malformed chain file never gives a number", () => {
  const all = [...mutations(everyKind)].filter(
    // Free texts and plain factors that stay what they are supposed to be, with another meaning.
    ({ what }) =>
      !/(title|\/name|\/unit) = "\?"$/.test(what) &&
      !/(perUnit|\/path\/1\/gain|\/(above|below)) = -1e\+308$/.test(what),
  );

  test("there are well over 200 mutations", () => expect(all.length).toBeGreaterThan(1000));

  test("each is refused in a sentence that names a place", () => {
    const numbers: string[] = [];
    const strangers: string[] = [];
    for (const { what, file } of all)
      try {
        numbers.push(`${what}: ${noiseBudget(readChain(file, { loadCurve }).budget).rms}`);
      } catch (error) {
        const said = error instanceof NoiseError && /^At |^Source "|stage|correlation|measured/.test(error.message);
        if (!said) strangers.push(`${what}: ${String(error)}`);
      }
    expect(numbers).toEqual([]);
    expect(strangers).toEqual([]);
  });

  test("text that is cut short or has a bracket changed is no JSON, and says so", () => {
    const text = JSON.stringify(everyKind);
    for (let cut = 1; cut < text.length; cut += 37)
      expect(() => readChain(text.slice(0, cut), { loadCurve }), String(cut)).toThrow(/must be JSON/);
  });

  test.each(["null", "[]", "3", '"chain"', ""])("%j is no chain", (text) => {
    expect(() => readChain(text)).toThrow(NoiseError);
  });
});

test.each([
  ["a missing key", { sources: undefined }, 'At the top of the file: "sources" is missing'],
  [
    "an unknown kind",
    { sources: [{ name: "x", kind: "wishes" }] },
    "At /sources/0/kind: expected curve, model, resistor",
  ],
  [
    "a wrong unit",
    { sources: [{ name: "x", kind: "resistor", resistance: "350 V" }] },
    'At /sources/0/resistance: expected a quantity in Ω, its unit written out; got "350 V", which is in V.',
  ],
  [
    "no unit",
    { sources: [{ name: "x", kind: "resistor", resistance: "350" }] },
    'At /sources/0/resistance: expected a quantity in Ω, its unit written out; got "350".',
  ],
  [
    "a resistance without a temperature",
    { temperature: undefined, sources: [{ name: "x", kind: "resistor", resistance: "350 Ω" }] },
    'At /sources/0: a resistance needs the chain\'s "temperature", for instance "25 °C".',
  ],
  [
    "a curve without a loader",
    { sources: [{ name: "x", kind: "curve", file: "A1.csv" }] },
    'At /sources/0/file: the curve "A1.csv" must be loaded by the caller; give readChain a loadCurve.',
  ],
  [
    "a filter of a stage that cannot be",
    { path: [{ name: "f", filter: { kind: "Butterworth low-pass", order: 99, cutoff: "1 Hz" } }] },
    "At /path/0/filter: ",
  ],
  ["a target in another unit", { target: "20 A" }, "At /target: expected a quantity in V"],
])("%s is named by its place", (_, change, message) => {
  const file = JSON.stringify({
    title: "t",
    band: "1 Hz : 2 Hz",
    temperature: "25 °C",
    sources: [{ name: "s", kind: "model", floor: "1 nV/√Hz", corner: "0 Hz" }],
    ...change,
  });
  let said = "";
  try {
    readChain(file);
  } catch (error) {
    said = error instanceof NoiseError ? error.message : String(error);
  }
  expect(said).toContain(message);
});

test("a key that stands twice in one record is refused, where a parser would take the last in silence", () => {
  const twice = '{ "title": "t", "band": "1 Hz : 2 Hz", "band" : "1 Hz : 2 kHz", "sources": [] }';
  expect(() => readChain(twice)).toThrow(/"band" stands twice/);
  const escaped = '{ "title": "t", "b\\u0061nd": "1 Hz : 2 Hz", "band": "1 Hz : 2 kHz", "sources": [] }';
  expect(() => readChain(escaped)).toThrow(/"band" stands twice/);
});

test("a filter on a stated figure is refused: it has no density", () => {
  const { budget } = readChain({
    title: "t",
    band: "1 Hz : 2 Hz",
    sources: [
      {
        name: "s",
        kind: "stated rms",
        rms: "1 V",
        band: "1 Hz : 2 Hz",
        filter: { kind: "first-order low-pass", cutoff: "1 Hz" },
      },
    ],
  });
  expect(() => noiseBudget(budget)).toThrow(/^Source "s": a stated figure/);
});

test("plain currents stay apart from voltages", () => {
  const { budget } = readChain({
    title: "t",
    band: "1 Hz : 101 Hz",
    sources: [{ name: "s", kind: "model", floor: "1 pA/√Hz", corner: "0 Hz" }],
  });
  expect(noiseBudget(budget).unit).toBe("A");
  expectRelative(
    noiseBudget(budget).rms,
    noiseBudget({
      sources: [{ source: powerLaws([{ coefficient: 1e-24, exponent: 0 }], { unit: "A" }) }],
      fromHz: 1,
      toHz: 101,
    }).rms,
    1e-14,
  );
});
