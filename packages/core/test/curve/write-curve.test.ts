import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { demoCurve } from "../../../../test/support/published.js";
import type { Curve } from "../../src/curve/curve.js";
import { curveFromPoints } from "../../src/curve/curve-from-points.js";
import { readCurve } from "../../src/curve/read-curve.js";
import { writeCurve } from "../../src/curve/write-curve.js";
import { OutOfDomainError } from "../../src/ground/errors.js";

/** A curve without the line numbers of its text. */
function withoutLines(curve: Curve): unknown {
  const points = curve.points.map(({ frequency, density, uncertainty, inFit }) => [
    frequency,
    density,
    uncertainty,
    inFit,
  ]);
  return { ...curve, points };
}

const point = fc.record({
  frequency: fc.double({ min: 1e-150, max: 1e150, noNaN: true }),
  density: fc.double({ min: 1e-150, max: 1e150, noNaN: true }),
  uncertainty: fc.option(fc.double({ min: 1e-300, max: 1, noNaN: true }), { nil: undefined }),
  inFit: fc.boolean(),
});
const points = fc.uniqueArray(point, { selector: ({ frequency }) => frequency, minLength: 2, maxLength: 20 });
const words = fc.string({ unit: "binary", maxLength: 30 });
const source = fc.array(fc.record({ key: fc.constantFrom("", "document", "figure 7", "#", "12:30"), value: words }), {
  maxLength: 4,
});

describe("writeCurve", () => {
  test("is read back to the last bit, with label, provenance, marks and shared errors", () => {
    const effects = fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 20, maxLength: 20 });
    fc.assert(
      fc.property(
        points,
        fc.constantFrom("V", "A", "g", "m/s²", "1", "°/s", "LSB"),
        fc.record({ label: words, source, commonUncertainty: fc.double({ min: 0, max: 1, noNaN: true }) }),
        fc.array(effects, { maxLength: 3 }),
        (given, unit, rest, shared) => {
          const curve = curveFromPoints(given, { unit, ...rest });
          const whole: Curve =
            shared.length === 0
              ? curve
              : {
                  ...curve,
                  commonEffects: shared.map((all) => ({
                    name: "frequency axis",
                    effects: all.slice(0, curve.points.length).map((effect) => effect + 0),
                  })),
                };
          expect(withoutLines(readCurve(writeCurve(whole)))).toEqual(withoutLines(whole));
        },
      ),
      { numRuns: 1000, seed: 7 },
    );
  });

  test("is what was typed, in its own spelling", () => {
    expect(writeCurve(readCurve("# label: R1\n# figure: 7\nf/kHz, e [V/√Hz]\n1, 85n\n0.01, 0.12µ, aside\n"))).toBe(
      "# label: R1\n# figure: 7\nfrequency [Hz], density [nV/√Hz]\n10, 120, aside\n1000, 85\n",
    );
    expect(
      writeCurve(readCurve("# axis uncertainty: 3 %\nf/Hz, e [nV/√Hz], u\n1, 85, 5 %\n2, 80, -\n4, 80, 2.5 %\n")),
    ).toBe(
      "# axis uncertainty: 3 %\nfrequency [Hz], density [nV/√Hz], uncertainty [%]\n1, 85, -\n2, 80, -\n4, 80, 2.5\n",
    );
  });

  test.each(["R1", "A1", "J1", "X1"] as const)(
    "writes the demonstration's %s so that writing it again changes nothing",
    (part) => {
      const once = writeCurve(readCurve(demoCurve(part)));
      expect(writeCurve(readCurve(once))).toBe(once);
    },
  );

  test("refuses a shared error whose name cannot stand in a heading, or that has no number for a point", () => {
    const curve = readCurve("1 Hz, 1 V/√Hz\n2 Hz, 2 V/√Hz");
    const shared = (name: string, effects: readonly number[]): Curve => ({
      ...curve,
      commonEffects: [{ name, effects }],
    });
    for (const name of ["a, b", "a [x]", "a\nb", ": a", "#"])
      expect(() => writeCurve(shared(name, [0, 0]))).toThrow(OutOfDomainError);
    expect(() => writeCurve(shared("axis", [0]))).toThrow("point 1 has undefined");
    expect(() => writeCurve(shared("axis", [0, Number.NaN]))).toThrow(OutOfDomainError);
  });
});
