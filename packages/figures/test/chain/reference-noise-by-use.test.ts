import { whiteFlicker } from "@quietband/core";
import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { referenceNoiseByUse } from "../../src/chain/reference-noise-by-use.js";
import { referencePathNoise } from "../../src/chain/reference-path-noise.js";

const path = { spectrum: whiteFlicker({ floor: 100e-9, cornerHz: 0 }), referenceVolts: 2.5, fromHz: 0, toHz: 10e3 };

test("noise grows in proportion to the use, and the ratio levels off at the reference's own", () => {
  const rows = referenceNoiseByUse({ ...path, input: { kind: "dc" }, otherRms: 2e-6 });
  expect(rows).toHaveLength(11);
  expect(rows[0]).toStrictEqual({ share: 0, inputRms: 0, rms: 0, totalRms: 2e-6 });
  for (const row of rows) expectRelative(row.rms, row.share * 10e-6, 1e-13);
  const last = rows.at(-1);
  expectRelative(last?.snrDb ?? 0, 20 * Math.log10(2.5 / Math.hypot(10e-6, 2e-6)), 1e-14);
});

test("a sine counts by its peak", () => {
  const [row] = referenceNoiseByUse({ ...path, input: { kind: "sine", frequencyHz: 2e3 }, shares: [0.6] });
  const input = { kind: "sine", amplitude: 1.5, frequencyHz: 2e3 } as const;
  expectRelative(row?.rms ?? 0, referencePathNoise({ ...path, input }).rms, 1e-15);
  expectRelative(row?.inputRms ?? 0, 1.5 * Math.SQRT1_2, 1e-15);
});

test("shares beyond the range are refused", () => {
  expect(() => referenceNoiseByUse({ ...path, input: { kind: "dc" }, shares: [1.1] })).toThrow(/from 0 to 1/);
});
