import { expect, test } from "vitest";
import { published } from "../../../../test/support/published.js";
import { prefixExponent, prefixSymbol } from "../../src/ground/prefix.js";

// Source: SI brochure, 9th edition, table 7, and resolution 3 of the 27th CGPM (from memory).
const table = published<{ symbol: string; exponent: number }>("si_prefixes").values;

test.each(table)("$symbol is 10^$exponent", ({ symbol, exponent }) => {
  expect(prefixExponent(symbol)).toBe(exponent);
  expect(prefixSymbol(exponent)).toBe(symbol === "μ" ? "µ" : symbol);
});

test("there are the 24 of the brochure and no other power has one", () => {
  expect(table).toHaveLength(24);
  expect(prefixSymbol(0)).toBe("");
  expect(prefixSymbol(4)).toBeUndefined();
  expect(prefixExponent("x")).toBeUndefined();
});

test("both micro signs and u are micro, and K is kilo", () => {
  expect(["\u00b5", "\u03bc", "u"].map(prefixExponent)).toEqual([-6, -6, -6]);
  expect(prefixExponent("K")).toBe(3);
});
