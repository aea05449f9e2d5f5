import { expect, test } from "vitest";
import type { Complex } from "../../src/numerics/complex.js";
import { type PartialFractions, preparePartialFractions } from "../../src/numerics/partial-fractions.js";
import { type PoleIntegrals, poleIntegrals } from "../../src/numerics/pole-integral.js";
import { poleStretch } from "../../src/numerics/pole-stretch.js";
import { rootEffects } from "../../src/numerics/root-effects.js";

interface Places {
  readonly poles: readonly Complex[];
  readonly zeros: readonly Complex[];
}

function prepared({ poles, zeros }: Places): PartialFractions {
  const both = (places: readonly Complex[]): Complex[] =>
    places.flatMap(({ re, im }) =>
      im === 0
        ? [{ re, im }]
        : [
            { re, im },
            { re, im: -im },
          ],
    );
  const found = preparePartialFractions({ gain: 1, zerosAtOrigin: 0, zeros: both(zeros), poles: both(poles) });
  if (found === undefined) throw new Error("no partial fractions");
  return found;
}

const [from, to, lead] = [0.3, 1.1, 0.35];

function integralsOf({ poles }: PartialFractions): PoleIntegrals[] {
  const stretch = poleStretch(lead, from, to, Math.log(to / from));
  if (stretch === undefined) throw new Error("handed over");
  return poles.map((pole) => {
    const found = poleIntegrals(pole, stretch, pole.multiplicity + 1);
    if (found === undefined) throw new Error("handed over");
    return found;
  });
}

/** ½ ∫ X^(s−1) G dX without what is whole. */
function integralOf(fractions: PartialFractions): number {
  let sum = 0;
  for (const [k, { values }] of integralsOf(fractions).entries()) {
    const pole = fractions.poles[k];
    for (const [m, residue] of (pole?.residues[0] ?? []).entries()) {
      const value = values[m] ?? { re: 0, im: 0 };
      sum += 0.5 * (pole?.count ?? 0) * (residue.re * value.re - residue.im * value.im);
    }
  }
  return sum;
}

test("the effects are those of moving every component of every pole and zero by four ulp of itself", () => {
  const places: Places = {
    poles: [
      { re: -0.5, im: 1.2 },
      { re: -0.03, im: 0.9 },
      { re: -1.4, im: 0 },
    ],
    zeros: [{ re: -0.2, im: 0.6 }],
  };
  const step = 1e-6;
  let moved = 0;
  for (const list of ["poles", "zeros"] as const)
    for (const [k, place] of places[list].entries())
      for (const part of ["re", "im"] as const) {
        const shifted = (by: number): Places => ({
          ...places,
          [list]: places[list].with(k, { ...place, [part]: place[part] * (1 + by) }),
        });
        moved += Math.abs(integralOf(prepared(shifted(step))) - integralOf(prepared(shifted(-step)))) / (2 * step);
      }
  const fractions = prepared(places);
  const found = rootEffects(fractions, 0, integralsOf(fractions)) / (4 * Number.EPSILON);
  expect(Math.abs(found / moved - 1)).toBeLessThan(1e-6);
});

test("equal poles move together", () => {
  const poles = [
    { re: -0.5, im: 0.4 },
    { re: -0.5, im: 0.4 },
  ];
  const step = 1e-6;
  let moved = 0;
  for (const part of ["re", "im"] as const) {
    const shifted = (by: number): Places => ({
      poles: poles.map((pole) => ({ ...pole, [part]: pole[part] * (1 + by) })),
      zeros: [],
    });
    moved += Math.abs(integralOf(prepared(shifted(step))) - integralOf(prepared(shifted(-step)))) / (2 * step);
  }
  const fractions = prepared({ poles, zeros: [] });
  const found = rootEffects(fractions, 0, integralsOf(fractions)) / (4 * Number.EPSILON);
  expect(Math.abs(found / moved - 1)).toBeLessThan(1e-6);
});
