import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { expMinusOne, over, polar, sizeOf, squareDifference, times } from "../../src/numerics/complex.js";

test("a quotient times its divisor is the dividend", () => {
  const product = times(over({ re: 3, im: -2 }, { re: 0.25, im: 7 }), { re: 0.25, im: 7 });
  expectRelative(product.re, 3, 1e-15);
  expectRelative(product.im, -2, 1e-15);
});

test("exp(z) − 1 keeps its digits near 0 and agrees with the polar form far from it", () => {
  const small = expMinusOne({ re: 1e-9, im: 2e-9 });
  // z + z²/2 + …: z² = −3e-18 + 4e-18 i
  expectRelative(small.re, 1e-9 - 1.5e-18, 1e-15);
  expectRelative(small.im, 2e-9 + 2e-18, 1e-15);
  const large = expMinusOne({ re: 1.3, im: 2.1 });
  const polarForm = polar(Math.exp(1.3), 2.1);
  expectRelative(large.re, polarForm.re - 1, 2e-15);
  expectRelative(large.im, polarForm.im, 2e-15);
});

test("a difference of squares of neighbours keeps the digits of their difference", () => {
  const one = { re: 1, im: 2 };
  const other = { re: 1 + 2 ** -40, im: 2 };
  // (other − one)(other + one) = 2^−40 (2 + 2^−40 + 4i)
  const difference = squareDifference(other, one);
  expectRelative(difference.re, 2 ** -40 * (2 + 2 ** -40), 1e-15);
  expectRelative(difference.im, 2 ** -40 * 4, 1e-15);
  expect(sizeOf({ re: 3, im: 4 })).toBe(5);
});
