import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { bandNoise } from "../../src/band/band-noise.js";
import { curveFromPoints } from "../../src/curve/curve-from-points.js";
import { fitCurve } from "../../src/fit/fit-curve.js";
import { OutOfDomainError } from "../../src/ground/errors.js";
import { polyline } from "../../src/spectrum/polyline.js";
import { whiteFlicker } from "../../src/spectrum/white-flicker.js";

const law = whiteFlicker({ floor: 5e-9, cornerHz: 40 });
const frequencies = Array.from({ length: 25 }, (_, k) => 10 ** (k / 4));
const curve = curveFromPoints(
  frequencies.map((frequency) => ({
    frequency,
    density: Math.sqrt(law.powerDensityAt(frequency)) * (frequency > 5e3 && frequency < 5e4 ? 3 : 1),
  })),
  { unit: "V", pointUncertainty: 0.03 },
);
const bump = { fromHz: 5e3, toHz: 5e4 };
const fit = fitCurve(curve, { bump });

test("the points of a bump take no part in the fit, and stand for themselves in the spectrum", () => {
  expectRelative(fit.floor ?? 0, 5e-9, 1e-9);
  expectRelative(fit.cornerHz ?? 0, 40, 1e-9);
  expect(fit.leftOut.map(({ why }) => why)).toEqual(["bump", "bump", "bump", "bump"]);
  const within = { fromHz: 6e3, toHz: 4e4 };
  expectRelative(bandNoise(fit, within).rms, bandNoise(polyline(curve), within).rms, 1e-14);
  const below = { fromHz: 1, toHz: 2e3 };
  expectRelative(bandNoise(fit, below).rms, bandNoise(law, below).rms, 1e-9);
  expectRelative(
    bandNoise(fit, { fromHz: 1, toHz: 1e6 }).power,
    bandNoise(fit, { fromHz: 1, toHz: 2e4 }).power + bandNoise(fit, { fromHz: 2e4, toHz: 1e6 }).power,
    1e-13,
  );
});

test("its uncertainty comes from the points in the bump and from the fit elsewhere", () => {
  const parts = (fromHz: number, toHz: number) =>
    Object.fromEntries(
      (bandNoise(fit, { fromHz, toHz }).uncertaintyParts ?? []).map((part) => [part.name, part.relative]),
    );
  expect(parts(1, 1e3)["points of the bump"]).toBe(0);
  expect(parts(1, 1e3)["fit"]).toBeGreaterThan(0.001);
  const inside = parts(6e3, 4e4);
  expect(inside["fit"]).toBe(0);
  expectRelative(
    inside["points of the bump"] ?? 0,
    bandNoise(polyline(curve), { fromHz: 6e3, toHz: 4e4 }).standardUncertainty ?? 0,
    1e-9,
  );
});

test("a bump at the end of the curve, and one without points", () => {
  const atTop = fitCurve(curve, { bump: { fromHz: 5e3, toHz: 1e6 } });
  expect(atTop.support).toEqual([1, 1e6]);
  expect(atTop.alternatives.map(({ model }) => model)).not.toContain("floorFlickerLorentzian");
  expect(() => fitCurve(curve, { bump: { fromHz: 11, toHz: 12 } })).toThrow(OutOfDomainError);
  expect(() => fitCurve(curve, { bump: { fromHz: 11, toHz: 12 } })).toThrow(/must hold at least one point/);
  expect(() => fitCurve(curve, { bump, model: "floorFlickerLorentzian" })).toThrow(/cannot stand in one model/);
});
