import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { poleStretch } from "../../src/numerics/pole-stretch.js";

function made(lead: number, from: number, to: number): NonNullable<ReturnType<typeof poleStretch>> {
  const found = poleStretch(lead, from, to, Math.log(to / from));
  if (found === undefined) throw new Error("handed over");
  return found;
}

test("the centre is π/sin(πs), less 1/s where that would cancel, without a step at s = 0", () => {
  expectRelative(made(0.5, 1, 2).centre, Math.PI, 1e-15);
  expectRelative(made(0.15, 1, 2).centre, Math.PI / Math.sin(0.15 * Math.PI) - 1 / 0.15, 2e-15);
  // π/sin(πs) − 1/s = π²s/6 + 7π⁴s³/360 + …
  expectRelative(made(1e-7, 1, 2).centre, (Math.PI ** 2 * 1e-7) / 6, 1e-12);
  expect(made(0, 1, 2).centre).toBe(0);
  // for the first s + i above −0.2
  expectRelative(made(-1.5, 1, 2).centre, Math.PI, 1e-15);
});

test("moments are ∫ X^(s+i−1) dX, from the edge that holds most of each", () => {
  const { moments } = made(-1, 2, 3);
  expect(moments).toHaveLength(2);
  expectRelative(moments[0] as number, 1 / 4 - 1 / 9, 1e-15);
  expectRelative(moments[1] as number, Math.log(9 / 4), 1e-15);
});

test("above s = ½ the stretch is mirrored: Y = 1/X, s → 1 − s, edges swapped", () => {
  const { s, mirrored, low, high } = made(1.75, 2, 4);
  expect([s, mirrored]).toEqual([-0.75, true]);
  expect([low?.y, high?.y]).toEqual([1 / 16, 1 / 4]);
  expectRelative(low?.power ?? 0, 16 ** 0.75, 1e-15);
  expectRelative(low?.grown ?? 0, 16 ** 1.75, 1e-15);
  expect(poleStretch(1.75, 0, 4, Number.POSITIVE_INFINITY)?.high).toBeUndefined();
});

test("steep exponents are handed over", () => {
  expect(poleStretch(-16.1, 1, 2, Math.LN2)).toBeUndefined();
  expect(poleStretch(Number.NaN, 1, 2, Math.LN2)).toBeUndefined();
});
