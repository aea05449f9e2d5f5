import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { relativeError } from "../../../../test/support/relative.js";
import { cascade } from "../../src/index.js";
import { make } from "./cases.js";

interface ReferenceWeighting {
  readonly of: readonly { readonly make: string; readonly options: unknown }[];
  readonly rows: readonly { readonly hz: number; readonly gain: string; readonly condition: number }[];
}

const { weightings } = JSON.parse(
  readFileSync(new URL("../../../../fixtures/reference/gain-values.json", import.meta.url), "utf8"),
) as { readonly weightings: readonly ReferenceWeighting[] };

describe("power gains at 80 digits (fixtures/reference/make-gain-values.py)", () => {
  test.each(weightings.map((given) => [JSON.stringify(given.of).slice(0, 120), given] as const))("%s", (_, given) => {
    const made = cascade(...given.of.map(({ make: name, options }) => make(name, options)));
    for (const { hz, gain, condition } of given.rows) {
      const error = relativeError(made.powerGainAt(hz), Number(gain)) / Number.EPSILON;
      // Measured: at most 3·(1 + condition) ulp. The condition says what rounding the inputs would do.
      expect(error, `at ${hz} Hz: ${made.powerGainAt(hz)} against ${gain}`).toBeLessThanOrEqual(4 * (1 + condition));
    }
  });
});

test("the table holds ordinary and extreme places of every kind", () => {
  const rows = weightings.flatMap((given) => given.rows);
  expect(rows.length).toBeGreaterThan(1500);
  expect(Math.min(...rows.map(({ gain }) => Number(gain)).filter((gain) => gain > 0))).toBeLessThan(1e-250);
  expect(new Set(weightings.flatMap(({ of }) => of.map((factor) => factor.make))).size).toBeGreaterThanOrEqual(26);
});
