import { describe, expect, test } from "vitest";
import { published } from "../../../../test/support/published.js";
import { expectRelative } from "../../../../test/support/relative.js";
import { type Complex, minus, sizeOf } from "../../src/numerics/complex.js";
import { polynomialRoots } from "../../src/numerics/polynomial-roots.js";

/** Σ coefficients of Π (x − root), ascending. */
function expanded(roots: readonly number[]): number[] {
  let coefficients = [1];
  for (const root of roots) {
    const next = [0, ...coefficients];
    for (const [k, value] of coefficients.entries()) next[k] = (next[k] as number) - root * value;
    coefficients = next;
  }
  return coefficients;
}

function nearest(roots: readonly Complex[], place: Complex): number {
  return Math.min(...roots.map((root) => sizeOf(minus(root, place)))) / sizeOf(place);
}

describe("roots of a polynomial", () => {
  test("come back to the digits their condition allows, over twelve decades", () => {
    for (const places of [[2], [1, -3], [1e-6, 1e-3, 1, 1e3, 1e6], [1, 2, 3, 4, 5, 6, 7], [-0.5, 0.25, 0.125, 9]]) {
      const roots = polynomialRoots(expanded(places));
      expect(roots).toHaveLength(places.length);
      for (const place of places) expect(nearest(roots, { re: place, im: 0 })).toBeLessThan(2e-12);
    }
  });

  test("of xⁿ = 1 stand on the unit circle", () => {
    const roots = polynomialRoots([-1, ...Array.from({ length: 15 }, () => 0), 1]);
    for (let k = 0; k < 16; k += 1)
      expect(nearest(roots, { re: Math.cos((Math.PI * k) / 8), im: Math.sin((Math.PI * k) / 8) })).toBeLessThan(1e-15);
  });

  test("at zero, and none of a constant", () => {
    expect(polynomialRoots([0, 0, 3])).toEqual([
      { re: 0, im: 0 },
      { re: 0, im: 0 },
    ]);
    expect(polynomialRoots([5])).toEqual([]);
    expect(polynomialRoots([0])).toEqual([]);
  });

  test("that are double come to half the digits", () => {
    const roots = polynomialRoots(expanded([0.9, 0.9, -0.3]));
    for (const place of [0.9, -0.3]) expect(nearest(roots, { re: place, im: 0 })).toBeLessThan(1e-7);
    expect(roots.filter(({ re }) => re > 0)).toHaveLength(2);
  });

  // half-power normalised sections 1 + a s + b s² of a book table, transcribed in a public repository
  interface Row {
    readonly filter: string;
    readonly order: number;
    readonly section: number;
    readonly coefficient: "a" | "b";
    readonly exact: number;
  }
  const rows = published<Row>("filter_coefficients_a_b").values.filter(({ filter }) => filter === "bessel");

  test.each([2, 4, 6, 8, 10])(
    "of reverse Bessel polynomials have the published ratios of sections, order %i",
    (order) => {
      const roots = polynomialRoots(reverseBessel(order)).filter(({ im }) => im >= 0);
      // a²/b of a section does not depend on the normalisation: (2 Re p)²/|p|²
      const found = roots
        .map(({ re, im }) => (4 * re * re) / (re * re + im * im))
        .toSorted((one, other) => one - other);
      const sections = rows.filter((row) => row.order === order);
      const value = (section: number, coefficient: "a" | "b"): number =>
        sections.find((row) => row.section === section && row.coefficient === coefficient)?.exact ?? Number.NaN;
      const expected = [...new Set(sections.map(({ section }) => section))]
        .map((section) => value(section, "a") ** 2 / value(section, "b"))
        .toSorted((one, other) => one - other);
      expect(found).toHaveLength(expected.length);
      for (const [index, ratio] of found.entries()) expectRelative(ratio, expected[index] ?? Number.NaN, 1e-10);
    },
  );
});

function reverseBessel(order: number): number[] {
  let before = [1];
  let value = [1, 1];
  for (let n = 2; n <= order; n += 1) {
    // θ_n = (2n − 1) θ_(n−1) + s² θ_(n−2)
    const next = [...value.map((coefficient) => (2 * n - 1) * coefficient), 0];
    for (const [k, coefficient] of before.entries()) next[k + 2] = (next[k + 2] ?? 0) + coefficient;
    [before, value] = [value, next];
  }
  return value;
}
