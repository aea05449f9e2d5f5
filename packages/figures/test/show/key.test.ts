import { expect, test } from "vitest";
import { boxesOverlap, boxInside } from "../../src/show/box.js";
import { keyGutter, layoutKey } from "../../src/show/key.js";

const column = { x: 500, y: 50, width: 200, height: 300 };
const swatch = { colour: "#000" };
const entries = (count: number, label = "candidate"): { label: string; swatch: { colour: string }; level: number }[] =>
  Array.from({ length: count }, (_, index) => ({ label: `${label} ${index + 1}`, swatch, level: 200 + index }));

test("stands beside the ends of the lines it names", () => {
  const [top, bottom] = layoutKey(
    [
      { label: "low", swatch, level: 300 },
      { label: "high", swatch, level: 100 },
    ],
    0,
    column,
  );
  expect(top?.label).toBe("high");
  expect(top?.box.y).toBeLessThan(100);
  expect((top?.box.y ?? 0) + (top?.box.height ?? 0)).toBeGreaterThan(100);
  expect(bottom?.label).toBe("low");
});

test("entries at the same height are moved apart and stay in the column", () => {
  const placed = layoutKey(
    entries(14).map((entry) => ({ ...entry, level: 349 })),
    0,
    column,
  );
  expect(placed.length).toBe(14);
  for (const [index, one] of placed.entries()) {
    expect(boxInside(one.box, column)).toBe(true);
    for (const other of placed.slice(index + 1)) expect(boxesOverlap(one.box, other.box)).toBe(false);
  }
});

test("counts what finds no room", () => {
  const placed = layoutKey(entries(100), 0, column);
  expect(placed.at(-1)?.label).toBe(`and ${100 - (placed.length - 1)} more`);
  for (const { box } of placed) expect(boxInside(box, column)).toBe(true);
});

test("counts the unnamed beside the named", () => {
  expect(layoutKey(entries(12), 88, column).map(({ label }) => label)).toContain("and 88 more");
});

test("does not count explanations of marks among the series", () => {
  const meanings = Array.from({ length: 30 }, (_, index) => ({ label: `meaning ${index}`, swatch }));
  expect(layoutKey([...entries(2), ...meanings], 0, column).filter(({ label }) => /more/.test(label))).toEqual([]);
});

test("wraps long labels while there is room and shortens them where there is none", () => {
  const long = "a label that goes on and on about load, gain and temperature of the part";
  const [few] = layoutKey(entries(2, long), 0, column);
  const [many] = layoutKey(entries(14, long), 0, column);
  expect(few?.lines.length).toBe(3);
  expect(many?.lines.length).toBe(1);
  expect(many?.lines[0]?.text).toMatch(/…$/);
});

test("takes no more than a third of the picture, and next to nothing without entries", () => {
  expect(keyGutter(["x".repeat(500)], 760)).toBeLessThanOrEqual(760 / 3);
  expect(keyGutter([], 760)).toBeLessThan(20);
  // many short names leave room for the line that counts the rest
  expect(
    keyGutter(
      Array.from({ length: 12 }, (_, k) => `R${k}`),
      760,
    ),
  ).toBe(keyGutter(["and 100 more"], 760));
});
