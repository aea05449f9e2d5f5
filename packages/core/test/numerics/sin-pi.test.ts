import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { sinPi } from "../../src/numerics/sin-pi.js";

test("it has the sines of the clock face and is odd", () => {
  expectRelative(sinPi(1 / 12), (Math.sqrt(6) - Math.sqrt(2)) / 4, 4e-16);
  expectRelative(sinPi(0.25), Math.SQRT1_2, 2e-16);
  expect(sinPi(0.5)).toBe(1);
  expect(sinPi(-0.5)).toBe(-1);
  expectRelative(sinPi(1e-200), Math.PI * 1e-200, 2e-16);
});
