import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { sincSquared } from "../../src/numerics/sinc-squared.js";

test("it is 1 at 0, 4/π² at a half, and zero at whole turns", () => {
  expect(sincSquared(0, 0)).toBe(1);
  expectRelative(sincSquared(0.5, 0.5), 4 / Math.PI ** 2, 4e-16);
  expect(sincSquared(7, 0)).toBe(0);
});
