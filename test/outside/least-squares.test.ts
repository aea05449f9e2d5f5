import { describe, expect, test } from "vitest";
import { dampedLeastSquares } from "../../packages/core/src/numerics/damped-least-squares.js";
import { linearLeastSquares } from "../../packages/core/src/numerics/linear-least-squares.js";
import { published } from "../support/published.js";
import { relativeError } from "../support/relative.js";

// Source: NIST/ITL Statistical Reference Datasets, certified values, seen in Debian packages (fixtures/published/strd_*.json).

interface LinearSet {
  readonly name: string;
  readonly model: string;
  readonly parameters: number;
  readonly exact: readonly string[];
  readonly data: Readonly<Record<string, readonly number[]>>;
}

const linear = published<LinearSet>("strd_linear").values;

/** Columns of the design: an intercept where the model has one, then powers of x, or the six variables of Longley. */
function designOf({ model, parameters, data }: LinearSet): { readonly matrix: Float64Array; readonly y: Float64Array } {
  const { y = [], x, ...variables } = data;
  const names = Object.keys(variables);
  const rows = y.map((_, row) => {
    const own = (x as readonly unknown[] | undefined)?.[row];
    if (Array.isArray(own)) return [1, ...(own as number[])];
    if (x === undefined) return [1, ...names.map((name) => variables[name]?.[row] ?? Number.NaN)];
    const first = /B0/.test(model) ? 0 : 1;
    return Array.from({ length: parameters }, (__, power) => (x[row] ?? Number.NaN) ** (power + first));
  });
  return { matrix: Float64Array.from(rows.flat()), y: Float64Array.from(y) };
}

/** Correct digits that QR in double precision reaches on each; Filip and Wampler5 are the hard ones. */
const digits: Readonly<Record<string, number>> = { Filip: 7, Wampler4: 7, Wampler5: 6 };

describe("linear sets through Householder QR", () => {
  test.each(linear)("$name", (set) => {
    const { matrix, y } = designOf(set);
    const found = linearLeastSquares(matrix, y, set.parameters);
    const worst = Math.max(
      ...set.exact.map((text, index) => relativeError(found?.solution[index] ?? Number.NaN, Number(text))),
    );
    const wanted = ["Norris", "Pontius", "Longley"].includes(set.name) ? 11 : (digits[set.name] ?? 8);
    expect(-Math.log10(worst)).toBeGreaterThan(wanted);
  });
});

interface NonlinearSet {
  readonly name: string;
  readonly response: string;
  readonly model: string;
  readonly start1: readonly number[];
  readonly start2: readonly number[];
  readonly refined: readonly string[];
  readonly data: Readonly<Record<string, readonly number[]>>;
}

const nonlinear = published<NonlinearSet>("strd_nonlinear").values;

type Gradient = readonly [value: number, ...slopes: number[]];

/** A quotient of polynomials: b1 + b2 x + ... over 1 + ... */
const quotient =
  (above: number) =>
  (b: ArrayLike<number>, x: number): Gradient => {
    const powers = [1, x, x * x, x * x * x];
    let [p, q] = [0, 1];
    for (let k = 0; k < above; k += 1) p += (b[k] ?? 0) * (powers[k] ?? 0);
    for (let k = above; k < b.length; k += 1) q += (b[k] ?? 0) * (powers[k - above + 1] ?? 0);
    const slopes = Array.from({ length: b.length }, (_, k) =>
      k < above ? (powers[k] ?? 0) / q : (-p * (powers[k - above + 1] ?? 0)) / (q * q),
    );
    return [p / q, ...slopes];
  };

/** The published formulas with their slopes, written out here. */
const formulas: Readonly<Record<string, (b: ArrayLike<number>, x: number) => Gradient>> = {
  Misra1a: ({ 0: b1 = 0, 1: b2 = 0 }, x) => {
    const e = Math.exp(-b2 * x);
    return [b1 * (1 - e), 1 - e, b1 * x * e];
  },
  DanWood: ({ 0: b1 = 0, 1: b2 = 0 }, x) => [b1 * x ** b2, x ** b2, b1 * x ** b2 * Math.log(x)],
  Misra1d: ({ 0: b1 = 0, 1: b2 = 0 }, x) => [
    (b1 * b2 * x) / (1 + b2 * x),
    (b2 * x) / (1 + b2 * x),
    (b1 * x) / (1 + b2 * x) ** 2,
  ],
  Chwirut2: ({ 0: b1 = 0, 1: b2 = 0, 2: b3 = 0 }, x) => {
    const [e, q] = [Math.exp(-b1 * x), b2 + b3 * x];
    return [e / q, (-x * e) / q, -e / (q * q), (-x * e) / (q * q)];
  },
  Kirby2: quotient(3),
  Hahn1: quotient(4),
  Thurber: quotient(4),
  MGH09: ({ 0: b1 = 0, 1: b2 = 0, 2: b3 = 0, 3: b4 = 0 }, x) => {
    const [p, q] = [x * x + x * b2, x * x + x * b3 + b4];
    return [(b1 * p) / q, p / q, (b1 * x) / q, (-b1 * p * x) / (q * q), (-b1 * p) / (q * q)];
  },
  Rat42: ({ 0: b1 = 0, 1: b2 = 0, 2: b3 = 0 }, x) => {
    const e = Math.exp(b2 - b3 * x);
    return [b1 / (1 + e), 1 / (1 + e), (-b1 * e) / (1 + e) ** 2, (b1 * x * e) / (1 + e) ** 2];
  },
  Rat43: ({ 0: b1 = 0, 1: b2 = 0, 2: b3 = 0, 3: b4 = 0 }, x) => {
    const e = Math.exp(b2 - b3 * x);
    const s = (1 + e) ** (-1 / b4);
    const inner = ((-b1 / b4) * s * e) / (1 + e);
    return [b1 * s, s, inner, -x * inner, (b1 * s * Math.log(1 + e)) / (b4 * b4)];
  },
  Bennett5: ({ 0: b1 = 0, 1: b2 = 0, 2: b3 = 0 }, x) => {
    const s = (b2 + x) ** (-1 / b3);
    return [b1 * s, s, (-b1 * s) / (b3 * (b2 + x)), (b1 * s * Math.log(b2 + x)) / (b3 * b3)];
  },
};

describe("nonlinear sets from both starts, to eight digits", () => {
  test.each(nonlinear.filter(({ name }) => formulas[name] !== undefined))("$name", (set) => {
    const { y = [], x = [] } = set.data;
    const formula = formulas[set.name];
    if (formula === undefined) throw new Error(`no formula for ${set.name}`);
    const size = set.refined.length;
    const residualsAt = (b: Float64Array, residuals: Float64Array, jacobian: Float64Array): void => {
      for (const [index, at] of x.entries()) {
        const [value, ...slopes] = formula(b, at);
        residuals[index] = value - (y[index] ?? Number.NaN);
        jacobian.set(slopes, index * size);
      }
    };
    for (const start of [set.start1, set.start2]) {
      const found = dampedLeastSquares(residualsAt, start, y.length);
      expect(found.converged).toBe(true);
      const worst = Math.max(
        ...set.refined.map((text, index) => relativeError(found.parameters[index] ?? Number.NaN, Number(text))),
      );
      expect(-Math.log10(worst), `digits from start ${start.join(", ")}`).toBeGreaterThan(8);
    }
  });
});
