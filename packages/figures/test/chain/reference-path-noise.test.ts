import {
  bandNoise,
  butterworthLowPass,
  curveFromPoints,
  firFilter,
  firstOrderLowPass,
  foldedSpectrum,
  functionSpectrum,
  OutOfDomainError,
  polyline,
  type Spectrum,
  sumSpectra,
  whiteFlicker,
} from "@quietband/core";
import { describe, expect, test } from "vitest";
import { normalFrom, uniformFrom } from "../../../../test/support/random.js";
import { expectRelative } from "../../../../test/support/relative.js";
import { edgeOf, type ReferenceSpectrum, referenceCases, spectrumOf } from "../../../../test/support/vectors.js";
import { noiseBudget } from "../../src/chain/noise-budget.js";
import { quantization } from "../../src/chain/quantization.js";
import { referencePathNoise } from "../../src/chain/reference-path-noise.js";
import type { ReferencePathOptions } from "../../src/chain/reference-path-options.js";
import { demoPaths, demoTruth } from "./support/demo-truth.js";

// 10 µV RMS from 0 to 10 kHz at 2.5 V.
const reference = { spectrum: whiteFlicker({ floor: 100e-9, cornerHz: 0 }), referenceVolts: 2.5 };
const band = { fromHz: 0, toHz: 10e3 };
const sine = (amplitude: number, frequencyHz: number, offset?: number) =>
  ({ kind: "sine", amplitude, frequencyHz, ...(offset !== undefined && { offset }) }) as const;

describe("facts of the trade (common practice, no source): 2.5 V, 10 µV RMS", () => {
  test.each([
    ["0 V", { kind: "dc", volts: 0 }, 0],
    ["1 V dc", { kind: "dc", volts: 1 }, 4e-6],
    ["2.5 V dc", { kind: "dc", volts: 2.5 }, 10e-6],
    ["−2.5 V dc", { kind: "dc", volts: -2.5 }, 10e-6],
    ["2.5 V peak at 1 kHz", sine(2.5, 1e3), 10e-6 * Math.SQRT1_2],
  ] as const)("%s", (_, input, expected) => {
    const found = referencePathNoise({ ...reference, ...band, input });
    expectRelative(found.byRule, expected, 1e-14);
    // A tone within the band loses what its upper side carries out of it and gains the image: white noise keeps count.
    expectRelative(found.rms, expected, 1e-14);
  });

  test("the tilt channel of the demonstration sees its reference by half", () => {
    const path = {
      spectrum: demoTruth.R1,
      referenceVolts: 4.096,
      fromHz: 0.1,
      toHz: Number.POSITIVE_INFINITY,
      weighting: butterworthLowPass({ order: 2, cutoffHz: 5 }),
    };
    expectRelative(referencePathNoise({ ...path, input: { kind: "dc", volts: 2.048 } }).rms, demoPaths.R1_half, 3e-6);
    expectRelative(referencePathNoise({ ...path, input: { kind: "dc", volts: 4.096 } }).rms, demoPaths.R1_full, 3e-6);
  });
});

// Reference noise that is white up to half the rate, in samples: the time-domain twin of quantization().
const rate = 10e3;
const lsb = 10e-6 * Math.sqrt(12);
const sampledWhite = quantization({ lsb, sampleRateHz: rate });
const rmsOf = (values: readonly number[]): number =>
  Math.sqrt(values.reduce((sum, value) => sum + value * value, 0) / values.length);
const filtered = (values: readonly number[], taps: readonly number[]): number[] =>
  values
    .slice(taps.length)
    .map((_, k) => taps.reduce((sum, tap, i) => sum + tap * (values[k + taps.length - i] as number), 0));

describe("in time", () => {
  const count = 400_000;
  const noiseOf = (seed: number, correlation = 0): number[] => {
    const normal = normalFrom(uniformFrom(seed));
    const own = Math.sqrt(1 - correlation * correlation);
    let last = normal();
    return Array.from({ length: count }, () => {
      last = correlation * last + own * normal();
      return 10e-6 * last;
    });
  };
  // A converter divides; the noise of the result in volts at the input.
  const seenBy = (input: (seconds: number) => number, noise: readonly number[]): number[] =>
    noise.map((n, k) => input(k / rate) - (input(k / rate) * 2.5) / (2.5 + n));
  const taps = Array.from({ length: 16 }, () => 1 / 16);
  const weighting = firFilter({ taps, sampleRateHz: rate });
  const path: Omit<ReferencePathOptions, "input"> = {
    spectrum: sampledWhite,
    referenceVolts: 2.5,
    fromHz: 0,
    // Sidebands beyond half the rate fold in samples; the filter repeats at the rate and weighs them as it should.
    toHz: rate,
  };

  test("2.5 V peak at 1 kHz gives 7.07 µV", () => {
    const simulated = rmsOf(seenBy((t) => 2.5 * Math.sin(2 * Math.PI * 1e3 * t), noiseOf(1)));
    expectRelative(simulated, 10e-6 * Math.SQRT1_2, 0.005);
    expectRelative(simulated, referencePathNoise({ ...path, input: sine(2.5, 1e3) }).rms, 0.005);
  });

  test("a tone that the digital filter rejects still brings noise in, on a dc part and beside it", () => {
    const seen = seenBy((t) => 0.4 + 1.5 * Math.sin(2 * Math.PI * 3.1e3 * t), noiseOf(2));
    const found = referencePathNoise({ ...path, input: sine(1.5, 3.1e3, 0.4), weighting });
    expectRelative(rmsOf(filtered(seen, taps)), found.rms, 0.01);
  });

  test("noise with a colour: what lies around the rejected tone counts, and the rule is far off", () => {
    // First-order noise in samples: S = σ²(1 − r²)/(1 − 2r cos + r²) · 2/rate.
    const r = 0.9;
    const spectrum = functionSpectrum(
      (hz) =>
        hz > rate / 2
          ? 0
          : ((2 / rate) * 1e-10 * (1 - r * r)) / (1 - 2 * r * Math.cos((2 * Math.PI * hz) / rate) + r * r),
      { knots: [300, rate / 2], lowExponent: 0, highExponent: 100 },
    );
    const found = referencePathNoise({ ...path, spectrum, input: sine(1.5, 3.1e3), weighting });
    const seen = seenBy((t) => 1.5 * Math.sin(2 * Math.PI * 3.1e3 * t), noiseOf(3, r));
    expectRelative(rmsOf(filtered(seen, taps)), found.rms, 0.015);
    expect(found.byRule / found.rms).toBeGreaterThan(3);
  });

  test("a sampler takes all of a wideband reference into its samples: noise through one pole, sampled, is first-order in time", () => {
    const pole = 800;
    const wide = whiteFlicker({ floor: 10e-6 / Math.sqrt((Math.PI / 2) * pole), cornerHz: 0 });
    const sampler = {
      spectrum: wide,
      referenceVolts: 2.5,
      converter: "sampler",
      sampleRateHz: rate,
      referenceWeighting: firstOrderLowPass({ cutoffHz: pole }),
      fromHz: 0,
      toHz: rate / 2,
    } as const;
    const noise = noiseOf(4, Math.exp((-2 * Math.PI * pole) / rate));
    const input = sine(1.5, 3.1e3, 0.7);
    const seen = seenBy((t) => 0.7 + 1.5 * Math.sin(2 * Math.PI * 3.1e3 * t), noise);
    const all = referencePathNoise({ ...sampler, input });
    expectRelative(all.rms, all.byRule, 1e-9);
    expectRelative(rmsOf(seen), all.rms, 0.01);
    expectRelative(rmsOf(filtered(seen, taps)), referencePathNoise({ ...sampler, input, weighting }).rms, 0.015);
  });
});

interface SkirtCase {
  readonly id: string;
  readonly spectrum: ReferenceSpectrum;
  readonly toneFrequency: number;
  readonly amplitude: number;
  readonly reference: number;
  readonly bands: readonly {
    readonly band: readonly [number, number | "inf"];
    readonly leaveOut: number;
    readonly power: string;
  }[];
}

// Source: fixtures/reference/skirt.json, made at 50 digits by two routes.
test("skirts of the reference vectors come through the reference path", () => {
  let bands = 0;
  for (const { id, spectrum, toneFrequency, amplitude, reference: volts, bands: rows } of referenceCases<SkirtCase>(
    "skirt.json",
  ))
    for (const { band: edges, leaveOut, power } of rows) {
      const { rms, numericalError } = referencePathNoise({
        spectrum: spectrumOf(spectrum),
        referenceVolts: volts,
        input: sine(amplitude, toneFrequency),
        fromHz: edges[0],
        toHz: edgeOf(edges[1]),
        leaveOutHz: leaveOut,
      });
      bands += 1;
      expectRelative(rms * rms, Number(power), 1e-11, id);
      expect(Math.abs(rms / Math.sqrt(Number(power)) - 1), id).toBeLessThanOrEqual(numericalError + 1e-15);
    }
  expect(bands).toBeGreaterThan(50);
});

describe("squares and triangles", () => {
  const shaped = {
    spectrum: whiteFlicker({ floor: 1e-7, cornerHz: 2e3 }),
    referenceVolts: 2,
    referenceWeighting: firstOrderLowPass({ cutoffHz: 3e3 }),
    fromHz: 1,
    toHz: 100,
  };

  test.each(["square", "triangle"] as const)(
    "a %s is the sum over its harmonics, to what it says of itself",
    (kind) => {
      const amplitude = (order: number): number =>
        kind === "square" ? 4 / Math.PI / order : 8 / Math.PI ** 2 / order ** 2;
      // The obvious sum, with the filter written out, below the first harmonic, where nothing is steep.
      let power = 0;
      for (let order = 1; order < 4e4; order += 2) {
        const f0 = 170 * order;
        const steps = order < 9 ? 2000 : 40;
        let mean = 0;
        for (let step = 0; step < steps; step += 1) {
          const hz = 1 + (99 * (step + 0.5)) / steps;
          for (const u of [f0 - hz, f0 + hz]) mean += (1e-14 * (1 + 2e3 / u)) / (1 + (u / 3e3) ** 2) / steps;
        }
        power += (amplitude(order) / 4) ** 2 * mean * 99;
      }
      const found = referencePathNoise({ ...shaped, input: { kind, amplitude: 1, frequencyHz: 170 } });
      expectRelative(found.rms, Math.sqrt(power), 1e-6 + found.numericalError);
      expect(found.numericalError).toBeLessThan(2e-4);
    },
  );

  test("white noise does not know the shape: RMS of the input is all", () => {
    for (const [kind, rms] of [
      ["square", 1],
      ["triangle", 1 / Math.sqrt(3)],
    ] as const) {
      const found = referencePathNoise({ ...reference, ...band, input: { kind, amplitude: 1, frequencyHz: 777 } });
      expectRelative(found.inputRms, rms, 1e-14);
      expectRelative(found.rms, found.byRule, 1e-12);
    }
  });

  test("parts are named up to nine and add up", () => {
    const found = referencePathNoise({
      ...shaped,
      input: { kind: "square", amplitude: 1, frequencyHz: 170, offset: 0.5 },
    });
    expect(found.parts).toHaveLength(9);
    expect(found.parts[0]?.name).toBe("dc");
    expectRelative(Math.hypot(...found.parts.map(({ rms }) => rms)), found.rms, 1e-12);
    expectRelative(Math.hypot(...found.parts.map(({ inputRms }) => inputRms)), found.inputRms, 1e-12);
  });
});

describe("samples", () => {
  const period = Array.from({ length: 50 }, (_, k) => 0.3 + 1.2 * Math.sin((2 * Math.PI * k) / 50));
  const shaped = { spectrum: whiteFlicker({ floor: 1e-7, cornerHz: 50 }), referenceVolts: 2, fromHz: 1, toHz: 400 };

  test("one period of a sine is that sine", () => {
    const found = referencePathNoise({
      ...shaped,
      input: { kind: "samples", values: period, sampleRateHz: 10e3 },
    });
    expectRelative(found.rms, referencePathNoise({ ...shaped, input: sine(1.2, 200, 0.3) }).rms, 1e-12);
  });

  test("without a rate only the rule is known, and it says so", () => {
    const found = referencePathNoise({ ...shaped, input: { kind: "samples", values: Float32Array.from(period) } });
    expect(found.basis).toBe("rule");
    expectRelative(found.inputRms, Math.hypot(0.3, 1.2 * Math.SQRT1_2), 1e-7);
    expectRelative(found.rms, (found.inputRms / 2) * bandNoise(shaped.spectrum, { fromHz: 1, toHz: 400 }).rms, 1e-12);
    expect(found.notes.join(" ")).toContain("Only the RMS");
  });

  test("a line at half the rate has one image", () => {
    const found = referencePathNoise({
      ...reference,
      ...band,
      input: { kind: "samples", values: [1, -1], sampleRateHz: 5e3 },
    });
    expectRelative(found.rms, (1 / 2.5) * 10e-6, 1e-12);
  });
});

test("a bias is seen with the input shorted", () => {
  const path = { ...reference, ...band, biasVolts: 1.25 };
  expectRelative(referencePathNoise({ ...path, input: { kind: "dc", volts: 0 } }).rms, 5e-6, 1e-14);
  expectRelative(referencePathNoise({ ...path, input: { kind: "dc", volts: -1.25 } }).rms + 1, 1, 1e-15);
  expectRelative(referencePathNoise({ ...path, input: sine(1.25, 1e3) }).inputRms, 1.25 * Math.sqrt(1.5), 1e-14);
});

test("a buffer behind the reference's filter adds its own noise, which the filter does not see", () => {
  const [filter, buffer] = [firstOrderLowPass({ cutoffHz: 10 }), whiteFlicker({ floor: 20e-9, cornerHz: 5 })];
  const wide = { fromHz: 0.1, toHz: 1e3 };
  const found = referencePathNoise({
    ...reference,
    ...wide,
    input: { kind: "dc", volts: 2.5 },
    referenceWeighting: filter,
    added: [buffer],
  });
  const expected = Math.hypot(
    bandNoise(reference.spectrum, { ...wide, weighting: filter }).rms,
    bandNoise(buffer, wide).rms,
  );
  expectRelative(found.rms, expected, 1e-12);
});

test("behind a delta-sigma converter the digital filter limits the reference, behind a sampler it folds first", () => {
  const weighting = butterworthLowPass({ order: 4, cutoffHz: 100 });
  const path = {
    spectrum: whiteFlicker({ floor: 1e-7, cornerHz: 10 }),
    referenceVolts: 5,
    input: { kind: "dc", volts: 5 },
    referenceWeighting: firstOrderLowPass({ cutoffHz: 100e3 }),
    fromHz: 0.1,
    toHz: 500,
    weighting,
  } as const;
  const limited = referencePathNoise(path);
  const folded = referencePathNoise({ ...path, converter: "sampler", sampleRateHz: 1000 });
  expect(folded.rms / limited.rms).toBeGreaterThan(10);
  const twin = foldedSpectrum(path.spectrum, { sampleRateHz: 1000, weighting: path.referenceWeighting });
  expectRelative(folded.rms, bandNoise(twin, { fromHz: 0.1, toHz: 500, weighting }).rms, 1e-10);
  expect(limited.notes[0]).toContain("Delta-sigma");
  expect(folded.notes[0]).toContain("folds into 0 to 500 Hz");
});

describe("uncertainty", () => {
  const points = [0.1, 1, 10, 100, 1000].map((frequency) => ({ frequency, density: 1e-6 / Math.sqrt(frequency) }));
  const spectrum = polyline(curveFromPoints(points, { unit: "V", pointUncertainty: 0.08 }), {
    beyond: { above: 0, below: 1 },
  });
  const path = { spectrum, referenceVolts: 5, fromHz: 0.1, toHz: 50 };

  test("at dc it is the reference's own", () => {
    const own = bandNoise(spectrum, { fromHz: 0.1, toHz: 50 }).standardUncertainty ?? 0;
    expectRelative(
      referencePathNoise({ ...path, input: { kind: "dc", volts: 1 } }).standardUncertainty ?? 0,
      own,
      1e-6,
    );
  });

  test("all parts of an input rest on one curve: in a budget its spectrum says the same or less, never √n less", () => {
    const found = referencePathNoise({ ...path, input: sine(2, 20, 1) });
    const budget = noiseBudget({ sources: [{ source: found.spectrum as Spectrum }], fromHz: 0.1, toHz: 50 });
    expectRelative(budget.rms, found.rms, 1e-10);
    const [own, bound] = [budget.standardUncertainty ?? 0, found.standardUncertainty ?? 0];
    expect(own).toBeLessThanOrEqual(bound * (1 + 1e-6));
    const independent = noiseBudget({
      sources: [{ source: sumSpectra(spectrum, spectrum) }],
      fromHz: 0.1,
      toHz: 50,
    }).standardUncertainty;
    expect(own).toBeGreaterThan((independent ?? 0) * 0.9);
  });
});

describe("refusals", () => {
  const base: ReferencePathOptions = { ...reference, ...band, input: { kind: "dc", volts: 1 } };
  test.each([
    ["a sampler without a rate", { ...base, converter: "sampler" }, /sampleRateHz/],
    ["a rate without a sampler", { ...base, sampleRateHz: 1e3 }, /sampler/],
    ["a band beyond half the rate", { ...base, converter: "sampler", sampleRateHz: 1e3 }, /half the rate/],
    ["another converter", { ...base, converter: "flash" }, /deltaSigma/],
    ["another input", { ...base, input: { kind: "noise" } }, /dc, sine, square, triangle or samples/],
    ["no samples", { ...base, input: { kind: "samples", values: [] } }, /at least one/],
    ["a sample that is no number", { ...base, input: { kind: "samples", values: [0, Number.NaN] } }, /Sample 1/],
    ["a reference of 0 V", { ...base, referenceVolts: 0 }, /referenceVolts/],
    ["a misspelt option", { ...base, reference: 1 }, /knows no option/],
    ["a misspelt input", { ...base, input: { kind: "dc", volts: 1, peak: 2 } }, /knows no option/],
  ])("%s", (_, options, message) => {
    expect(() => referencePathNoise(options as unknown as ReferencePathOptions)).toThrow(message);
    expect(() => referencePathNoise(options as unknown as ReferencePathOptions)).toThrow(OutOfDomainError);
  });

  test("a tone at the rate of its sampler has no frequency left", () => {
    const sampler = {
      ...base,
      toHz: 500,
      converter: "sampler",
      sampleRateHz: 1000,
      referenceWeighting: firstOrderLowPass({ cutoffHz: 1e4 }),
      input: sine(1, 2000),
    } as const;
    expect(() => referencePathNoise(sampler)).toThrow(/one and the same phase/);
  });
});
