import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { assumedPointUncertainty } from "../../src/curve/assumed-point-uncertainty.js";
import { type CurveOptions, curveFromPoints, type GivenPoint } from "../../src/curve/curve-from-points.js";
import { OutOfDomainError } from "../../src/ground/errors.js";

const two: readonly GivenPoint[] = [
  { frequency: 10, density: 9e-9 },
  { frequency: 1, density: 21e-9 },
];

describe("curveFromPoints", () => {
  test("sorts, completes and freezes", () => {
    const curve = curveFromPoints(two, { unit: "V" });
    expect(curve).toEqual({
      unit: "V",
      label: "",
      points: [
        { frequency: 1, density: 21e-9, uncertainty: 0.05, inFit: true },
        { frequency: 10, density: 9e-9, uncertainty: 0.05, inFit: true },
      ],
      uncertaintyIs: "assumed",
      commonUncertainty: 0,
      source: [],
    });
    for (const part of [curve, curve.points, curve.points[0], curve.source]) expect(Object.isFrozen(part)).toBe(true);
  });

  test("does not depend on the order given and leaves what it was given alone", () => {
    const point = fc.record({
      frequency: fc.integer({ min: 1, max: 1e6 }),
      density: fc.double({ min: 1e-12, max: 1, noNaN: true }),
      uncertainty: fc.option(fc.double({ min: 1e-3, max: 1, noNaN: true }), { nil: undefined }),
      inFit: fc.boolean(),
    });
    const points = fc.uniqueArray(point, { selector: ({ frequency }) => frequency, minLength: 2, maxLength: 30 });
    fc.assert(
      fc.property(points, fc.func(fc.nat()), (given, key) => {
        const frozen = given.map((one) => Object.freeze(one));
        const shuffled = frozen.toSorted((one, other) => key(one.frequency) - key(other.frequency));
        expect(curveFromPoints(shuffled, { unit: "V" })).toEqual(curveFromPoints(Object.freeze(frozen), { unit: "V" }));
      }),
      { seed: 5 },
    );
  });

  test("says whether the uncertainties were given or are its own assumption", () => {
    expect(assumedPointUncertainty).toBe(0.05);
    const [one, other] = two as [GivenPoint, GivenPoint];
    const mixed = curveFromPoints([{ ...one, uncertainty: 0.02 }, other], { unit: "V" });
    expect(mixed.uncertaintyIs).toBe("assumed");
    expect(mixed.points.map(({ uncertainty }) => uncertainty)).toEqual([0.05, 0.02]);
    const general = curveFromPoints([{ ...one, uncertainty: 0.02 }, other], { unit: "V", pointUncertainty: 0.1 });
    expect(general.uncertaintyIs).toBe("given");
    expect(general.points.map(({ uncertainty }) => uncertainty)).toEqual([0.1, 0.02]);
  });

  test("counts a point given twice alike once", () => {
    expect(curveFromPoints([...two, { frequency: 1, density: 21e-9 }], { unit: "V" }).points).toHaveLength(2);
  });

  test("keeps texts on one line", () => {
    const curve = curveFromPoints(two, {
      unit: "V",
      label: " a\n\tb ",
      source: [
        { key: " document\r", value: "one\u2028two\u001b" },
        { key: "", value: " " },
      ],
    });
    expect(curve.label).toBe("a b");
    expect(curve.source).toEqual([{ key: "document", value: "one two" }]);
  });

  const refused: readonly (readonly [string, readonly GivenPoint[], CurveOptions, string])[] = [
    ["no points", [], { unit: "V" }, "at least two points"],
    [
      "one frequency",
      [
        { frequency: 1, density: 2 },
        { frequency: 1, density: 2 },
      ],
      { unit: "V" },
      "at least two points",
    ],
    [
      "two densities",
      [...two, { frequency: 1, density: 2 }],
      { unit: "V" },
      "at 1 Hz it got 2.1e-8 (uncertainty 0.05) and 2",
    ],
    [
      "two uncertainties",
      [...two, { frequency: 1, density: 21e-9, uncertainty: 0.1 }],
      { unit: "V" },
      "uncertainty 0.1",
    ],
    ["in and out", [...two, { frequency: 1, density: 21e-9, inFit: false }], { unit: "V" }, "aside"],
    ["zero frequency", [...two, { frequency: 0, density: 2 }], { unit: "V" }, "point with index 2"],
    [
      "negative density",
      [...two, { frequency: 5, density: -2 }],
      { unit: "V" },
      "The density of the point with index 2",
    ],
    ["NaN", [...two, { frequency: 5, density: Number.NaN }], { unit: "V" }, "got NaN"],
    ["infinity", [...two, { frequency: Number.POSITIVE_INFINITY, density: 1 }], { unit: "V" }, "got Infinity"],
    ["no square", [...two, { frequency: 5, density: 1e-200 }], { unit: "V" }, "from 1e-150"],
    ["zero uncertainty", [...two, { frequency: 5, density: 1, uncertainty: 0 }], { unit: "V" }, "above 0"],
    ["percent", [...two, { frequency: 5, density: 1, uncertainty: 5 }], { unit: "V" }, "at most 1"],
    ["general percent", two, { unit: "V", pointUncertainty: 5 }, "pointUncertainty, relative,"],
    ["common percent", two, { unit: "V", commonUncertainty: -0.1 }, "commonUncertainty"],
    ["prefix", two, { unit: "nV" }, "without prefix"],
    ["density", two, { unit: "V/√Hz" }, "unit of its signal"],
    ["ppm", two, { unit: "ppm" }, "without prefix"],
    ["no unit", two, {} as CurveOptions, "unit of its signal"],
    ["misspelt", two, { unit: "V", lable: "x" } as CurveOptions, 'no option "lable"'],
    ["key with colon", two, { unit: "V", source: [{ key: "a: b", value: "c" }] }, "no colon"],
    ["setting as key", two, { unit: "V", source: [{ key: "Label", value: "c" }] }, "which are options"],
    ["long key", two, { unit: "V", source: [{ key: "k".repeat(61), value: "c" }] }, "60 characters"],
  ];
  test.each(refused)("refuses: %s", (_, points, options, said) => {
    const make = (): unknown => curveFromPoints(points, options);
    expect(make).toThrow(OutOfDomainError);
    expect(make).toThrow(said);
  });
});
