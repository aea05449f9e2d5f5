import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { bandNoise } from "../../src/band/band-noise.js";
import { curveFromPoints } from "../../src/curve/curve-from-points.js";
import { fitAgainstPoints } from "../../src/fit/fit-against-points.js";
import { fitCurve } from "../../src/fit/fit-curve.js";
import { polyline } from "../../src/spectrum/polyline.js";

const pointsWith = (factor: number) =>
  Array.from({ length: 25 }, (_, k) => {
    const frequency = 10 ** (k / 4);
    return { frequency, density: 5e-9 * Math.sqrt(1 + 40 / frequency) * (k === 12 ? factor : 1) };
  });

test("a point that carries more than 30 % of the power is named, and the lines through the points are offered", () => {
  const curve = curveFromPoints(pointsWith(4), { unit: "V" });
  const both = fitAgainstPoints(curve, fitCurve(curve), { fromHz: 100, toHz: 3000 });
  expect(both.heavyPoints.map(({ frequency }) => frequency)).toEqual([1000]);
  expect(both.better).toBe("points");
  expect(both.notes[0]).toMatch(
    /^The point at 1000 Hz carries \d\d % of the power of the band and lies .* above the model\.$/,
  );
  expect(both.notes[1]).toMatch(
    /Straight lines through the points are the better spectrum here; the model gives .* less/,
  );
  expectRelative(both.fit.rms / both.points.rms - 1, both.relativeDifference, 1e-12);
  expect(both.relativeDifference).toBeLessThan(-0.1);
});

test("the share is what moving the point does to the power", () => {
  const curveWith = (factor: number) => curveFromPoints(pointsWith(factor), { unit: "V" });
  const band = { fromHz: 300, toHz: 3000 };
  const [point] = fitAgainstPoints(curveWith(2), fitCurve(curveWith(2)), band).heavyPoints;
  const rms = (factor: number) => bandNoise(polyline(curveWith(factor)), band).rms;
  const slope = Math.log(rms(2 * 1.0001) / rms(2 / 1.0001)) / (2 * Math.log(1.0001));
  expectRelative(point?.share ?? 0, slope, 1e-4);
});

test("a heavy point where the model has it is named, and the model may stand", () => {
  const curve = curveFromPoints(pointsWith(1), { unit: "V" });
  const both = fitAgainstPoints(curve, fitCurve(curve), { fromHz: 1, toHz: 1e4 });
  expect([both.heavyPoints.map(({ frequency }) => frequency), both.better]).toEqual([[5623.41325190349], "fit"]);
  expect(both.notes[0]).toMatch(/and lies where the model has it\.$/);
  expect(Math.abs(both.relativeDifference)).toBeLessThan(0.01);
});
