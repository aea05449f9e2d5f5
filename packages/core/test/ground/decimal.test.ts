import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { decimalIn } from "../../src/ground/decimal.js";

function read(text: string, shift = 0, mark: "." | "," = "."): number {
  return decimalIn(text, 0, text.length, mark, shift);
}

const digits = (least: number, most: number): fc.Arbitrary<string> =>
  fc.string({ unit: fc.constantFrom(..."0123456789".split("")), minLength: least, maxLength: most });

describe("decimalIn", () => {
  test("gives the double that JavaScript's own correctly rounded reader gives, shift included", () => {
    fc.assert(
      fc.property(
        fc.constantFrom("", "-", "+"),
        digits(1, 25),
        fc.option(digits(0, 25), { nil: undefined }),
        fc.option(fc.integer({ min: -330, max: 330 }), { nil: undefined }),
        fc.integer({ min: -40, max: 40 }),
        (sign, whole, fraction, exponent, shift) => {
          const mantissa = `${sign}${whole}${fraction === undefined ? "" : `.${fraction}`}`;
          const text = exponent === undefined ? mantissa : `${mantissa}e${exponent}`;
          return Object.is(read(text, shift), Number(`${mantissa}e${(exponent ?? 0) + shift}`));
        },
      ),
      { numRuns: 5000, seed: 1 },
    );
  });

  test("rounds digits and prefix together: 85 n is 85e-9, which 85 · 1e-9 is not", () => {
    expect(read("85", -9)).toBe(85e-9);
    expect(85 * 1e-9).not.toBe(85e-9);
    expect(read("0.3", -6)).toBe(0.3e-6);
    expect(read("2.2", -18)).toBe(2.2e-18);
  });

  test("reads the parts of a longer text, signs of both kinds, marks of both kinds", () => {
    expect(decimalIn("1, 23.5 ,4", 3, 7, ".", 0)).toBe(23.5);
    expect(read("−5e−3")).toBe(-5e-3);
    expect(read("2,4", 0, ",")).toBe(2.4);
    expect(read("2,4e1", 0, ",")).toBe(24);
    expect(read("123456789012345678,5", 0, ",")).toBe(Number("123456789012345678.5"));
  });

  test.each([
    "",
    " 1",
    "1 ",
    "1.2.3",
    "1,2",
    "e5",
    "1e",
    "1e+",
    "1e5.",
    ".",
    "-",
    "+-1",
    "0x10",
    "Infinity",
    "NaN",
    "1_0",
    "１",
  ])("takes %j for no number", (text) => {
    expect(read(text)).toBeNaN();
  });

  test("stays finite or zero or infinite, never NaN, for exponents of any length", () => {
    expect(read("1e999999999999")).toBe(Number.POSITIVE_INFINITY);
    expect(read("1e-999999999999")).toBe(0);
    expect(read("0e999999999999")).toBe(0);
  });
});
