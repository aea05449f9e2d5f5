import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { published } from "../../../../test/support/published.js";
import { MalformedDataError, NoiseError } from "../../src/ground/errors.js";
import { readQuantity } from "../../src/ground/read-quantity.js";
import { writeQuantity } from "../../src/ground/write-quantity.js";

describe("readQuantity", () => {
  test.each([
    ["0.1 Hz", 0.1, "Hz"],
    ["1.2 kHz", 1200, "Hz"],
    ["1.2kHz", 1200, "Hz"],
    ["85 nV", 85e-9, "V"],
    ["85 nV/√Hz", 85e-9, "V/√Hz"],
    ["4 nV²/Hz", 4e-18, "V²/Hz"],
    ["2.1 \u00b5V", 2.1e-6, "V"],
    ["2.1 \u03bcV", 2.1e-6, "V"],
    ["2.1uV", 2.1e-6, "V"],
    ["−3 mV", -3e-3, "V"],
    ["1e-3 V", 1e-3, "V"],
    ["2,4 ppm", 2.4e-6, "1"],
    ["5 %", 0.05, "1"],
    ["10 min", 600, "s"],
    ["1 d", 86_400, "s"],
    ["-120 dBV", 1e-6, "V"],
    ["-120 dBV/√Hz", 1e-6, "V/√Hz"],
    ["-120 dBV²/Hz", 1e-12, "V²/Hz"],
    ["-20 dBµV/√Hz", 1e-7, "V/√Hz"],
    ["3 dB", 3, "dB"],
    ["5 m", 5, "m"],
    ["  24 bit ", 24, "bit"],
    ["2", 2, ""],
    ["0,5", 0.5, ""],
    ["4k7", 4700, ""],
    ["85n", 85e-9, ""],
  ])("%s", (text, value, unit) => {
    expect(readQuantity(text)).toEqual({ value, unit });
  });

  test("every SI prefix gives the double nearest to the power of ten", () => {
    for (const { symbol, exponent } of published<{ symbol: string; exponent: number }>("si_prefixes").values)
      expect(readQuantity(`3.7 ${symbol}V`)).toEqual({ value: Number(`3.7e${exponent}`), unit: "V" });
  });

  // IEC 60062, letter and digit code for resistance and capacitance values; examples from memory.
  test.each([
    ["R47", 0.47],
    ["4R7", 4.7],
    ["47R", 47],
    ["4K7", 4700],
    ["4k7", 4700],
    ["47k", 47_000],
    ["4M7", 4.7e6],
    ["4G7", 4.7e9],
    ["1T0", 1e12],
  ])("reads %s of ohms", (text, value) => {
    expect(readQuantity(text, { unit: "Ω" })).toEqual({ value, unit: "Ω" });
    expect(readQuantity(`${text.replace(/R$/, "")} Ω`).unit).toBe("Ω");
  });

  test.each([
    ["4p7", 4.7e-12],
    ["4n7", 4.7e-9],
    ["4µ7", 4.7e-6],
    ["4u7", 4.7e-6],
    ["p47", 0.47e-12],
  ])("reads %s of farads", (text, value) => {
    expect(readQuantity(text, { unit: "F" })).toEqual({ value, unit: "F" });
  });

  test("the unit expected settles what a prefix alone means", () => {
    expect(readQuantity("85n", { unit: "V/√Hz" }).value).toBe(85e-9);
    expect(readQuantity("4n", { unit: "V²/Hz" }).value).toBe(4e-18);
    expect(readQuantity("4n7", { unit: "V²/Hz" }).value).toBe(4.7e-18);
    expect(readQuantity("5 m", { unit: "V" }).value).toBe(5e-3);
    expect(readQuantity("5 m", { unit: "m" }).value).toBe(5);
    expect(readQuantity("5", { unit: "Hz" })).toEqual({ value: 5, unit: "Hz" });
    expect(readQuantity("3 ppm", { unit: "1" }).value).toBe(3e-6);
  });

  test.each([
    ["ten hertz", undefined, "does not begin with a number"],
    ["", undefined, "does not begin with a number"],
    ["85 A", "V", 'Expected a quantity in V, but "85 A" is in A.'],
    ["85 nV/Hz", undefined, "did you mean nV/√Hz or nV²/Hz?"],
    ["1,000 Hz", undefined, "could mean a decimal comma or thousands"],
    ["1,000,000 Hz", undefined, "has a comma that is no decimal mark here"],
    ["1.2.3 V", undefined, "holds two numbers"],
    ["1 2 V", undefined, "holds two numbers"],
    ["1e400 V", undefined, "is no finite number"],
    ["4k7 kHz", undefined, "has a prefix where the unit, Hz, already has one"],
    ["5k", "kHz", "has a prefix where the unit, Hz, already has one"],
    [`${"1".repeat(200)} V`, undefined, "more than 100"],
    ["5 V", "quux", "cannot be read"],
    ["\u001b[2J5 V", undefined, '"·[2J5 V"'],
  ])("refuses %j", (text, unit, said) => {
    const read = (): unknown => readQuantity(text, { unit });
    expect(read).toThrow(MalformedDataError);
    expect(read).toThrow(said);
  });

  test("refuses what is no text, and options nobody reads", () => {
    expect(() => readQuantity(5 as unknown as string)).toThrow(MalformedDataError);
    expect(() => readQuantity("5 V", { uint: "V" } as object)).toThrow(NoiseError);
  });

  test("reads back what writeQuantity wrote, to the last bit with 17 digits", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-29, max: 1e29, noNaN: true }),
        fc.constantFrom("V", "Hz", "A/√Hz", "V²/Hz", "m/s²", "s", "(m/s²)²/Hz", "°/s/√Hz", "LSB", "1/√Hz"),
        (value, unit) => {
          expect(readQuantity(writeQuantity(value, unit, { digits: 17 }))).toEqual({ value, unit });
        },
      ),
      { numRuns: 1000, seed: 2 },
    );
  });

  test("throws nothing but its own error, and never gives NaN", () => {
    const piece = fc.constantFrom(
      "1",
      "0",
      ".",
      ",",
      "e",
      "-",
      "+",
      "k",
      "µ",
      "n",
      "V",
      "/",
      "√",
      "Hz",
      "²",
      "^",
      "(",
      ")",
      "dB",
      "re",
      "R",
      " ",
      "%",
      "∞",
    );
    const text = fc.oneof(
      fc.string({ unit: "binary", maxLength: 40 }),
      fc.array(piece, { maxLength: 12 }).map((all) => all.join("")),
    );
    fc.assert(
      fc.property(text, fc.constantFrom(undefined, "V", "V²/Hz", "Hz"), (given, unit) => {
        try {
          expect(readQuantity(given, { unit }).value).not.toBeNaN();
        } catch (error) {
          expect(error).toBeInstanceOf(NoiseError);
        }
      }),
      { numRuns: 5000, seed: 3 },
    );
  });
});
