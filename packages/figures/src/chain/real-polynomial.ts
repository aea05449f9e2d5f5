import type { ComplexHz } from "@quietband/core";

/** Real coefficients in ascending powers of s. */
export type Polynomial = readonly number[];

/** Π(1 − s/root), s and roots in units of `scale`; complex roots are listed with their conjugates. */
export function fromRoots(roots: readonly ComplexHz[], scale: number): Polynomial {
  let product: Polynomial = [1];
  for (const { re, im } of roots) {
    if (im < 0) continue;
    const size = Math.hypot(re, im) / scale;
    const real = re / scale / size;
    product = multiply(product, im === 0 ? [1, -real / size] : [1, (-2 * real) / size, 1 / (size * size)]);
  }
  return product;
}

export function multiply(one: Polynomial, other: Polynomial): Polynomial {
  const product = Array.from({ length: one.length + other.length - 1 }, () => 0);
  for (const [i, a] of one.entries())
    for (const [j, b] of other.entries()) product[i + j] = (product[i + j] ?? 0) + a * b;
  return product;
}

/** What rounding alone leaves of coefficients that cancel. */
const rounding = 1e-13;

/** one − other; coefficients that cancel to rounding are exactly zero. */
export function subtract(one: Polynomial, other: Polynomial): Polynomial {
  const length = Math.max(one.length, other.length);
  return Array.from({ length }, (_, power) => {
    const [a, b] = [one[power] ?? 0, other[power] ?? 0];
    return Math.abs(a - b) <= rounding * Math.max(Math.abs(a), Math.abs(b)) ? 0 : a - b;
  });
}

/** The value at s = ju. */
export function atImaginary(polynomial: Polynomial, u: number): { readonly re: number; readonly im: number } {
  let [re, im] = [0, 0];
  for (let power = polynomial.length - 1; power >= 0; power -= 1)
    [re, im] = [(polynomial[power] as number) - im * u, re * u];
  return { re, im };
}
