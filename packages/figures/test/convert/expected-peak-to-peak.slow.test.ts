import {
  butterworthLowPass,
  cascade,
  curveFromPoints,
  firstOrderHighPass,
  firstOrderLowPass,
  polyline,
  powerLaws,
  resonator,
  type Spectrum,
  secondOrderLowPass,
  sumSpectra,
  whiteFlicker,
} from "@quietband/core";
import { expect, test } from "vitest";
import { type ExpectedPeakToPeakOptions, expectedPeakToPeak } from "../../src/convert/expected-peak-to-peak.js";
import { simulateRange } from "./support/simulate-range.js";

// A second, slow, obvious way: Gaussian noise by inverse FFT over many record lengths, records cut from it, ranges counted.

const white = powerLaws([{ coefficient: 1, exponent: 0 }]);
const flicker = (exponent: number) => powerLaws([{ coefficient: 1, exponent }]);
const mixed = whiteFlicker({ floor: 1, cornerHz: 3 });
const low = { fromHz: 0.1, toHz: 10, recordSeconds: 10 };

interface Case {
  readonly name: string;
  readonly spectrum: Spectrum;
  readonly options: ExpectedPeakToPeakOptions;
  /** Samples per second of the simulation where the record is a continuous trace. */
  readonly simulatedHz?: number;
  /** ln 2 of the length of one series and how many transforms. */
  readonly size?: readonly [number, number];
}

const onePole = (sampleRateHz: number): ExpectedPeakToPeakOptions => ({
  fromHz: 0,
  toHz: Number.POSITIVE_INFINITY,
  weighting: firstOrderLowPass({ cutoffHz: 10 }),
  recordSeconds: 10,
  sampleRateHz,
});

const stepped = polyline(
  curveFromPoints(
    [
      [0.01, 30],
      [0.1, 8],
      [1, 2],
      [3, 5],
      [10, 1],
      [100, 1],
    ].map(([frequency = 0, density = 0]) => ({ frequency, density })),
    { unit: "V" },
  ),
);

const cases: readonly Case[] = [
  { name: "white, 0.1 Hz to 10 Hz, 10 s", spectrum: white, options: low, simulatedHz: 160 },
  { name: "1/f, 0.1 Hz to 10 Hz, 10 s", spectrum: flicker(1), options: low, simulatedHz: 160 },
  { name: "1/f^1.3, 0.1 Hz to 10 Hz, 10 s", spectrum: flicker(1.3), options: low, simulatedHz: 160 },
  { name: "mixed, 0.1 Hz to 10 Hz, 10 s", spectrum: mixed, options: low, simulatedHz: 160 },
  { name: "white, 0.1 Hz to 10 Hz, 100 s", spectrum: white, options: { ...low, recordSeconds: 100 }, simulatedHz: 80 },
  { name: "1/f, 0.1 Hz to 10 Hz, 1 s", spectrum: flicker(1), options: { ...low, recordSeconds: 1 }, simulatedHz: 256 },
  {
    name: "1/f^1.3, 0.1 Hz to 10 Hz, 1 s",
    spectrum: flicker(1.3),
    options: { ...low, recordSeconds: 1 },
    simulatedHz: 256,
  },
  {
    name: "1/f^1.3, 0.01 Hz to 10 Hz, 3 s",
    spectrum: flicker(1.3),
    options: { fromHz: 0.01, toHz: 10, recordSeconds: 3 },
    simulatedHz: 170,
  },
  {
    name: "mixed, 1 Hz to 1 kHz, 1 s",
    spectrum: whiteFlicker({ floor: 1, cornerHz: 30 }),
    options: { fromHz: 1, toHz: 1e3, recordSeconds: 1 },
    simulatedHz: 8192,
    size: [18, 24],
  },
  { name: "white, one pole at 10 Hz, 50/s", spectrum: white, options: onePole(50) },
  { name: "white, one pole at 10 Hz, 100/s", spectrum: white, options: onePole(100) },
  { name: "white, one pole at 10 Hz, 1000/s", spectrum: white, options: onePole(1000), size: [19, 14] },
  {
    name: "1/f + white, second order at 10 Hz, from 0.1 Hz, 200/s",
    spectrum: mixed,
    options: {
      ...low,
      toHz: Number.POSITIVE_INFINITY,
      weighting: secondOrderLowPass({ naturalHz: 10, q: 0.7 }),
      sampleRateHz: 200,
    },
  },
  {
    name: "white, Butterworth of order 4 at 100 Hz, 1 kHz, 2 s",
    spectrum: white,
    options: {
      fromHz: 0,
      toHz: Number.POSITIVE_INFINITY,
      weighting: butterworthLowPass({ order: 4, cutoffHz: 100 }),
      sampleRateHz: 1e3,
      recordSeconds: 2,
    },
  },
  {
    name: "narrow band, 0.9 Hz to 1.1 Hz, 30 s",
    spectrum: white,
    options: { fromHz: 0.9, toHz: 1.1, recordSeconds: 30 },
    simulatedHz: 32,
  },
  {
    name: "very narrow band, 0.99 Hz to 1.01 Hz, 100 s",
    spectrum: white,
    options: { fromHz: 0.99, toHz: 1.01, recordSeconds: 100 },
    simulatedHz: 20,
    size: [18, 24],
  },
  {
    name: "narrow band in ten turns, 0.9 Hz to 1.1 Hz, 10 s",
    spectrum: white,
    options: { fromHz: 0.9, toHz: 1.1, recordSeconds: 10 },
    simulatedHz: 32,
  },
  {
    name: "a resonance of Q 100 at 10 Hz, 10 s",
    spectrum: white,
    options: {
      fromHz: 0.1,
      toHz: 100,
      weighting: resonator({ centreHz: 10, q: 100 }),
      recordSeconds: 10,
      sampleRateHz: 400,
    },
    size: [19, 24],
  },
  {
    name: "a resonance of Q 20 at 5 Hz, 20 s",
    spectrum: white,
    options: {
      fromHz: 0.1,
      toHz: 50,
      weighting: resonator({ centreHz: 5, q: 20 }),
      recordSeconds: 20,
      sampleRateHz: 200,
    },
  },
  {
    name: "a resonance of Q 50 at 5 Hz, 50 s",
    spectrum: white,
    options: {
      fromHz: 0.1,
      toHz: 50,
      weighting: resonator({ centreHz: 5, q: 50 }),
      recordSeconds: 50,
      sampleRateHz: 200,
    },
    size: [19, 20],
  },
  {
    name: "narrow band of a thousand turns, 99 Hz to 101 Hz, 10 s",
    spectrum: white,
    options: { fromHz: 99, toHz: 101, recordSeconds: 10 },
    simulatedHz: 2000,
    size: [20, 12],
  },
  {
    name: "a polyline with a hump, 0.1 Hz to 100 Hz, 5 s",
    spectrum: stepped,
    options: { fromHz: 0.1, toHz: 100, recordSeconds: 5 },
    simulatedHz: 1000,
    size: [18, 20],
  },
  {
    name: "1/f² + white through a bench filter, 10 s",
    spectrum: sumSpectra(white, flicker(2)),
    options: {
      fromHz: 0.01,
      toHz: 1e3,
      weighting: cascade(firstOrderHighPass({ cutoffHz: 0.1 }), secondOrderLowPass({ naturalHz: 10, q: 0.7 })),
      recordSeconds: 10,
      sampleRateHz: 200,
    },
  },
  {
    name: "white samples, 20 of them",
    spectrum: white,
    options: { fromHz: 0, toHz: 50, recordSeconds: 0.2, sampleRateHz: 100 },
    size: [16, 4],
  },
  {
    name: "1/f, 24 samples",
    spectrum: flicker(1),
    options: { fromHz: 0.1, toHz: 50, recordSeconds: 0.24, sampleRateHz: 100 },
  },
];

function simulate({ spectrum, options, simulatedHz, size = [17, 24] }: Case) {
  const { fromHz, toHz, weighting, recordSeconds } = options;
  const sampleRateHz = options.sampleRateHz ?? simulatedHz ?? 0;
  const gain = (hz: number): number => weighting?.powerGainAt(hz) ?? 1;
  return simulateRange({
    densityAt: (hz) => (hz >= fromHz && hz <= toHz ? spectrum.powerDensityAt(hz) * gain(hz) : 0),
    recordSeconds,
    sampleRateHz,
    length: 2 ** size[0],
    transforms: size[1],
    seed: 12,
    reachHz: Math.min(toHz, 40 * sampleRateHz),
  });
}

test.each(cases)("$name", (given) => {
  const simulated = simulate(given);
  const expected = expectedPeakToPeak(given.spectrum, given.options);
  // good to 0.5 % itself
  const own = simulated.standardDeviation / simulated.mean / Math.sqrt(simulated.records);
  console.log(
    `${given.name}: ${expected.multipleOfRms.toFixed(3)} × RMS; mean over simulation ${(expected.mean / simulated.mean).toFixed(4)} ± ${own.toFixed(4)}, spread ${(expected.spread / simulated.standardDeviation).toFixed(3)} (${simulated.records} records)`,
  );
  expect(own).toBeLessThan(0.005);
  expect(Math.abs(expected.mean / simulated.mean - 1)).toBeLessThan(0.03);
  expect(Math.abs(expected.spread / simulated.standardDeviation - 1)).toBeLessThan(0.1);
});
