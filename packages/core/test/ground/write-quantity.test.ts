import { expect, test } from "vitest";
import { OutOfDomainError } from "../../src/ground/errors.js";
import { writeQuantity } from "../../src/ground/write-quantity.js";

test.each([
  [1.24832e-6, "V", 4, "1.248 µV"],
  [85e-9, "V/√Hz", undefined, "85 nV/√Hz"],
  [0.1, "Hz", undefined, "0.1 Hz"],
  [0.01, "Hz", undefined, "0.01 Hz"],
  [0.001, "Hz", undefined, "1 mHz"],
  [0.1, "s", undefined, "0.1 s"],
  [1e6, "Hz", undefined, "1 MHz"],
  [999.96e-9, "V", 4, "1.000 µV"],
  [999.94e-9, "V", 4, "999.9 nV"],
  [0, "V", undefined, "0 V"],
  [-3.2e-7, "V", 3, "−320 nV"],
  [0.1 + 0.2, "V", undefined, "300 mV"],
  [4700, "Ω", undefined, "4.7 kΩ"],
  [3e-4, "m/s²/√Hz", undefined, "300 µm/s²/√Hz"],
  [1e-40, "V", undefined, "1e−40 V"],
  [12.5, "furlong", undefined, "12.5 furlong"],
  [12_345, "", undefined, "12345"],
  [3, "LSB", undefined, "3 LSB"],
  [-114, "dBV", undefined, "−114 dBV"],
])("writes %d %s in %s digits as %s", (value, unit, digits, text) => {
  expect(writeQuantity(value, unit, { digits })).toBe(text);
});

test("squares keep a power of ten instead of a prefix that would count twice", () => {
  expect(writeQuantity(1.5e-18, "V²/Hz")).toBe("1.5e−18 V²/Hz");
  expect(writeQuantity(0.04, "g²/Hz")).toBe("0.04 g²/Hz");
});

test("small ratios are parts per million, and parts per billion below a hundredth of one", () => {
  expect(writeQuantity(2.4e-6, "1")).toBe("2.4 ppm");
  expect(writeQuantity(3e-9, "1")).toBe("3 ppb");
  expect(writeQuantity(0.05, "1")).toBe("0.05");
  expect(writeQuantity(3e-7, "1/√Hz")).toBe("0.3 ppm/√Hz");
});

test("refuses what is no finite number, and digits there are not", () => {
  expect(() => writeQuantity(Number.NaN, "V")).toThrow(OutOfDomainError);
  expect(() => writeQuantity(Number.POSITIVE_INFINITY, "V")).toThrow(OutOfDomainError);
  expect(() => writeQuantity(1, "V", { digits: 0 })).toThrow(OutOfDomainError);
  expect(() => writeQuantity(1, "V", { digit: 3 } as object)).toThrow(OutOfDomainError);
});
