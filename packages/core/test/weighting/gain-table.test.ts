import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { gainTable } from "../../src/index.js";

const rows = [
  { frequencyHz: 10, gainDb: -3 },
  { frequencyHz: 100, gainDb: 0 },
  { frequencyHz: 100.01, gainDb: -40 },
  { frequencyHz: 1e4, gainDb: -40 },
];

describe("a gain table", () => {
  test("passes through its rows", () => {
    const made = gainTable(rows);
    for (const { frequencyHz, gainDb } of rows)
      expectRelative(made.powerGainAt(frequencyHz), 10 ** (gainDb / 10), 1e-15);
  });

  test("is straight in dB over log f between them", () => {
    const made = gainTable(rows);
    expectRelative(made.powerGainAt(10 * Math.sqrt(10)), 10 ** -0.15, 1e-15);
    expectRelative(made.powerGainAt(777), 1e-4, 1e-15);
    expect([made.lowExponent, made.highExponent]).toEqual([expect.closeTo(-0.3, 14), 0]);
  });

  test("is not defined beyond them, and says from where to where it is", () => {
    const made = gainTable(rows);
    for (const hz of [0, 9.999, 10_001, Number.NaN])
      expect(() => made.powerGainAt(hz)).toThrow("from 10 Hz to 10000 Hz");
  });

  test("of many rows finds the right one", () => {
    const many = Array.from({ length: 1001 }, (_, k) => ({ frequencyHz: 1 + k, gainDb: -(k % 7) }));
    const made = gainTable(many);
    for (const { frequencyHz, gainDb } of many)
      expectRelative(made.powerGainAt(frequencyHz), 10 ** (gainDb / 10), 1e-15);
  });

  test("tells the row at fault by its index", () => {
    try {
      gainTable([...rows, { frequencyHz: 5, gainDb: 0 }]);
      expect.unreachable();
    } catch (error) {
      expect(error).toMatchObject({ code: "malformed-data", index: 4 });
    }
  });
});
