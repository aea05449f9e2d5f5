import { bandNoise, curveFromPoints, OutOfDomainError, polyline } from "@quietband/core";
import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { namedSpectrum } from "../../src/chain/named-spectrum.js";
import { parallelParts } from "../../src/chain/parallel-parts.js";

const points = [1, 100].map((frequency) => ({ frequency, density: 1e-6 }));
const part = namedSpectrum(polyline(curveFromPoints(points, { unit: "V", pointUncertainty: 0.1 })), "reference");

test("nine parts have a third of the noise and the same relative uncertainty, since they share a curve", () => {
  const band = { fromHz: 2, toHz: 50 };
  const [one, nine] = [bandNoise(part, band), bandNoise(parallelParts(part, 9), band)];
  expectRelative(nine.rms, one.rms / 3, 1e-14);
  expectRelative(nine.standardUncertainty ?? 0, one.standardUncertainty ?? 1, 1e-14);
  expect(parallelParts(part, 9).name).toBe("9 × reference");
});

test("refuses a fraction of a part", () => {
  expect(() => parallelParts(part, 1.5)).toThrow(OutOfDomainError);
  expect(() => parallelParts(part, 0)).toThrow(OutOfDomainError);
});
