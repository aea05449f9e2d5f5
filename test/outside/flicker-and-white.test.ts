import { bandNoise, firstOrderLowPass, powerLaws, whiteFlicker } from "@quietband/core";
import { expect, test } from "vitest";
import { published } from "../support/published.js";
import { expectRelative } from "../support/relative.js";

// Source: S. Franco, Design with Operational Amplifiers and Analog Integrated Circuits, ch. 7; problem data seen in a
// stored companion, printed answers from memory (fixtures/published/worked_examples_1f_white.json).
interface Example {
  readonly id: string;
  readonly problem?: Readonly<Record<string, number | string>>;
  readonly publishedMicrovolts: number;
  readonly halfUnit: number;
}

const simple = published<Example>("worked_examples_1f_white").values.flatMap(({ problem, ...rest }) =>
  problem?.["whiteFloorVPerRtHz"] !== undefined && problem["shape"] === "brick-wall" ? [{ ...rest, problem }] : [],
);

test("there are three worked examples of 1/f and white noise", () => expect(simple).toHaveLength(3));

test.each(simple)("$id", ({ problem, publishedMicrovolts, halfUnit }) => {
  const spectrum = whiteFlicker({
    floor: Number(problem["whiteFloorVPerRtHz"]),
    cornerHz: Number(problem["cornerHz"]),
  });
  const { rms } = bandNoise(spectrum, { fromHz: Number(problem["f1Hz"]), toHz: Number(problem["f2Hz"]) });
  expect(Math.abs(rms * 1e6 - publishedMicrovolts)).toBeLessThanOrEqual(halfUnit);
});

test("1/f noise has the same power in every decade (any noise text, e.g. Motchenbacher and Connelly, ch. 1; from memory)", () => {
  const flicker = powerLaws([{ coefficient: 1e-12, exponent: 1 }]);
  const decades = [1e-6, 0.01, 1, 3e7].map((fromHz) => bandNoise(flicker, { fromHz, toHz: 10 * fromHz }).power);
  for (const power of decades) expectRelative(power, 1e-12 * Math.LN10, 1e-15);
});

test("white noise through one RC pole: kT/C does not know the resistor (Nyquist 1928)", () => {
  // 4kTR · (π/2) · 1/(2πRC) = kT/C
  const kelvin = 300;
  const farads = 1e-12;
  for (const ohms of [50, 1e3, 1e6]) {
    const thermal = powerLaws([{ coefficient: 4 * 1.380649e-23 * kelvin * ohms, exponent: 0 }]);
    const weighting = firstOrderLowPass({ cutoffHz: 1 / (2 * Math.PI * ohms * farads) });
    const { power } = bandNoise(thermal, { fromHz: 0, toHz: Number.POSITIVE_INFINITY, weighting });
    expectRelative(power, (1.380649e-23 * kelvin) / farads, 1e-14);
  }
});
