import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { type Complex, over, times } from "../../src/numerics/complex.js";
import { lerchFraction } from "../../src/numerics/lerch-fraction.js";

function fractionAt(s: number, y: Complex): Complex {
  const found = lerchFraction(s, y, { re: 1 + y.re, im: y.im });
  if (found === undefined) throw new Error("handed over");
  return found;
}

test("at s = 1 it is ln(1+y)/y, all over the unit disk", () => {
  for (let radius = 0.05; radius <= 1; radius += 0.19)
    for (let angle = 0; angle < 3; angle += 0.37) {
      const y = { re: radius * Math.cos(angle), im: radius * Math.sin(angle) };
      const log = { re: 0.5 * Math.log((1 + y.re) ** 2 + y.im ** 2), im: Math.atan2(y.im, 1 + y.re) };
      const expected = over(log, y);
      const found = fractionAt(1, y);
      const error = Math.hypot(found.re - expected.re, found.im - expected.im);
      expect(error).toBeLessThanOrEqual(4e-15 * Math.hypot(expected.re, expected.im));
    }
});

test("at s = ½ and real y it is 2·arctan(√y)/√y", () => {
  for (const y of [1e-12, 1e-3, 0.2, 0.7, 1])
    expectRelative(fractionAt(0.5, { re: y, im: 0 }).re, (2 * Math.atan(Math.sqrt(y))) / Math.sqrt(y), 1e-15);
});

test("neighbours in s are one step of the series apart: Φ(s) = 1/s − y·Φ(s+1)", () => {
  const y = { re: -0.6, im: 0.7 };
  for (const s of [0.25, 0.5, 1.3, 4.1]) {
    const next = times(y, fractionAt(s + 1, y));
    const found = fractionAt(s, y);
    expectRelative(found.re, 1 / s - next.re, 1e-14);
    expectRelative(found.im, -next.im, 1e-14);
  }
});

test("it is handed over close to −1, and nowhere else", () => {
  expect(lerchFraction(0.5, { re: -1, im: 0 }, { re: 0, im: 1e-9 })).toBeUndefined();
  expect(lerchFraction(0.5, { re: -0.995, im: 0 }, { re: 0.005, im: 0 })).toBeDefined();
});
