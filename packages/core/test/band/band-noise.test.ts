import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { expectRelative, relativeError } from "../../../../test/support/relative.js";
import { bandNoise } from "../../src/band/band-noise.js";
import type { Curve } from "../../src/curve/curve.js";
import { DivergentIntegralError, NoConvergenceError, OutOfDomainError } from "../../src/ground/errors.js";
import { functionSpectrum } from "../../src/spectrum/function-spectrum.js";
import { polyline } from "../../src/spectrum/polyline.js";
import { powerLaws } from "../../src/spectrum/power-laws.js";
import { scaleSpectrum } from "../../src/spectrum/scale-spectrum.js";
import { whiteFlicker } from "../../src/spectrum/white-flicker.js";

const infinity = Number.POSITIVE_INFINITY;
const curveOf = (points: readonly (readonly [number, number])[], uncertainty = 0.05, common = 0): Curve => ({
  unit: "V",
  label: "",
  points: points.map(([frequency, density]) => ({ frequency, density, uncertainty, inFit: true })),
  uncertaintyIs: "given",
  commonUncertainty: common,
  source: [],
});

describe("properties of every band", () => {
  const model = fc.record({
    floor: fc.double({ min: 1e-12, max: 1e3, noNaN: true }),
    cornerHz: fc.double({ min: 1e-3, max: 1e6, noNaN: true }),
    exponent: fc.double({ min: 0.3, max: 2.5, noNaN: true }),
  });
  const edges = fc.tuple(
    fc.double({ min: 1e-4, max: 1e4, noNaN: true }),
    fc.double({ min: 1.01, max: 1e3, noNaN: true }),
    fc.double({ min: 1.01, max: 1e3, noNaN: true }),
  );

  test("adjacent bands add in power", () => {
    fc.assert(
      fc.property(model, edges, (options, [from, one, other]) => {
        const spectrum = whiteFlicker(options);
        const [middle, to] = [from * one, from * one * other];
        const whole = bandNoise(spectrum, { fromHz: from, toHz: to });
        const low = bandNoise(spectrum, { fromHz: from, toHz: middle });
        const high = bandNoise(spectrum, { fromHz: middle, toHz: to });
        return relativeError(low.power + high.power, whole.power) <= 4e-15;
      }),
      { seed: 2, numRuns: 500 },
    );
  });

  test("a gain scales the rms, and a wider band never has less", () => {
    fc.assert(
      fc.property(
        model,
        edges,
        fc.double({ min: 1e-6, max: 1e6, noNaN: true }),
        (options, [from, one, other], gain) => {
          const spectrum = whiteFlicker(options);
          const band = { fromHz: from, toHz: from * one };
          const plain = bandNoise(spectrum, band).rms;
          const scaled = bandNoise(scaleSpectrum(spectrum, gain), band).rms;
          const wider = bandNoise(spectrum, { fromHz: from, toHz: from * one * other }).rms;
          return relativeError(scaled, gain * plain) <= 4e-15 && wider >= plain;
        },
      ),
      { seed: 3, numRuns: 500 },
    );
  });

  test("a dense sum on a logarithmic grid agrees", () => {
    const spectrum = whiteFlicker({ floor: 70e-9, cornerHz: 53, exponent: 1.06 });
    const steps = 200_000;
    const width = Math.log(10 / 0.1) / steps;
    let sum = 0;
    for (let k = 0; k < steps; k += 1) {
      const hz = 0.1 * Math.exp(width * (k + 0.5));
      sum += spectrum.powerDensityAt(hz) * hz * width;
    }
    expectRelative(bandNoise(spectrum, { fromHz: 0.1, toHz: 10 }).power, sum, 1e-9);
  });
});

describe("what has no finite power is refused with the edge to move", () => {
  const flicker = powerLaws([{ coefficient: 1e-14, exponent: 1 }]);
  const edgeOf = (run: () => unknown): string => {
    try {
      run();
    } catch (error) {
      if (error instanceof DivergentIntegralError) return `${error.edge}: ${error.message}`;
    }
    return "no divergence";
  };

  test("0 Hz with exponent 1 and above", () => {
    expect(edgeOf(() => bandNoise(flicker, { fromHz: 0, toHz: 1 }))).toMatch(
      /^fromHz: The power grows .* move fromHz up/,
    );
  });

  test("infinity without roll-off", () => {
    expect(edgeOf(() => bandNoise(flicker, { fromHz: 1, toHz: infinity }))).toMatch(/^toHz: .* move toHz down/);
  });

  test("exponents below and above 1 are welcome at their ends", () => {
    expectRelative(bandNoise(powerLaws([{ coefficient: 1, exponent: 0.5 }]), { fromHz: 0, toHz: 4 }).power, 4, 1e-15);
    expectRelative(
      bandNoise(powerLaws([{ coefficient: 1, exponent: 2 }]), { fromHz: 4, toHz: infinity }).power,
      0.25,
      1e-15,
    );
  });
});

describe("bad bands are refused in one sentence", () => {
  const white = powerLaws([{ coefficient: 1e-14, exponent: 0 }]);

  test.each([
    [{ fromHz: 10, toHz: 1 }, /toHz, the upper band edge, must be a number of Hz above fromHz = 10/],
    [{ fromHz: 5, toHz: 5 }, /above fromHz = 5/],
    [{ fromHz: -1, toHz: 1 }, /fromHz, the lower band edge/],
    [{ fromHz: Number.NaN, toHz: 1 }, /fromHz/],
    [{ toHz: 1 } as { fromHz: number; toHz: number }, /fromHz/],
  ])("%o", (band, message) => {
    expect(() => bandNoise(white, band)).toThrow(message);
    expect(() => bandNoise(white, band)).toThrow(OutOfDomainError);
  });

  test("a misspelt option does not pass as a default", () => {
    expect(() => bandNoise(white, { fromHz: 1, toHz: 2, wieghting: undefined } as never)).toThrow(
      /no option "wieghting"/,
    );
  });

  test("a band beyond the points says what to type", () => {
    const line = polyline(
      curveOf([
        [1, 1e-8],
        [100, 1e-9],
      ]),
    );
    expect(() => bandNoise(line, { fromHz: 0.1, toHz: 10 })).toThrow(/beyond: \{ below: 1 \}/);
    expect(() => bandNoise(line, { fromHz: 1, toHz: 1000 })).toThrow(/beyond: \{ above: 0 \}/);
  });
});

test("a spectrum that cannot be resolved is an error with the best estimate", () => {
  const comb = functionSpectrum((hz) => 1 + Math.cos(1e7 * hz), { lowExponent: 0, highExponent: 0 });
  try {
    bandNoise(comb, { fromHz: 1, toHz: 100 });
    expect.unreachable();
  } catch (error) {
    expect(error).toBeInstanceOf(NoConvergenceError);
    if (error instanceof NoConvergenceError) expect(error.bestEstimate).toBeGreaterThan(0);
  }
});

describe("uncertainty", () => {
  test("one flat segment: its two points share the power, u = 5 %/√2 where they share it evenly", () => {
    const line = polyline(
      curveOf([
        [1, 1e-8],
        [1.001, 1e-8],
      ]),
    );
    const noise = bandNoise(line, { fromHz: 1, toHz: 1.001 });
    expectRelative(noise.standardUncertainty ?? 0, 0.05 / Math.SQRT2, 1e-5);
  });

  test("an error of the axis goes into the result whole, beside that of the points", () => {
    const noise = bandNoise(
      polyline(
        curveOf(
          [
            [1, 1e-8],
            [100, 1e-9],
          ],
          1e-9,
          0.03,
        ),
      ),
      { fromHz: 1, toHz: 100 },
    );
    expectRelative(noise.standardUncertainty ?? 0, 0.03, 1e-6);
    expect(noise.uncertaintyParts?.map(({ name }) => name)).toEqual(["points", "axis"]);
  });

  test("moving a point by its uncertainty moves the rms by what its gradient says", () => {
    const points: [number, number][] = [
      [0.1, 1e-6],
      [1, 3e-7],
      [10, 1.2e-7],
      [100, 9e-8],
    ];
    const band = { fromHz: 0.1, toHz: 50 };
    const rms = bandNoise(polyline(curveOf(points)), band).rms;
    const moved = points.map((_, at) => {
      const shifted = points.map(([hz, density], index): [number, number] => [
        hz,
        index === at ? density * 1.0001 : density,
      ]);
      return (bandNoise(polyline(curveOf(shifted)), band).rms / rms - 1) / 1.0001e-4;
    });
    const expected = Math.hypot(...moved.map((slope) => slope * 0.05));
    expectRelative(bandNoise(polyline(curveOf(points)), band).standardUncertainty ?? 0, expected, 1e-3);
  });

  test("beyond the points the exponent is an assumption that widens, and the share resting on it is told", () => {
    const curve = curveOf(
      [
        [1, 1e-7],
        [100, 1e-8],
      ],
      1e-6,
    );
    const noise = bandNoise(polyline(curve, { beyond: { below: 1 } }), { fromHz: 0.1, toHz: 100 });
    // below: S = 1e-14/f over one decade; d ln rms/da = −½ ∫ S ln f / ∫ S
    const outside = 1e-14 * Math.LN10;
    expectRelative(noise.outsidePoints.below, outside / noise.power, 1e-9);
    const slope = (0.5 * 1e-14 * 0.5 * Math.LN10 ** 2) / noise.power;
    const part = noise.uncertaintyParts?.find(({ name }) => name === "exponent below the points");
    expectRelative(part?.relative ?? 0, 0.15 * slope, 1e-6);
    expect(noise.notes).toHaveLength(1);
  });
});
