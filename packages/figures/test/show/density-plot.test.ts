import { readFileSync, writeFileSync } from "node:fs";
import { NoiseError, whiteFlicker } from "@quietband/core";
import { describe, expect, test } from "vitest";
import { layoutDensityPlot } from "../../src/show/density-layout.js";
import type { DensityPlotOptions } from "../../src/show/density-options.js";
import { densityPlot } from "../../src/show/density-plot.js";
import { curveOf, demoR1, hundredCurves, modelOf } from "./support/invented-curves.js";
import { everyElement, parseXml } from "./support/parse-xml.js";
import { expectReadable, expectSamePicture, expectSound, textBoxes, textsOf } from "./support/plot-claims.js";

const model = whiteFlicker({ floor: 71.65e-9, cornerHz: 53.19, exponent: 1.045 });
const densityAt = (hz: number): number => Math.sqrt(model.powerDensityAt(hz));
const frequencies = [0.1, 1, 10, 100, 1000];
const demo: DensityPlotOptions = {
  curves: [demoR1()],
  models: [{ spectrum: { ...model, pointsSpan: [0.1, 1000] }, label: "floor and flicker" }],
  band: { fromHz: 0.1, toHz: 10 },
  floor: 71.65e-9,
  cornerHz: 53.19,
  interval: {
    frequencies,
    lower: frequencies.map((hz) => densityAt(hz) * 0.92),
    upper: frequencies.map((hz) => densityAt(hz) * 1.08),
    label: "95 % of the model",
  },
  suspected: [12_000],
  title: "R1: noise density",
  note: "INVENTED part for demonstration.",
};

describe("the demonstration's reference", () => {
  const layout = layoutDensityPlot(demo);

  test("has decades in engineering units on the frequency axis and 1-2-5 on the density axis", () => {
    expect(layout.frame.x.ticks.map(({ value }) => value)).toEqual([0.1, 1, 10, 100, 1000, 10_000]);
    expect(layout.frame.x.ticks.map(({ label }) => label).slice(1)).toEqual([
      "1 Hz",
      "10 Hz",
      "100 Hz",
      "1 kHz",
      "10 kHz",
    ]);
    expect(layout.frame.y.ticks.map(({ label }) => label)).toEqual([
      "50 nV/√Hz",
      "100 nV/√Hz",
      "200 nV/√Hz",
      "500 nV/√Hz",
      "1 µV/√Hz",
      "2 µV/√Hz",
    ]);
  });

  test("draws every point where the axes say, with a bar of one standard uncertainty", () => {
    const { x, y } = layout.frame;
    expect(layout.markers.length).toBe(15);
    for (const [index, point] of (demo.curves?.[0]?.points ?? []).entries()) {
      const marker = layout.markers[index];
      expect(marker?.x).toBe(x.at(point.frequency));
      expect(marker?.y).toBe(y.at(point.density));
      expect(marker?.bar?.top).toBe(y.at(point.density * Math.exp(0.05)));
      expect(marker?.bar?.bottom).toBe(y.at(point.density / Math.exp(0.05)));
    }
  });

  test("draws points left out of the fit hollow and says so", () => {
    expect(layout.markers.filter(({ filled }) => !filled).length).toBe(3);
    expect(layout.key.map(({ label }) => label)).toContain("left out of the fit");
  });

  test("circles a suspect and asks about it", () => {
    expect(layout.markers.filter(({ ring }) => ring).map(({ x }) => x)).toEqual([layout.frame.x.at(12_000)]);
    expect(layout.labels.map(({ text }) => text)).toContain("misread?");
  });

  test("marks floor and corner with their values, the corner's line from √2 above the floor", () => {
    const { x, y } = layout.frame;
    expect(layout.labels.map(({ text }) => text)).toEqual(
      expect.arrayContaining(["floor 71.65 nV/√Hz", "corner 53.19 Hz", "0.1 Hz to 10 Hz"]),
    );
    const [floor, corner] = layout.guides.map(({ runs }) => runs[0]);
    expect(floor?.map(([, at]) => at)).toEqual([y.at(71.65e-9), y.at(71.65e-9)]);
    expect(corner?.[0]).toEqual([x.at(53.19), y.at(71.65e-9 * Math.SQRT2)]);
  });

  test("shades the band between its edges", () => {
    const [shade] = layout.shades;
    expect(shade?.edges).toEqual([layout.frame.x.at(0.1), layout.frame.x.at(10)]);
    expect(shade?.box.x).toBe(layout.frame.x.at(0.1));
  });

  test("dots the model beyond the points and explains it", () => {
    const spans = layout.lines.map(({ runs, dash }) => ({ from: runs[0]?.[0]?.[0], dotted: dash.length > 0 }));
    expect(spans.map(({ dotted }) => dotted)).toEqual([true, false, true]);
    expect(spans[1]?.from).toBe(layout.frame.x.at(0.1));
    expect(layout.key.map(({ label }) => label)).toContain("beyond the points");
  });

  test("says of the bars that their size is an assumption", () => {
    expect(layout.key.map(({ label }) => label)).toContain("± one standard uncertainty (assumed)");
  });

  test("is readable: no text on another, all inside", () => {
    expectReadable(layout);
  });

  test("is a sound document with title, note and description", () => {
    const root = expectSound(densityPlot(demo));
    expect(textsOf(root)).toEqual(expect.arrayContaining(["R1: noise density", "INVENTED part for demonstration."]));
    expect(root.children[1]?.text).toContain("R1, reference (invented): 15 points, 3 left out of the fit.");
    expect(root.children[1]?.text).toContain("Corner 53.19 Hz.");
  });

  test("gives the same text twice, and leaves what it is given alone", () => {
    const before = JSON.stringify(demo);
    expect(densityPlot(demo)).toBe(densityPlot(demo));
    expect(JSON.stringify(demo)).toBe(before);
  });

  test("is the stored picture, to a hundredth of a pixel", () => {
    const file = new URL("golden/r1-density.svg", import.meta.url);
    // After a change meant to be seen: STORE_PICTURES=1 npx vitest run ..., and look at the picture before committing it.
    if (process.env["STORE_PICTURES"] === "1") writeFileSync(file, densityPlot(demo));
    const stored = readFileSync(file, "utf8");
    expectSamePicture(parseXml(densityPlot(demo)), parseXml(stored));
  });
});

describe("the traced line", () => {
  test("never strays a fifth of a pixel from the model, steps of a resonance included", () => {
    const resonance = modelOf((hz) => 1e-16 / ((1 - (hz / 1e3) ** 2) ** 2 + (hz / 1e3 / 50) ** 2), [1, 1e5]);
    const peaked = { ...resonance, knots: [1e3 * (1 - 1 / 100), 1e3, 1e3 * (1 + 1 / 100)] };
    const { frame, lines } = layoutDensityPlot({
      models: [{ spectrum: peaked, label: "Q = 50" }],
      fromHz: 1,
      toHz: 1e5,
    });
    const run = lines[0]?.runs[0] ?? [];
    let worst = 0;
    for (const [index, [x1, y1]] of run.entries()) {
      const [x2, y2] = run[index + 1] ?? [x1, y1];
      for (const share of [0.25, 0.5, 0.75]) {
        const at = x1 + share * (x2 - x1);
        const [left, right] = frame.x.range;
        const hz = frame.x.domain[0] * (frame.x.domain[1] / frame.x.domain[0]) ** ((at - left) / (right - left));
        const level = frame.y.at(Math.sqrt(peaked.powerDensityAt(hz)));
        worst = Math.max(worst, Math.abs(y1 + share * (y2 - y1) - level));
      }
    }
    expect(worst).toBeLessThan(0.2);
    expect(run.length).toBeLessThan(1000);
  });

  test("breaks where the density is zero", () => {
    const gap = modelOf((hz) => (hz > 10 && hz < 100 ? 0 : 1e-16), [1, 1000]);
    const { lines } = layoutDensityPlot({ models: [{ spectrum: gap, label: "gap" }], fromHz: 1, toHz: 1000 });
    expect(lines[0]?.runs.length).toBe(2);
    expectSound(densityPlot({ models: [{ spectrum: gap, label: "gap" }] }));
  });

  test("stays inside the support of a spectrum that has ends", () => {
    const ended = { ...modelOf(() => 1e-16, [1, 1000]), support: [1, 1000] as const };
    const { frame, lines } = layoutDensityPlot({ models: [{ spectrum: ended, label: "" }], fromHz: 0.01, toHz: 1e5 });
    const xs = lines.flatMap(({ runs }) => runs.flat()).map(([x]) => x);
    expect(Math.min(...xs)).toBe(frame.x.at(1));
    expect(Math.max(...xs)).toBe(frame.x.at(1000));
  });
});

const extremes: Readonly<Record<string, DensityPlotOptions>> = {
  "one point": { curves: [curveOf([[1000, 5e-9]])] },
  "one point without uncertainty": { curves: [curveOf([[1000, 5e-9, 0]], "")] },
  "densities of 1e-12": {
    curves: [
      curveOf([
        [0.01, 8e-12],
        [1, 1.2e-12],
        [100, 1e-12],
      ]),
    ],
    floor: 1e-12,
    cornerHz: 1,
  },
  "densities of 1e3": {
    curves: [
      curveOf([
        [0.01, 8e3],
        [1, 1.2e3],
        [100, 1e3],
      ]),
    ],
    floor: 1e3,
    cornerHz: 1,
  },
  "from 1e3 to 1e-12": {
    curves: [
      curveOf([
        [1e-6, 1e3],
        [1, 1],
        [1e6, 1e-12],
      ]),
    ],
  },
  "less than a decade both ways": {
    curves: [
      curveOf([
        [40, 1.2e-8],
        [45, 1.18e-8],
        [60, 1.13e-8],
      ]),
    ],
    models: [{ spectrum: whiteFlicker({ floor: 1e-8, cornerHz: 20 }), label: "model" }],
    band: { fromHz: 45, toHz: 55 },
    floor: 1e-8,
    cornerHz: 20,
  },
  "points that all agree": {
    curves: [
      curveOf([
        [1, 1e-8, 0],
        [10, 1e-8, 0],
        [100, 1e-8, 0],
      ]),
    ],
  },
  "a hundred curves": { curves: hundredCurves() },
  "a hundred curves in a small picture": { curves: hundredCurves(), width: 400, height: 280 },
  "very long labels": {
    curves: [1, 2, 3].map((scale) =>
      curveOf(
        [
          [1, scale * 1e-8],
          [100, scale * 1e-9],
        ],
        "a label that goes on and on about load, gain and temperature ".repeat(4),
      ),
    ),
    title: "a title that goes on and on ".repeat(12),
    note: "a note that goes on and on ".repeat(60),
  },
  "a label without blanks": {
    curves: [
      curveOf(
        [
          [1, 1e-8],
          [100, 1e-9],
        ],
        "x".repeat(500),
      ),
    ],
  },
  "corner and floor beyond the picture": {
    curves: [
      curveOf([
        [100, 7.2e-9],
        [1e4, 7.1e-9],
      ]),
    ],
    floor: 1e-12,
    cornerHz: 1e-4,
    band: { fromHz: 0, toHz: Number.POSITIVE_INFINITY },
  },
  "a model alone": {
    models: [{ spectrum: whiteFlicker({ floor: 70e-9, cornerHz: 60 }), label: "model" }],
    band: { fromHz: 0.1, toHz: 10 },
  },
  "many models": {
    models: Array.from({ length: 30 }, (_, index) => ({
      spectrum: whiteFlicker({ floor: (index + 1) * 1e-9, cornerHz: 60 }),
      label: `model ${index}`,
    })),
    fromHz: 0.1,
    toHz: 1e4,
  },
  "every point a suspect": { curves: [demoR1()], suspected: demoR1().points.map(({ frequency }) => frequency) },
  "a thousand points": {
    curves: [curveOf(Array.from({ length: 1000 }, (_, index) => [1 + index, 1e-8 / Math.sqrt(1 + index)] as const))],
  },
  "a unit as long as a sentence": {
    curves: [
      curveOf(
        [
          [1, 0.3],
          [10, 0.05],
        ],
        "X1",
        "parts in a million of the range ".repeat(9),
      ),
    ],
  },
  "a unit that takes no prefix": {
    curves: [
      curveOf(
        [
          [1, 0.3],
          [10, 0.05],
        ],
        "X1",
        "ppm",
      ),
    ],
  },
};

describe("whatever there is to draw", () => {
  test.each(Object.entries(extremes))("%s: readable and sound", (_, options) => {
    expectReadable(layoutDensityPlot(options));
    expectSound(densityPlot(options));
  });

  test("of a hundred curves twelve are named and the others counted", () => {
    const { key, lines } = layoutDensityPlot({ curves: hundredCurves() });
    expect(key.map(({ label }) => label)).toContain("and 88 more");
    expect(key.filter(({ label }) => label.startsWith("candidate")).length).toBe(12);
    expect(lines.length).toBe(100);
  });

  test("a label that found no room stands in the description", () => {
    const svg = densityPlot({ ...demo, width: 400, height: 280 });
    expect(expectSound(svg).children[1]?.text).toContain("Floor 71.65 nV/√Hz.");
  });

  test("a corner beyond the picture is named at the edge it lies beyond", () => {
    const { labels } = layoutDensityPlot(extremes["corner and floor beyond the picture"] ?? {});
    expect(labels.some(({ text }) => text.startsWith("← corner"))).toBe(true);
  });

  test("mark-up in labels, title and note shows as it was typed", () => {
    const hostile = `<script>&"R1"</script>`;
    const svg = densityPlot({ curves: [curveOf([[1, 1e-8]], hostile)], title: hostile, note: hostile });
    const root = expectSound(svg);
    expect(everyElement(root).map(({ tag }) => tag)).not.toContain("script");
    expect(textsOf(root).filter((text) => text === hostile).length).toBe(3);
  });

  test("a curve of two hundred thousand points is drawn in few", () => {
    const points = Array.from({ length: 200_000 }, (_, index) => [1 + index, 1e-8 * (1 + (index % 7) / 10)] as const);
    const layout = layoutDensityPlot({ curves: [curveOf(points)] });
    expect(layout.markers).toEqual([]);
    expect(layout.lines[0]?.runs[0]?.length).toBeLessThan(8000);
    const [top, bottom] = [layout.frame.y.at(1.6e-8), layout.frame.y.at(1e-8)];
    const ys = (layout.lines[0]?.runs[0] ?? []).map(([, y]) => y);
    expect([Math.min(...ys), Math.max(...ys)]).toEqual([top, bottom]);
  });

  test("points beyond the ends of the axis are left out, and the key stands beside the last one shown", () => {
    const { frame, key, markers } = layoutDensityPlot({ curves: [demoR1()], fromHz: 0.1, toHz: 10 });
    expect(markers.length).toBe(7);
    const [entry] = key;
    const middle = (entry?.box.y ?? 0) + (entry?.box.height ?? 0) / 2;
    expect(Math.abs(middle - frame.y.at(190e-9))).toBeLessThan(30);
  });

  test("a note too long for the picture stands in full in the description", () => {
    const note = `${"a note that goes on and on ".repeat(60)}to its end`;
    expect(expectSound(densityPlot({ ...demo, note })).children[1]?.text).toContain(note);
  });

  test("curves without a label are told apart by number", () => {
    const points = [
      [1, 1e-8],
      [100, 1e-9],
    ] as const;
    const named = (count: number): readonly string[] =>
      layoutDensityPlot({ curves: Array.from({ length: count }, () => curveOf(points, "")) }).key.map(
        ({ label }) => label,
      );
    expect(named(1)).toContain("points");
    expect(named(2)).toEqual(expect.arrayContaining(["curve 1", "curve 2"]));
  });

  test("twelve models without curves are all named", () => {
    const { key } = layoutDensityPlot(extremes["many models"] ?? {});
    expect(key.filter(({ label }) => label.startsWith("model")).length).toBe(12);
    expect(key.map(({ label }) => label)).toContain("and 18 more");
  });

  test("as many models as curves share their colours in pairs", () => {
    const curves = [
      curveOf(
        [
          [1, 1e-8],
          [100, 1e-9],
        ],
        "a",
      ),
      curveOf(
        [
          [1, 2e-8],
          [100, 2e-9],
        ],
        "b",
      ),
    ];
    const models = curves.map(({ label }) => ({ spectrum: model, label: `model of ${label}` }));
    const { key } = layoutDensityPlot({ curves, models });
    const colourOf = (label: string): string | undefined => key.find((entry) => entry.label === label)?.swatch.colour;
    expect(colourOf("a")).toBe(colourOf("model of a"));
    expect(colourOf("b")).toBe(colourOf("model of b"));
    expect(colourOf("a")).not.toBe(colourOf("b"));
  });
});

describe("what cannot be drawn is refused in one sentence", () => {
  const curve = curveOf([
    [1, 1e-8],
    [100, 1e-9],
  ]);
  const refusals: Readonly<Record<string, readonly [DensityPlotOptions, RegExp]>> = {
    nothing: [{}, /at least one curve or one model/],
    "two units": [{ curves: [curve, { ...curve, unit: "A" }] }, /one unit on one axis; got V, A/],
    "a band out of order": [{ curves: [curve], band: { fromHz: 10, toHz: 1 } }, /band must run .* got 10 Hz to 1 Hz/],
    "a negative band edge": [{ curves: [curve], band: { fromHz: -1, toHz: 1 } }, /fromHz, 0 Hz or more/],
    "a floor of zero": [{ curves: [curve], floor: 0 }, /floor must be a positive finite number of V\/√Hz; got 0/],
    "a corner that is no number": [{ curves: [curve], cornerHz: Number.NaN }, /cornerHz must be .* Hz; got NaN/],
    "crossed ends of the axis": [{ curves: [curve], fromHz: 10, toHz: 1 }, /from fromHz up to toHz/],
    "an interval of two lengths": [
      { curves: [curve], interval: { frequencies: [1, 2], lower: [1], upper: [2, 3], label: "" } },
      /as many lower and upper/,
    ],
    "an interval upside down": [
      { curves: [curve], interval: { frequencies: [1, 2], lower: [3, 3], upper: [2, 4], label: "" } },
      /0 < lower ≤ upper; got 3 to 2 at 1 Hz \(index 0\)/,
    ],
    "a model that nothing bounds": [
      { models: [{ spectrum: whiteFlicker({ floor: 1e-8, cornerHz: 0 }), label: "white" }] },
      /give fromHz and toHz/,
    ],
    "a picture where nothing is defined": [
      {
        models: [{ spectrum: { ...modelOf(() => 1e-16, [1, 2]), support: [1, 2] }, label: "" }],
        fromHz: 10,
        toHz: 100,
      },
      /no density above zero between 10 Hz and 100 Hz/,
    ],
    "a picture too small": [{ curves: [curve], width: 100 }, /width of a plot must be 400 to 4000 pixels; got 100/],
    "a height that is no number": [{ curves: [curve], height: Number.NaN }, /height of a plot/],
  };

  test.each(Object.entries(refusals))("%s", (_, [options, message]) => {
    expect(() => densityPlot(options)).toThrow(NoiseError);
    expect(() => densityPlot(options)).toThrow(message);
  });

  test("an option nobody reads", () => {
    const misspelt = { curves: [curve], cornerhz: 3 } as DensityPlotOptions;
    expect(() => densityPlot(misspelt)).toThrow(/knows no option "cornerhz"/);
  });
});

test("texts are where the layout says", () => {
  const texts = textsOf(expectSound(densityPlot(demo)));
  expect(texts.toSorted()).toEqual(
    textBoxes(layoutDensityPlot(demo))
      .map(({ text }) => text)
      .toSorted(),
  );
});
