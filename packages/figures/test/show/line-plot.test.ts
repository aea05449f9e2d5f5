import { NoiseError } from "@quietband/core";
import { describe, expect, test } from "vitest";
import { layoutLinePlot } from "../../src/show/line-layout.js";
import type { LinePlotOptions } from "../../src/show/line-options.js";
import { linePlot } from "../../src/show/line-plot.js";
import { expectReadable, expectSound } from "./support/plot-claims.js";

const input = { title: "input", unit: "V", scale: "linear" } as const;
const seen = { title: "noise seen, RMS", unit: "V", scale: "linear" } as const;
const reference: LinePlotOptions = {
  lines: [
    { label: "direct", x: [0, 1, 2, 4.096], y: [0, 0.3e-6, 0.58e-6, 1.25e-6] },
    { label: "filtered", x: [0, 1, 2, 4.096], y: [0, 0.2e-6, 0.38e-6, 0.85e-6] },
  ],
  x: input,
  y: seen,
  marks: [
    { axis: "x", value: 2.048, label: "half scale" },
    { axis: "y", value: 0.5e-6, label: "converter alone" },
  ],
  title: "What the reference costs",
};
const layoutOf = (options: LinePlotOptions): ReturnType<typeof layoutLinePlot> => layoutLinePlot("linePlot", options);

describe("reference noise against input", () => {
  const layout = layoutOf(reference);

  test("both axes begin at zero, and one prefix serves the whole axis", () => {
    expect(layout.frame.x.domain[0]).toBe(0);
    expect(layout.frame.y.domain[0]).toBe(0);
    const units = new Set(layout.frame.y.ticks.slice(1).map(({ label }) => label.split(" ")[1]));
    expect([...units]).toEqual(["µV"]);
  });

  test("lines go through their values", () => {
    const { x, y } = layout.frame;
    expect(layout.lines[0]?.runs).toEqual([
      [
        [x.at(0), y.at(0)],
        [x.at(1), y.at(0.3e-6)],
        [x.at(2), y.at(0.58e-6)],
        [x.at(4.096), y.at(1.25e-6)],
      ],
    ]);
  });

  test("names its lines in the key and its marks in the plot", () => {
    expect(layout.key.map(({ label }) => label)).toEqual(["direct", "filtered"]);
    expect(layout.labels.map(({ text }) => text)).toEqual(["half scale", "converter alone"]);
  });

  test("several lines differ in dashes and carry markers, so that they are told apart in grey", () => {
    expect(layout.lines[0]?.dash).not.toEqual(layout.lines[1]?.dash);
    expect(new Set(layout.markers.map(({ shape }) => shape)).size).toBe(2);
  });

  test("gives the same text twice", () => {
    expect(linePlot(reference)).toBe(linePlot(reference));
  });
});

const extremes: Readonly<Record<string, LinePlotOptions>> = {
  "reference noise": reference,
  "one point": { ...reference, lines: [{ label: "only", x: [3], y: [1e3] }], marks: [] },
  "all zero": { ...reference, lines: [{ label: "zero", x: [0, 1], y: [0, 0] }], marks: [] },
  "negative values": { ...reference, lines: [{ label: "drift", x: [-3, 2], y: [-1e-12, 2e-12] }], marks: [] },
  "far from zero": {
    ...reference,
    lines: [{ label: "skirt", x: [999, 1001], y: [1e-9, 1e-7] }],
    y: { ...seen, scale: "log" },
    marks: [],
  },
  "a hundred lines": {
    ...reference,
    lines: Array.from({ length: 100 }, (_, index) => ({ label: `line ${index}`, x: [0, 1], y: [0, index + 1] })),
  },
  "no names": { ...reference, lines: reference.lines.map((line) => ({ ...line, label: "" })), title: undefined },
  "both logarithmic": {
    lines: [{ label: "deviation", x: [1e-3, 1, 1e5], y: [1e-6, 1e-8, 1e-8] }],
    x: { title: "averaging time", unit: "s", scale: "log" },
    y: { title: "two-sample deviation", unit: "V", scale: "log" },
  },
};

describe("whatever there is to draw", () => {
  test.each(Object.entries(extremes))("%s: readable and sound", (_, options) => {
    expectReadable(layoutOf(options));
    expectSound(linePlot(options));
  });

  test("counts the lines beyond those that can be told apart", () => {
    expect(layoutOf(extremes["a hundred lines"] ?? reference).key.map(({ label }) => label)).toContain("and 88 more");
  });

  test("zero on a logarithmic axis interrupts the line", () => {
    const line = { label: "gap", x: [1, 2, 3, 4, 5], y: [1, 2, 0, 4, 5] };
    const { lines } = layoutOf({ lines: [line], x: input, y: { ...seen, scale: "log" } });
    expect(lines[0]?.runs.map((run) => run.length)).toEqual([2, 2]);
  });
});

describe("what cannot be drawn is refused in one sentence", () => {
  const refusals: Readonly<Record<string, readonly [LinePlotOptions, RegExp]>> = {
    "no line": [{ ...reference, lines: [] }, /at least one line/],
    "lists of two lengths": [{ ...reference, lines: [{ label: "a", x: [1, 2], y: [1] }] }, /"a" has 2 x and 1 y/],
    "an empty line": [{ ...reference, lines: [{ label: "a", x: [], y: [] }] }, /"a" has 0 x and 0 y/],
    "nothing above zero on a logarithmic axis": [
      { lines: [{ label: "a", x: [1], y: [-1] }], x: input, y: { ...seen, scale: "log" } },
      /y of linePlot is logarithmic/,
    ],
    "nothing finite": [{ lines: [{ label: "a", x: [Number.NaN], y: [1] }], x: input, y: seen }, /x of linePlot needs/],
    "an option nobody reads": [{ ...reference, colour: "red" } as LinePlotOptions, /knows no option "colour"/],
  };

  test.each(Object.entries(refusals))("%s", (_, [options, message]) => {
    expect(() => linePlot(options)).toThrow(NoiseError);
    expect(() => linePlot(options)).toThrow(message);
  });
});
