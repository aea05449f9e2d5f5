import { butterworthLowPass, NoiseError, polyline, readCurve, whiteFlicker } from "@quietband/core";
import { describe, expect, test } from "vitest";
import type { Candidate } from "../../src/chain/candidate.js";
import { type CandidatesPlotOptions, candidatesPlot, layoutCandidatesPlot } from "../../src/show/candidates-plot.js";
import { hundredCurves } from "./support/invented-curves.js";
import { expectReadable, expectSound, textsOf } from "./support/plot-claims.js";

const models = (scale: number): readonly Candidate[] => [
  { name: "low floor", spectrum: whiteFlicker({ floor: 3 * scale, cornerHz: 100 }) },
  { name: "low corner", spectrum: whiteFlicker({ floor: 7 * scale, cornerHz: 0.02 }) },
];
const band = { fromHz: 0.1, toHz: 1e3 };
const point = readCurve("f [Hz], e [nV/√Hz]\n10, 5\n10.01, 5");
const filter = butterworthLowPass({ order: 2, cutoffHz: 5 });

const pictures: Readonly<Record<string, readonly [readonly Candidate[], CandidatesPlotOptions]>> = {
  "two models": [models(1e-9), band],
  "1e-12 of a unit": [models(1e-12), band],
  "1e3 of a unit": [models(1e3), band],
  "one point": [[{ name: "point", spectrum: polyline(point, { beyond: "hold" }) }], band],
  "a hundred curves": [hundredCurves().map((curve) => ({ name: curve.label, spectrum: polyline(curve) })), band],
  "from 0 Hz to infinity through a filter": [
    [{ name: "white", spectrum: whiteFlicker({ floor: 1e-9, cornerHz: 0 }) }],
    { fromHz: 0, toHz: Number.POSITIVE_INFINITY, weighting: filter },
  ],
  small: [models(1e-9), { ...band, width: 400, height: 280, title: "Small", note: "A note. ".repeat(40) }],
};

describe("whatever there is to compare", () => {
  test.each(Object.entries(pictures))("%s: both plots are readable and sound", (_, [candidates, options]) => {
    for (const panel of layoutCandidatesPlot(candidates, options).panels) expectReadable(panel);
    expectSound(candidatesPlot(candidates, options));
  });
});

test("both plots name every candidate, and name it alike", () => {
  const [density, running] = layoutCandidatesPlot(models(1e-9), band).panels;
  expect(density?.lines.map(({ colour }) => colour)).toEqual(running?.lines.map(({ colour }) => colour));
  const texts = textsOf(expectSound(candidatesPlot(models(1e-9), band)));
  expect(texts.filter((text) => text === "low floor")).toHaveLength(2);
});

test("the running noise ends at the band noise of the comparison", () => {
  const white = [{ name: "white", spectrum: whiteFlicker({ floor: 1e-9, cornerHz: 0 }) }];
  const { panels } = layoutCandidatesPlot(white, { fromHz: 100, toHz: 10_100 });
  const [density, running] = panels;
  const last = running?.lines[0]?.runs[0]?.at(-1) ?? [Number.NaN, Number.NaN];
  expect(Math.abs(last[1] - (running?.frame.y.at(1e-7) ?? 0))).toBeLessThan(1e-6);
  expect(density?.shades).toHaveLength(1);
});

test("with a source, its thermal noise is in the picture", () => {
  const [candidate] = models(1e-9);
  const of = (sourceOhms: number): number =>
    layoutCandidatesPlot([candidate as Candidate], { ...band, sourceOhms }).panels[0]?.frame.y.domain[0] ?? 0;
  expect(of(1e6) / of(0)).toBeGreaterThan(20);
});

test("no candidates and unknown options are refused in a sentence", () => {
  expect(() => candidatesPlot([], band)).toThrow(NoiseError);
  expect(() => candidatesPlot(models(1), { ...band, colour: "red" } as CandidatesPlotOptions)).toThrow(
    /knows no option "colour"/,
  );
});
