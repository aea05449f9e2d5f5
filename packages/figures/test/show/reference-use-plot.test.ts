import { NoiseError, whiteFlicker } from "@quietband/core";
import { describe, expect, test } from "vitest";
import { type ReferenceUseRow, referenceNoiseByUse } from "../../src/chain/reference-noise-by-use.js";
import {
  layoutReferenceUsePlot,
  type ReferenceUsePlotOptions,
  referenceUsePlot,
} from "../../src/show/reference-use-plot.js";
import { expectReadable, expectSound } from "./support/plot-claims.js";

const rowsOf = (scale: number, otherRms = 5e-6 * scale, shares?: readonly number[]): readonly ReferenceUseRow[] =>
  referenceNoiseByUse({
    spectrum: whiteFlicker({ floor: 100e-9 * scale, cornerHz: 10 }),
    referenceVolts: 2.5,
    input: { kind: "dc" },
    otherRms,
    shares,
    fromHz: 0.1,
    toHz: 10e3,
  });
const one = (rows: readonly ReferenceUseRow[]): ReferenceUsePlotOptions => ({ references: [{ label: "R2", rows }] });

const pictures: Readonly<Record<string, ReferenceUsePlotOptions>> = {
  "a reference and the rest": { ...one(rowsOf(1)), markShare: 0.5, title: "What the reference costs" },
  "1e-12 V": one(rowsOf(1e-6)),
  "1e3 V": one(rowsOf(1e9)),
  "one point": one(rowsOf(1, 5e-6, [0.5])),
  "nothing at all": one(rowsOf(1, 0, [0])),
  "a hundred references": {
    references: Array.from({ length: 100 }, (_, k) => ({ label: `reference ${k + 1}`, rows: rowsOf(0.3 + k / 30) })),
  },
  small: { ...one(rowsOf(1)), width: 400, height: 280, note: "A note. ".repeat(40) },
};

describe("whatever there is to draw", () => {
  test.each(Object.entries(pictures))("%s: readable and sound", (_, options) => {
    expectReadable(layoutReferenceUsePlot(options));
    expectSound(referenceUsePlot(options));
  });
});

test("one reference stands beside all other noise, and their powers add to the line above", () => {
  const { lines, frame, key } = layoutReferenceUsePlot(one(rowsOf(1)));
  expect(key.map(({ label }) => label).toSorted()).toEqual(["R2", "everything else", "together"]);
  const others = lines[2]?.runs[0] ?? [];
  expect(others.length).toBe(11);
  for (const [, y] of others) expect(Math.abs(y - frame.y.at(5e-6))).toBeLessThan(1e-6);
});

test("without other noise the reference stands alone, and several references by their totals", () => {
  expect(layoutReferenceUsePlot(one(rowsOf(1, 0))).lines).toHaveLength(1);
  const rows = rowsOf(1);
  const { lines, frame } = layoutReferenceUsePlot({
    references: [
      { label: "a", rows },
      { label: "b", rows: rowsOf(2) },
    ],
  });
  expect(lines).toHaveLength(2);
  expect(lines[0]?.runs[0]?.at(-1)?.[1]).toBe(frame.y.at(rows.at(-1)?.totalRms ?? 0));
});

test.each([
  [{ references: [] }, /at least one reference .* got none/],
  [one([]), /got no rows of "R2"/],
  [{ ...one(rowsOf(1)), markShare: 50 }, /from 0 to 1; got 50/],
  [{ ...one(rowsOf(1)), colour: "red" } as ReferenceUsePlotOptions, /knows no option "colour"/],
])("what cannot be drawn is refused in a sentence", (options, message) => {
  expect(() => referenceUsePlot(options)).toThrow(NoiseError);
  expect(() => referenceUsePlot(options)).toThrow(message);
});
