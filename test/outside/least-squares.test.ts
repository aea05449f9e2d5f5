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

const decayTo = ({ 0: b1 = 0, 1: b2 = 0 }: ArrayLike<number>, x: number): Gradient => {
  const e = Math.exp(-b2 * x);
  return [b1 * (1 - e), 1 - e, b1 * x * e];
};

const decayOver = ({ 0: b1 = 0, 1: b2 = 0, 2: b3 = 0 }: ArrayLike<number>, x: number): Gradient => {
  const [e, q] = [Math.exp(-b1 * x), b2 + b3 * x];
  return [e / q, (-x * e) / q, -e / (q * q), (-x * e) / (q * q)];
};

/** b1 e^(−b2 x) + b3 e^(−b4 x) + b5 e^(−b6 x). */
const exponentials = (b: ArrayLike<number>, x: number): Gradient => {
  let value = 0;
  const slopes: number[] = [];
  for (let k = 0; k < 6; k += 2) {
    const e = Math.exp(-(b[k + 1] ?? 0) * x);
    value += (b[k] ?? 0) * e;
    slopes.push(e, -(b[k] ?? 0) * x * e);
  }
  return [value, ...slopes];
};

/** A decay and two bells. */
const peaks = (b: ArrayLike<number>, x: number): Gradient => {
  const decay = Math.exp(-(b[1] ?? 0) * x);
  let value = (b[0] ?? 0) * decay;
  const slopes = [decay, -(b[0] ?? 0) * x * decay];
  for (const k of [2, 5]) {
    const [height, centre, width] = [b[k] ?? 0, b[k + 1] ?? 0, b[k + 2] ?? 1];
    const z = (x - centre) / width;
    const bell = Math.exp(-z * z);
    value += height * bell;
    slopes.push(bell, (2 * height * bell * z) / width, (2 * height * bell * z * z) / width);
  }
  return [value, ...slopes];
};

/** The published formulas with their slopes, written out here. */
const formulas: Readonly<Record<string, (b: ArrayLike<number>, x: number) => Gradient>> = {
  Misra1a: decayTo,
  BoxBOD: decayTo,
  Misra1b: ({ 0: b1 = 0, 1: b2 = 0 }, x) => {
    const u = 1 + (b2 * x) / 2;
    return [b1 * (1 - u ** -2), 1 - u ** -2, b1 * x * u ** -3];
  },
  Misra1c: ({ 0: b1 = 0, 1: b2 = 0 }, x) => {
    const u = 1 + 2 * b2 * x;
    return [b1 * (1 - u ** -0.5), 1 - u ** -0.5, b1 * x * u ** -1.5];
  },
  Lanczos1: exponentials,
  Lanczos2: exponentials,
  Lanczos3: exponentials,
  Gauss1: peaks,
  Gauss2: peaks,
  Gauss3: peaks,
  MGH17: ({ 0: b1 = 0, 1: b2 = 0, 2: b3 = 0, 3: b4 = 0, 4: b5 = 0 }, x) => {
    const [p, q] = [Math.exp(-x * b4), Math.exp(-x * b5)];
    return [b1 + b2 * p + b3 * q, 1, p, q, -b2 * x * p, -b3 * x * q];
  },
  MGH10: ({ 0: b1 = 0, 1: b2 = 0, 2: b3 = 0 }, x) => {
    const e = Math.exp(b2 / (x + b3));
    return [b1 * e, e, (b1 * e) / (x + b3), (-b1 * e * b2) / (x + b3) ** 2];
  },
  Eckerle4: ({ 0: b1 = 0, 1: b2 = 0, 2: b3 = 0 }, x) => {
    const z = (x - b3) / b2;
    const e = Math.exp(-0.5 * z * z);
    return [(b1 / b2) * e, e / b2, (b1 / (b2 * b2)) * e * (z * z - 1), (b1 / (b2 * b2)) * e * z];
  },
  Roszman1: ({ 0: b1 = 0, 1: b2 = 0, 2: b3 = 0, 3: b4 = 0 }, x) => {
    const u = x - b4;
    const q = Math.PI * (u * u + b3 * b3);
    return [b1 - b2 * x - Math.atan(b3 / u) / Math.PI, 1, -x, -u / q, -b3 / q];
  },
  ENSO: (b, x) => {
    const turn = 2 * Math.PI * x;
    const [c1, s1] = [Math.cos(turn / 12), Math.sin(turn / 12)];
    const at = (k: number): number => b[k] ?? 0;
    const [c2, s2] = [Math.cos(turn / at(3)), Math.sin(turn / at(3))];
    const [c3, s3] = [Math.cos(turn / at(6)), Math.sin(turn / at(6))];
    const value = at(0) + at(1) * c1 + at(2) * s1 + at(4) * c2 + at(5) * s2 + at(7) * c3 + at(8) * s3;
    const second = ((at(4) * s2 - at(5) * c2) * turn) / at(3) ** 2;
    const third = ((at(7) * s3 - at(8) * c3) * turn) / at(6) ** 2;
    return [value, 1, c1, s1, second, c2, s2, third, c3, s3];
  },
  DanWood: ({ 0: b1 = 0, 1: b2 = 0 }, x) => [b1 * x ** b2, x ** b2, b1 * x ** b2 * Math.log(x)],
  Misra1d: ({ 0: b1 = 0, 1: b2 = 0 }, x) => [
    (b1 * b2 * x) / (1 + b2 * x),
    (b2 * x) / (1 + b2 * x),
    (b1 * x) / (1 + b2 * x) ** 2,
  ],
  Chwirut1: decayOver,
  Chwirut2: decayOver,
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

/** The valley of MGH10 takes more steps from its first start than the usual limit. */
const mostSteps: Readonly<Record<string, number>> = { MGH10: 20000 };

/** From its first start Eckerle4 descends to where the bell is zero at every point: only its second leads to the solution. */
const startsOf = ({ name, start1, start2 }: NonlinearSet): readonly (readonly number[])[] =>
  name === "Eckerle4" ? [start2] : [start1, start2];

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
    for (const start of startsOf(set)) {
      const found = dampedLeastSquares(residualsAt, start, y.length, { mostSteps: mostSteps[set.name] ?? 1000 });
      expect(found.converged).toBe(true);
      const worst = Math.max(
        ...set.refined.map((text, index) => relativeError(found.parameters[index] ?? Number.NaN, Number(text))),
      );
      expect(-Math.log10(worst), `digits from start ${start.join(", ")}`).toBeGreaterThan(8);
    }
  });
});
