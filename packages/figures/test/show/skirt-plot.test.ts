import { NoiseError, whiteFlicker } from "@quietband/core";
import { describe, expect, test } from "vitest";
import { layoutSkirtPlot, type SkirtPlotOptions, type SkirtReference, skirtPlot } from "../../src/show/skirt-plot.js";
import { expectReadable, expectSound } from "./support/plot-claims.js";

const reference = (scale: number, cornerHz = 50, label = "R2"): SkirtReference => ({
  label,
  spectrum: whiteFlicker({ floor: 100e-9 * scale, cornerHz }),
  referenceVolts: 2.5,
});

const pictures: Readonly<Record<string, SkirtPlotOptions>> = {
  "one reference": { references: [reference(1)], toneHz: 1e3 },
  "1e-12 V/√Hz in narrow bins": { references: [reference(1e-5)], toneHz: 1e6, binHz: 0.01 },
  "1e3 V/√Hz": { references: [reference(1e10)], toneHz: 1e3, spanHz: 2 },
  "white noise only": { references: [reference(1, 0)], toneHz: 1e3 },
  "a hundred references": {
    references: Array.from({ length: 100 }, (_, k) => reference(0.3 + k / 30, 20 + 9 * ((37 * k) % 100), `R${k + 1}`)),
    toneHz: 1e3,
  },
  small: { references: [reference(1)], toneHz: 1e3, width: 400, height: 280, note: "A note. ".repeat(40) },
};

describe("whatever there is to draw", () => {
  test.each(Object.entries(pictures))("%s: readable and sound", (_, options) => {
    expectReadable(layoutSkirtPlot(options));
    expectSound(skirtPlot(options));
  });
});

test("white noise S lies at S/V² in 1 Hz over the tone, on both sides, and the tone's bin is left out", () => {
  const { lines, frame } = layoutSkirtPlot({ references: [reference(1, 0)], toneHz: 1e3 });
  const runs = lines[0]?.runs ?? [];
  expect(runs).toHaveLength(2);
  const level = frame.y.at(10 * Math.log10(100e-9 ** 2 / 2.5 ** 2));
  for (const [, y] of runs.flat()) expect(Math.abs(y - level)).toBeLessThan(1e-6);
});

test("a level in dB does not stand on zero", () => {
  expect(layoutSkirtPlot({ references: [reference(1)], toneHz: 1e3 }).frame.y.domain[1]).toBeLessThan(-100);
});

test.each([
  [{ references: [], toneHz: 1e3 }, /at least one reference/],
  [{ references: [reference(1)], toneHz: 0 }, /toneHz/],
  [{ references: [reference(1)], toneHz: 10, spanHz: 10 }, /up to the tone less half a bin, 9\.5 Hz; got 10/],
  [{ references: [reference(1)], toneHz: 2 }, /from two bins, 2 Hz/],
  [{ references: [reference(1)], toneHz: 1e3, amplitude: 1 } as SkirtPlotOptions, /knows no option "amplitude"/],
])("what cannot be drawn is refused in a sentence", (options, message) => {
  expect(() => skirtPlot(options)).toThrow(NoiseError);
  expect(() => skirtPlot(options)).toThrow(message);
});
