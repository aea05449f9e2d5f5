import { firstOrderLowPass, powerLaws, whiteFlicker } from "@quietband/core";
import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { compareAgainstResistance } from "../../src/chain/compare-against-resistance.js";
import { compareCurves } from "../../src/chain/compare-curves.js";

const current = (floor: number, cornerHz: number) => whiteFlicker({ floor, cornerHz, unit: "A" });
const bipolar = {
  name: "bipolar",
  spectrum: whiteFlicker({ floor: 1e-9, cornerHz: 10 }),
  currentNoise: current(2e-12, 100),
};
const fet = { name: "FET", spectrum: whiteFlicker({ floor: 5e-9, cornerHz: 100 }), currentNoise: current(1e-15, 1) };
const path = {
  fromHz: 1,
  toHz: Number.POSITIVE_INFINITY,
  weighting: firstOrderLowPass({ cutoffHz: 500 }),
  kelvin: 300,
};

test("each total is that of the comparison at its resistance", () => {
  const { rows } = compareAgainstResistance([bipolar, fet], { ...path, ohms: [0, 100, 1e4, 1e6] });
  for (const { ohms, totals, best } of rows) {
    const ranked = compareCurves([bipolar, fet], { ...path, sourceOhms: ohms }).rows;
    for (const [index, { name }] of [bipolar, fet].entries())
      expectRelative(totals[index] ?? 0, ranked.find((row) => row.name === name)?.rms ?? 0, 1e-12);
    expect(best).toBe(ranked[0]?.name);
  }
});

test("at the crossover current noise equals voltage noise; at a change two totals meet", () => {
  const found = compareAgainstResistance([bipolar, fet], path);
  const [one] = found.parts;
  expectRelative((one?.crossoverOhms ?? 0) * (one?.currentRms ?? 0), one?.voltageRms ?? 1, 1e-14);
  const [change, ...more] = found.changes;
  expect(more).toEqual([]);
  expect(change).toMatchObject({ below: "bipolar", above: "FET" });
  const [row] = compareAgainstResistance([bipolar, fet], { ...path, ohms: [change?.ohms ?? 0] }).rows;
  expectRelative(row?.totals[0] ?? 0, row?.totals[1] ?? 1, 1e-12);
});

test("a part that is better in both is never passed, and no current noise means no crossover", () => {
  const silent = { name: "silent", spectrum: whiteFlicker({ floor: 0.5e-9, cornerHz: 10 }) };
  const found = compareAgainstResistance([bipolar, silent], path);
  expect(found.changes).toEqual([]);
  expect(found.parts[1]).not.toHaveProperty("crossoverOhms");
  expect(new Set(found.rows.map(({ best }) => best))).toEqual(new Set(["silent"]));
});

test("resistances cover 1 Ω to 10 MΩ unless given, and negative ones are refused", () => {
  const { rows } = compareAgainstResistance([bipolar], path);
  expect([rows[0]?.ohms, rows.at(-1)?.ohms]).toEqual([1, 1e7]);
  expect(() => compareAgainstResistance([bipolar], { ...path, ohms: [-1] })).toThrow(/ohms/);
  const accelerometer = { spectrum: powerLaws([{ coefficient: 1, exponent: 0 }], { unit: "g" }) };
  expect(() => compareAgainstResistance([accelerometer], path)).toThrow(/voltage noise/);
});
