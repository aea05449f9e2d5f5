import { describe, expect, test } from "vitest";
import { uniformFrom } from "../../../../test/support/random.js";
import { expectRelative } from "../../../../test/support/relative.js";
import { calibrateAxes } from "../../src/curve/calibrate-axes.js";
import { type PathOptions, pointsFromPath } from "../../src/curve/points-from-path.js";
import { MalformedDataError, NoiseError, OutOfDomainError } from "../../src/ground/errors.js";

const plot = calibrateAxes({
  unit: "V",
  frequency: { kind: "log", ticks: [100, 300, 500, 700].map((pixel, k) => ({ pixel, value: 10 ** k })) },
  density: { kind: "log", ticks: [400, 225, 50].map((pixel, k) => ({ pixel, value: 10 ** (k - 9) })) },
});
const densities = (path: string, options: PathOptions = {}): number[] =>
  pointsFromPath(plot, path, options).points.map(({ density }) => density);
const close = (found: readonly number[], expected: readonly number[]): void => {
  expect(found).toHaveLength(expected.length);
  for (const [index, value] of expected.entries()) expectRelative(found[index] ?? 0, value, 1e-12);
};

test("vertices become points, in any direction and notation of the path", () => {
  const expected = [1e-7, 1e-8, 1e-8];
  close(densities("M100 50L300 225h400"), expected);
  close(densities("m100 50 200 175 400 0"), expected);
  close(densities("M700 225H300L100 50"), expected);
  close(densities("M100 50L300 225M300 225L700 225"), expected);
});

test("a matrix leads from the page to the pixels: scale, turn and shift", () => {
  close(densities("M0 0L2 1.75h4", { matrix: [100, 0, 0, 100, 100, 50] }), [1e-7, 1e-8, 1e-8]);
  // a page that lies on its side: x and y change places
  close(densities("M50 100L225 300v400", { matrix: [0, 1, 1, 0, 0, 0] }), [1e-7, 1e-8, 1e-8]);
});

test("the tolerance holds on the plot, also along the direction that a shearing matrix stretches most", () => {
  const linear = { kind: "linear" as const, ticks: [-1e4, 1e4].map((pixel) => ({ pixel, value: pixel + 10001 })) };
  const flat = calibrateAxes({ unit: "V", frequency: linear, density: linear });
  const matrix = [1, 0.5, 0.5, 1, 0, 0] as const;
  const { points } = pointsFromPath(flat, "M0 0Q1060 -740 2000 -1600", { matrix, tolerancePixels: 0.1 });
  const pixels = points.map(({ frequency, density }) => ({ x: frequency - 10001, y: density - 10001 }));
  let worst = 0;
  for (let step = 0; step <= 2000; step += 1) {
    const t = step / 2000;
    const [u, v] = [2 * t * (1 - t) * 1060 + t * t * 2000, -2 * t * (1 - t) * 740 - t * t * 1600];
    const [x, y] = [u + 0.5 * v, 0.5 * u + v];
    const next = Math.max(
      1,
      pixels.findIndex((place) => place.x >= x),
    );
    const [from, to] = [pixels[next - 1], pixels[next]];
    if (from === undefined || to === undefined) continue;
    const [dx, dy] = [to.x - from.x, to.y - from.y];
    worst = Math.max(worst, Math.abs(dy * (x - from.x) - dx * (y - from.y)) / Math.hypot(dx, dy));
  }
  expect(worst).toBeGreaterThan(0.05);
  expect(worst).toBeLessThan(0.1);
});

test("a step is a step: both of its ends stay, a thousandth of a pixel apart", () => {
  const { points } = pointsFromPath(plot, "M100 50H300V225H700");
  expect(points.map(({ density }) => density.toPrecision(3))).toEqual(["1.00e-7", "1.00e-7", "1.00e-8", "1.00e-8"]);
  expectRelative(points[2]?.frequency ?? 0, points[1]?.frequency ?? 1, 1e-4);
});

test("a step back within the pick error is a trembling hand, a larger one is refused with its place", () => {
  expect(densities("M100 50L300 225L299.9 225L700 225", { pickErrorPixels: 0.25 })).toHaveLength(3);
  expect(() => densities("M100 50L300 225L200 225L700 225")).toThrow(MalformedDataError);
  expect(() => densities("M100 50L300 225L200 225L700 225")).toThrow(
    /doubles back in frequency at pixel \(200\.0, 225\.0\), by 100\.0 pixels/,
  );
});

test("two curves in one path are refused with the place where they overlap", () => {
  expect(() => densities("M100 50H400M300 200H700")).toThrow(
    /Two subpaths overlap in frequency at pixel \(300\.0, 200\.0\); give the path of one curve only/,
  );
});

// what a parser may join to the next number: -M100 is then x = -100, a decade below, and .M300 is 0.3
test.each(["-", ".", "+", "1", "0 ", "5 6", ","])(
  "%o before the first move or after a close is refused, not read on",
  (stray) => {
    const good = "M300 225L700 225";
    const message = /must begin with a move command|nothing but a command may follow a close/;
    expect(() => densities(`${stray}${good}`)).toThrow(message);
    expect(() => densities(`M100 50L100 50z${stray}${good}`)).toThrow(message);
    expect(() => densities(`M100 50L100 50 z \n${stray}${good}`)).toThrow(message);
    expect(() => densities(`M100 50L100 50z${stray}`)).toThrow(message);
    expect(densities(` \n${good}`)).toHaveLength(2);
    expect(densities(`M100 50L100 50z\t${good}`)).toHaveLength(3);
  },
);

describe("refusals", () => {
  test.each<[string, PathOptions, RegExp]>([
    ["M100 50V225", {}, /at least two places/],
    ["M100 50", {}, /./],
    ["M100 50H200", { matrix: [1, 0, 0, 0, 0, 0] }, /can be inverted/],
    ["M100 50H200", { matrix: [1, 0, 0, Number.NaN, 0, 0] }, /six finite numbers/],
    ["M100 50H200", { tolerancePixels: 0 }, /tolerancePixels/],
    ["M100 50H200", { pickErrorPixels: -1 }, /pickErrorPixels/],
    ["M100 50H200", { tolerance: 1 } as never, /"tolerance"/],
    ["M100 50H5000", {}, /more than a decade beyond the outer ticks of the frequency axis/],
  ])("%s %o", (path, options, message) => {
    expect(() => densities(path, options)).toThrow(NoiseError);
    expect(() => densities(path, options)).toThrow(message);
  });

  test("a matrix that folds the page flat is a value out of its domain", () => {
    expect(() => densities("M100 50H200", { matrix: [1, 1, 1, 1, 0, 0] })).toThrow(OutOfDomainError);
  });
});

/** The grammar of SVG 2, 9.3.9, written out a second time: what is accepted must be a path. */
const grammar = (() => {
  const number = String.raw`[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?`;
  const gap = String.raw`(?:\s+,?\s*|,\s*)?`;
  const repeated = (unit: string): string => String.raw`\s*${unit}(?:${gap}${unit})*`;
  const numbers = (count: number): string => Array.from({ length: count }, () => number).join(gap);
  const arc = [number, number, number, "[01]", "[01]", number, number].join(gap);
  const commands = [
    `[MmLlTt]${repeated(numbers(2))}`,
    `[HhVv]${repeated(number)}`,
    `[Cc]${repeated(numbers(6))}`,
    `[SsQq]${repeated(numbers(4))}`,
    `[Aa]${repeated(arc)}`,
    "[Zz]",
  ];
  return new RegExp(String.raw`^\s*(?=[Mm])(?:(?:${commands.join("|")})\s*)+$`);
})();

test("1000 mutated paths give the module's own error or a curve of one density a frequency", () => {
  const uniform = uniformFrom(77);
  const good = "M100 50C150 120 250 210 300 225S420 230 500 225a30 10 0 0 1 60 0L600,225h50t20 -1 30 1";
  const letters = "MmLlHhVvCcSsQqTtAaZz0123456789.,- e";
  let refused = 0;
  for (let run = 0; run < 1000; run += 1) {
    let path = good;
    for (let change = 0; change <= run % 3; change += 1) {
      const at = Math.floor(uniform() * path.length);
      const letter = letters[Math.floor(letters.length * uniform())] ?? "";
      path = path.slice(0, at) + (uniform() < 0.3 ? "" : letter) + path.slice(at + (uniform() < 0.5 ? 1 : 0));
    }
    try {
      const { points } = pointsFromPath(plot, path);
      expect(path).toMatch(grammar);
      expect(points.length).toBeGreaterThan(1);
      for (const [index, { frequency, density, uncertainty }] of points.entries()) {
        expect(frequency).toBeGreaterThan(points[index - 1]?.frequency ?? 0);
        expect(Number.isFinite(density) && density > 0 && uncertainty > 0).toBe(true);
      }
    } catch (error) {
      if (!(error instanceof NoiseError)) throw error;
      refused += 1;
    }
  }
  expect(refused).toBeGreaterThan(200);
  expect(refused).toBeLessThan(1000);
});
