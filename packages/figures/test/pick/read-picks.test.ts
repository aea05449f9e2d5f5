import { readFileSync } from "node:fs";
import {
  bandNoise,
  type Curve,
  fitCurve,
  MalformedDataError,
  NoiseError,
  polyline,
  readCurve,
  writeCurve,
} from "@quietband/core";
import { scaleLog } from "d3-scale";
import { describe, expect, test } from "vitest";
import { uniformFrom } from "../../../../test/support/random.js";
import { expectRelative } from "../../../../test/support/relative.js";
import { readPicks } from "../../src/pick/read-picks.js";

const demo = (name: string): string =>
  readFileSync(new URL(`../../../../fixtures/demo/${name}`, import.meta.url), "utf8");

const plain = {
  label: "a plot",
  unit: "V",
  frequency: {
    scale: "log",
    ticks: [
      { pixel: 100, value: "1 Hz" },
      { pixel: 300, value: "10 Hz" },
      { pixel: 500, value: "100 Hz" },
      { pixel: 700, value: "1 kHz" },
    ],
  },
  density: {
    scale: "log",
    ticks: [
      { pixel: 400, value: "1 nV/√Hz" },
      { pixel: 225, value: "10 nV/√Hz" },
      { pixel: 50, value: "100 nV/√Hz" },
    ],
  },
  picks: [
    [100, 50],
    [300, 225],
    [700, 225],
  ],
};
const { picks, ...axes } = plain;

test("picks become points with their uncertainty, the calibration's residuals among the provenance", () => {
  const { curve, calibration, pointsRead } = readPicks({ ...plain, source: ["document: invented", "typical"] });
  expect([curve.label, curve.unit, pointsRead]).toEqual(["a plot", "V", 3]);
  expectRelative(curve.points[1]?.frequency ?? 0, 10, 1e-12);
  expectRelative(curve.points[1]?.density ?? 0, 1e-8, 1e-12);
  // half a pixel in y is ln 10 / 175 / 2; what x adds follows the slope between the neighbours
  expect(curve.points[1]?.uncertainty).toBeGreaterThan(Math.LN10 / 350);
  expect(curve.source.slice(0, 2)).toEqual([
    { key: "document", value: "invented" },
    { key: "", value: "typical" },
  ]);
  expect(curve.source[2]?.value).toMatch(/^worst is .* pixels off; a tick is taken as known to 0\.50 pixels$/);
  expect(calibration.worst.pixels).toBeLessThan(1e-9);
});

test("the table it writes reads back to the same curve, shared errors and all", () => {
  const { curve } = readPicks(demo("R1-picks.json"));
  const back = readCurve(writeCurve(curve));
  expect(back.points.map(({ density, uncertainty }) => [density, uncertainty])).toEqual(
    curve.points.map(({ density, uncertainty }) => [density, uncertainty]),
  );
  const band = { fromHz: 0.1, toHz: 100 };
  expectRelative(
    bandNoise(polyline(back), band).standardUncertainty ?? 0,
    bandNoise(polyline(curve), band).standardUncertainty ?? 1,
    1e-12,
  );
});

test("a path, transformed, is the same curve, thinned", () => {
  const path = { data: "M0 0L2 1.75h4", matrix: [100, 0, 0, 100, 100, 50] };
  const { curve } = readPicks({ ...axes, path });
  const direct = readPicks(plain).curve;
  for (const [index, { density }] of direct.points.entries())
    expectRelative(curve.points[index]?.density ?? 0, density, 1e-12);
  const curved = { ...axes, path: { data: "M100 50C200 200 300 225 700 225" } };
  const [fine, thin] = [readPicks({ ...curved, thin: "0.001 %" }), readPicks({ ...curved, thin: "1 %" })];
  expect(thin.curve.points.length).toBeLessThan(fine.curve.points.length);
  expect(fine.pointsRead).toBe(thin.pointsRead);
});

test("repeated picks are averaged, and a turned scan reads through reference points", () => {
  const series = [-0.5, 0.5, 0].map((off) => picks.map(([x = 0, y = 0]) => [x, y + off]));
  const { curve } = readPicks({ ...axes, repeatedPicks: series });
  expectRelative(curve.points[1]?.density ?? 0, 1e-8, 1e-9);
  const turn = (x: number, y: number): [number, number] => [0.98 * x - 0.2 * y + 60, 0.2 * x + 0.98 * y];
  const turned = readPicks({
    unit: "V",
    frequency: { scale: "log" },
    density: { scale: "log" },
    referencePoints: [
      { place: turn(100, 400), frequency: "1 Hz", density: "1 nV/√Hz" },
      { place: turn(700, 400), frequency: "1 kHz", density: "1 nV/√Hz" },
      { place: turn(100, 50), frequency: "1 Hz", density: "100 nV/√Hz" },
    ],
    picks: picks.map(([x = 0, y = 0]) => turn(x, y)),
  });
  for (const [index, { density }] of readPicks(plain).curve.points.entries())
    expectRelative(turned.curve.points[index]?.density ?? 0, density, 1e-9);
});

test("a dB axis reads in dB re 1 unit/√Hz", () => {
  const ticks = [
    { pixel: 400, value: "-180 dB" },
    { pixel: 50, value: "-140 dB" },
  ];
  const { curve } = readPicks({ ...plain, density: { scale: "dB", ticks } });
  expectRelative(curve.points[0]?.density ?? 0, 1e-7, 1e-12);
  expectRelative(curve.points[1]?.density ?? 0, 1e-8, 1e-12);
});

describe("what it refuses, with the place", () => {
  const tick = { pixel: 100, value: "1 Hz" };
  test.each<[unknown, RegExp]>([
    ["{", /^A picks file must be JSON/],
    ['{"unit":"V","unit":"A"}', /"unit" stands twice/],
    [{ ...plain, unti: "V" }, /nothing is called "unti" here/],
    [{ ...axes }, /expected one of picks, repeatedPicks and path; got none/],
    [{ ...plain, path: { data: "M0 0h1" } }, /got picks and path/],
    [{ ...plain, frequency: { scale: "log", ticks: [tick] } }, /^At \/frequency\/ticks/],
    [{ ...plain, frequency: { scale: "log" } }, /^At \/frequency: ticks are missing/],
    [
      { ...plain, frequency: { scale: "log", ticks: [tick, { pixel: 200, value: "10" }] } },
      /^At \/frequency\/ticks\/1\/value: expected a quantity in Hz/,
    ],
    [
      {
        ...plain,
        density: {
          scale: "log",
          ticks: [
            { pixel: 1, value: "1 nV" },
            { pixel: 2, value: "2 nV" },
          ],
        },
      },
      /^At \/density\/ticks\/0\/value: .*V\/√Hz/,
    ],
    [
      { ...plain, frequency: { scale: "log", ticks: plain.frequency.ticks.with(2, { pixel: 500, value: "1 kHz" }) } },
      /tick 3 \(1000 at pixel 500\)/,
    ],
    [{ ...plain, picks: [[1, 2]] }, /^At \/picks/],
    [
      {
        ...plain,
        picks: [
          [1, 2, 3],
          [4, 5, 6],
        ],
      },
      /^At \/picks\/0/,
    ],
    [{ ...axes, path: { data: "M100 50L300 225L200 225" } }, /^At \/path: The trace doubles back in frequency/],
    [{ ...axes, path: { data: "M100 50 nonsense" } }, /^At \/path/],
    [{ ...plain, pickError: 0 }, /^At \/pickError/],
    [{ ...plain, thin: "60 %" }, /^At \/thin/],
    [{ ...plain, referencePoints: [] }, /^At \/referencePoints/],
  ])("%#", (given, message) => {
    expect(() => readPicks(given)).toThrow(NoiseError);
    expect(() => readPicks(given)).toThrow(message);
  });
});

test("400 mutations of a good file never crash and never give a silently wrong curve", () => {
  const uniform = uniformFrom(8);
  const good = demo("R1-picks.json");
  const reference = readPicks(good).curve;
  const spectrum = polyline(reference);
  let refused = 0;
  for (let run = 0; run < 400; run += 1) {
    const at = Math.floor(uniform() * good.length);
    const kind = Math.floor(3 * uniform());
    const letters = '0123456789.,:{}[]" -abHzV';
    const letter = letters[Math.floor(letters.length * uniform())] ?? "x";
    const text = good.slice(0, at) + (kind === 0 ? "" : letter) + good.slice(kind === 2 ? at : at + 1);
    let curve: Curve;
    try {
      ({ curve } = readPicks(text));
    } catch (error) {
      expect(error).toBeInstanceOf(NoiseError);
      expect((error as Error).message.split("\n")).toHaveLength(1);
      refused += 1;
      continue;
    }
    // a changed digit of a pick moves that pick; a changed tick must be found or stay within its stated error
    const moved = curve.points.filter(({ frequency, density }) => {
      const [low, high] = spectrum.support;
      if (frequency < low || frequency > high) return false;
      return Math.abs(Math.log(density / Math.sqrt(spectrum.powerDensityAt(frequency)))) > 0.2;
    });
    expect(moved.length, `${moved.length} points moved by mutation ${run} at ${at}`).toBeLessThanOrEqual(2);
  }
  expect(refused).toBeGreaterThan(100);
});

test("the curve typed by hand and the one read off a drawn plot agree within their stated errors", () => {
  const typed = readCurve(demo("R1.csv"));
  const { curve } = readPicks(demo("R1-picks.json"));
  const band = { fromHz: 0.1, toHz: 10 };
  const of = (given: Curve) => {
    const fit = fitCurve(given, { toHz: 1000, beyond: { below: 1 } });
    const noise = bandNoise(polyline(given), band);
    return { fit, noise };
  };
  const [hand, read] = [of(typed), of(curve)];
  const score = (one: number, other: number, u1 = 0, u2 = 0) => Math.abs(Math.log(one / other)) / Math.hypot(u1, u2);
  const { noise: a, fit: fa } = hand;
  const { noise: b, fit: fb } = read;
  expect(score(a.rms, b.rms, a.standardUncertainty, b.standardUncertainty)).toBeLessThan(2);
  expect(score(fa.floor ?? 0, fb.floor ?? 0, fa.standardErrors.floor, fb.standardErrors.floor)).toBeLessThan(2);
  expect(
    score(fa.cornerHz ?? 0, fb.cornerHz ?? 0, fa.standardErrors.cornerHz, fb.standardErrors.cornerHz),
  ).toBeLessThan(2);
  // and the picks are the better reading
  expect(b.standardUncertainty).toBeLessThan(0.5 * (a.standardUncertainty ?? 0));
});

test("a plot drawn by d3-scale reads back to its law", () => {
  const x = scaleLog([0.1, 1e5], [80, 1400]);
  const y = scaleLog([1e-9, 1e-6], [900, 30]);
  const law = (hz: number): number => 5e-9 * Math.sqrt(1 + 300 / hz);
  const { curve } = readPicks({
    unit: "V",
    frequency: { scale: "log", ticks: [0.1, 1, 10, 1e5].map((hz) => ({ pixel: x(hz), value: `${hz} Hz` })) },
    density: { scale: "log", ticks: [1, 10, 1000].map((n) => ({ pixel: y(n * 1e-9), value: `${n} nV/√Hz` })) },
    picks: [0.2, 3, 40, 500, 2e4].map((hz) => [x(hz), y(law(hz))]),
  });
  for (const { frequency, density } of curve.points) expectRelative(density, law(frequency), 1e-9);
});

test("errors of core keep their kind", () => {
  const wrong = {
    ...plain,
    frequency: { scale: "log", ticks: plain.frequency.ticks.with(1, { pixel: 300, value: "100 Hz" }) },
  };
  expect(() => readPicks(wrong)).toThrow(MalformedDataError);
});
