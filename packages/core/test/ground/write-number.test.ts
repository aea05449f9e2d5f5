import fc from "fast-check";
import { expect, test } from "vitest";
import { decimalExponent, writeNumber } from "../../src/ground/write-number.js";

test.each([
  [0, {}, "0"],
  [-0, {}, "0"],
  [1900e-9, { shift: 9 }, "1900"],
  [85e-9, { shift: 9 }, "85"],
  [0.1, {}, "0.1"],
  [1e6, {}, "1000000"],
  [1.5e-7, {}, "1.5e-7"],
  [1e22, {}, "1e22"],
  [1.5e300, {}, "1.5e300"],
  [5e-324, {}, "5e-324"],
  [-0.00012, {}, "-0.00012"],
  [999.96, { digits: 4 }, "1000"],
  [1.2, { digits: 4 }, "1.200"],
  [0, { digits: 3 }, "0.00"],
])("writes %d with %o as %s", (value, options, text) => {
  expect(writeNumber(value, options)).toBe(text);
});

test("moves the point without rounding", () => {
  fc.assert(
    fc.property(
      fc.double({ noNaN: true, noDefaultInfinity: true }),
      fc.integer({ min: -40, max: 40 }),
      (value, shift) => {
        const back = writeNumber(value, { shift });
        const [mantissa, exponent = "0"] = back.split("e");
        return Number(`${mantissa}e${Number(exponent) - shift}`) === value;
      },
    ),
    { numRuns: 2000, seed: 4 },
  );
});

test("the exponent is that of the rounded number", () => {
  expect([999.96, 999.94, 1e-9, 0].map((value) => decimalExponent(value, 4))).toEqual([3, 2, -9, 0]);
});
