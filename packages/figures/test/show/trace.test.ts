import { expect, test } from "vitest";
import type { Pixel } from "../../src/show/plot-layout.js";
import { splitRuns, thinRun, traceRuns } from "../../src/show/trace.js";

test("a straight line needs no more than the even steps", () => {
  const [run] = traceRuns({ edges: [1, 1e6], pixelAt: (x) => [Math.log(x), Math.log(x)] });
  expect(run?.length).toBe(25);
});

test("the ends and every edge between are drawn exactly", () => {
  const [run = []] = traceRuns({ edges: [1, 33, 1e6], pixelAt: (x) => [x, Math.log(x)] });
  expect([run[0], run.at(-1)]).toEqual([
    [1, 0],
    [1e6, Math.log(1e6)],
  ]);
  expect(run.map(([x]) => x)).toContain(33);
});

test("a step of a tabulated spectrum stays a step", () => {
  const [run = []] = traceRuns({ edges: [1, 10, 10 * (1 + 1e-9), 100], pixelAt: (x) => [x, x <= 10 ? 0 : 300] });
  expect(new Set(run.map(([, y]) => y))).toEqual(new Set([0, 300]));
});

test("more edges than pixels are not all followed", () => {
  const edges = Array.from({ length: 100_000 }, (_, index) => 1 + index);
  const [run = []] = traceRuns({ edges, pixelAt: (x) => [Math.log(x), 0] });
  expect(run.length).toBeLessThan(2000);
});

test("a line is cut where it is not finite", () => {
  const y = [1, Number.NaN, 2, 3, Number.NEGATIVE_INFINITY, 4];
  expect(splitRuns(y.map((value, x) => [x, value])).map((run) => run.length)).toEqual([1, 2, 1]);
});

test("a thinned run keeps first, lowest, highest and last of every half pixel", () => {
  const noise = (index: number): number =>
    ((index * 7919) % 1009) + (index === 5003 ? -5000 : 0) + (index === 7001 ? 5000 : 0);
  const run: readonly Pixel[] = Array.from({ length: 10_000 }, (_, index) => [index / 100, noise(index)] as const);
  const thin = thinRun(run);
  expect(thin.length).toBeLessThanOrEqual(4 * 200);
  expect(thin[0]).toBe(run[0]);
  expect(thin.at(-1)).toBe(run.at(-1));
  const [low, high] = [run[5003] as Pixel, run[7001] as Pixel];
  expect(thin).toContain(low);
  expect(thin).toContain(high);
  for (let column = 0; column < 200; column += 1) {
    const inside = ([x]: Pixel): boolean => Math.floor(2 * x) === column;
    const [all, kept] = [run, thin].map((list) => list.filter(inside).map(([, y]) => y)) as [number[], number[]];
    expect([Math.min(...kept), Math.max(...kept)]).toEqual([Math.min(...all), Math.max(...all)]);
  }
});

test("a short run is left as it is", () => {
  const run: readonly Pixel[] = [
    [0, 1],
    [0.1, 2],
  ];
  expect(thinRun(run)).toBe(run);
});
