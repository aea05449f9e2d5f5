import { describe, expect, test } from "vitest";
import {
  layoutRunningNoisePlot,
  type RunningNoisePlotOptions,
  runningNoisePlot,
} from "../../src/show/running-noise-plot.js";
import { expectReadable, expectSound } from "./support/plot-claims.js";

const edgesHz = Array.from({ length: 31 }, (_, index) => 0.12 * 10 ** (index / 10));
/** RMS of white noise and flicker from 0.1 Hz. */
const rms = edgesHz.map((hz) => 70e-9 * Math.sqrt(hz - 0.1 + 60 * Math.log(hz / 0.1)));
const options: RunningNoisePlotOptions = { curves: [{ label: "R1", edgesHz, rms }], unit: "V" };

describe("running noise", () => {
  test("runs over a logarithmic frequency axis, named after the edge that moves", () => {
    const { frame } = layoutRunningNoisePlot(options);
    expect(frame.x.ticks.map(({ value }) => value)).toEqual([0.1, 1, 10, 100]);
    expect(frame.texts.map(({ text }) => text)).toContain("upper band edge");
    const lower = layoutRunningNoisePlot({ ...options, moving: "fromHz" });
    expect(lower.frame.texts.map(({ text }) => text)).toContain("lower band edge");
  });

  test("is linear from zero within a factor ten, logarithmic beyond", () => {
    const flat = layoutRunningNoisePlot({ ...options, curves: [{ label: "", edgesHz: [1, 10], rms: [1e-6, 5e-6] }] });
    const steep = layoutRunningNoisePlot({ ...options, curves: [{ label: "", edgesHz: [1, 10], rms: [1e-6, 5e-5] }] });
    expect(flat.frame.y.domain[0]).toBe(0);
    expect(steep.frame.y.domain[0]).toBeGreaterThan(0);
  });

  test("marks an edge and a target", () => {
    const { labels } = layoutRunningNoisePlot({
      ...options,
      marks: [
        { axis: "x", value: 10, label: "10 Hz: 1.18 µV" },
        { axis: "y", value: 1e-6, label: "target" },
      ],
    });
    expect(labels.map(({ text }) => text)).toEqual(["10 Hz: 1.18 µV", "target"]);
  });

  test.each([
    ["one curve", options],
    ["one value", { ...options, curves: [{ label: "one", edgesHz: [10], rms: [1e-12] }] }],
    [
      "a hundred curves",
      {
        ...options,
        curves: Array.from({ length: 100 }, (_, part) => ({
          label: `part ${part}`,
          edgesHz,
          rms: rms.map((value) => value * (1 + part)),
        })),
      },
    ],
    ["values of 1e3", { ...options, curves: [{ label: "big", edgesHz, rms: rms.map((value) => value * 1e9) }] }],
  ] as const)("%s: readable and sound", (_, given) => {
    expectReadable(layoutRunningNoisePlot(given));
    expectSound(runningNoisePlot(given));
  });

  test("gives the same text twice", () => {
    expect(runningNoisePlot(options)).toBe(runningNoisePlot(options));
  });

  test("refuses no curve, lists of two lengths, nothing above zero and unknown options", () => {
    expect(() => runningNoisePlot({ ...options, curves: [] })).toThrow(/runningNoisePlot needs at least one line/);
    expect(() => runningNoisePlot({ ...options, curves: [{ label: "a", edgesHz, rms: [1] }] })).toThrow(/31 x and 1 y/);
    expect(() => runningNoisePlot({ ...options, curves: [{ label: "a", edgesHz: [1], rms: [0] }] })).toThrow(
      /RMS above zero, in V/,
    );
    expect(() => runningNoisePlot({ ...options, edge: "upper" } as RunningNoisePlotOptions)).toThrow(
      /no option "edge"/,
    );
  });
});
