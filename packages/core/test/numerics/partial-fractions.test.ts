import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { type Complex, conjugate, over, plus, times } from "../../src/numerics/complex.js";
import {
  type PartialFractions,
  preparePartialFractions,
  type RationalShape,
} from "../../src/numerics/partial-fractions.js";

const pair = (re: number, im: number): Complex[] => [
  { re, im },
  { re, im: -im },
];
const real = (re: number): Complex => ({ re, im: 0 });

const shapes: Readonly<Record<string, RationalShape>> = {
  "two pairs": { gain: 3, zerosAtOrigin: 0, zeros: [], poles: [...pair(-600, 800), ...pair(-950, 250)] },
  "high-pass with a real pole": { gain: 1, zerosAtOrigin: 3, zeros: [], poles: [...pair(-3, 7), real(-5)] },
  "poles decades apart, two of them double": {
    gain: 2e16,
    zerosAtOrigin: 4,
    zeros: [],
    poles: [real(-20.6), real(-20.6), real(-107.7), real(-737.9), real(-12194), real(-12194)],
  },
  "as many zeros as poles": {
    gain: 0.5,
    zerosAtOrigin: 0,
    zeros: [...pair(-1, 30), real(4)],
    poles: [...pair(-8, 9), real(-70)],
  },
  "a double pair and a zero": {
    gain: 1,
    zerosAtOrigin: 1,
    zeros: [real(-12)],
    poles: [...pair(-3, 4), ...pair(-3, 4)],
  },
};

function made(shape: RationalShape): PartialFractions {
  const found = preparePartialFractions(shape);
  if (found === undefined) throw new Error("no partial fractions");
  return found;
}

function gainAt({ gain, zerosAtOrigin, zeros, poles }: RationalShape, x: number): number {
  const squares = (places: readonly Complex[]): number =>
    places.reduce((product, { re, im }) => product * (re * re + (x - im) ** 2), 1);
  return (gain * x ** (2 * zerosAtOrigin) * squares(zeros)) / squares(poles);
}

function sumAt({ unit, zerosAtOrigin, whole, poles }: PartialFractions, index: number, x: number): number {
  const square = (x / unit) ** 2;
  let sum: Complex = { re: 0, im: 0 };
  for (const { c, count, residues } of poles)
    for (const at of count === 2 ? [c, conjugate(c)] : [c]) {
      let power: Complex = { re: 1, im: 0 };
      for (const residue of residues[index] ?? []) {
        power = over(power, plus(at, real(square)));
        sum = plus(sum, times(at === c ? residue : conjugate(residue), power));
      }
    }
  return whole * square ** zerosAtOrigin + square ** (zerosAtOrigin - index) * sum.re;
}

describe.each(Object.entries(shapes))("%s", (_, shape) => {
  test("every index sums to the gain near the poles", () => {
    const fractions = made(shape);
    const indices = fractions.poles[0]?.residues.length ?? 0;
    expect(indices).toBe(Math.max(1, shape.poles.length - shape.zeros.length));
    for (let index = 0; index < indices; index += 1)
      for (const x of [0.5, 1, 2]) {
        const at = x * fractions.unit;
        expectRelative(sumAt(fractions, index, at), gainAt(shape, at), 1e-9);
      }
  });

  test("index 0 keeps its digits far below the poles and the last one far above", () => {
    const fractions = made(shape);
    const sizes = shape.poles.map(({ re, im }) => Math.hypot(re, im));
    const last = (fractions.poles[0]?.residues.length ?? 0) - 1;
    if (shape.zeros.length === 0) {
      expectRelative(sumAt(fractions, 0, 1e-4 * Math.min(...sizes)), gainAt(shape, 1e-4 * Math.min(...sizes)), 3e-14);
      expectRelative(sumAt(fractions, last, 1e4 * Math.max(...sizes)), gainAt(shape, 1e4 * Math.max(...sizes)), 3e-14);
    }
  });
});

test("a residue knows what has cancelled in it", () => {
  // 1/((X+¼)²(X+1)²) about X = −1: 1/(h − ¾)² = 16/9 + 128h/27 + …, times X = h − 1 for index 1
  const fractions = made({ gain: 1, zerosAtOrigin: 1, zeros: [], poles: [real(-0.5), real(-0.5), real(-1), real(-1)] });
  const [simple, double] = fractions.poles[1]?.residues[1] ?? [];
  expect(fractions.unit).toBe(1);
  expectRelative(simple?.re ?? 0, -80 / 27, 1e-15);
  expectRelative(simple?.size ?? 0, 176 / 27, 1e-15);
  expectRelative(double?.re ?? 0, -16 / 9, 1e-15);
  expectRelative(double?.size ?? 0, 16 / 9, 1e-15);
});

test("scaled by a power of two the residues are the same", () => {
  const [small, large] = [1, 2 ** 40].map((scale) => {
    const poles = [...pair(-3 * scale, 4 * scale), real(-2 * scale)];
    return made({ gain: scale ** 6, zerosAtOrigin: 0, zeros: [], poles });
  });
  expect(large?.unit).toBe(2 ** 40 * (small?.unit ?? 0));
  expect(large?.poles.map(({ residues }) => residues)).toEqual(small?.poles.map(({ residues }) => residues));
});

test("what partial fractions cannot serve is refused beforehand", () => {
  const refused = (poles: readonly Complex[], zeros: readonly Complex[] = [], gain = 1): void =>
    expect(preparePartialFractions({ gain, zerosAtOrigin: 0, zeros, poles })).toBeUndefined();
  refused([]);
  refused([real(-1)], [real(-2), real(-3)]);
  refused([...pair(0, 1)]);
  refused([real(-1), real(-1.00001)]);
  refused([{ re: -1, im: 1 }]);
  refused([{ re: -1, im: -1 }]);
  refused([real(-1)], [{ re: -1, im: 2 }]);
  refused([real(-1)], [], 1e-310);
  refused(Array.from({ length: 40 }, () => real(-1)));
});
