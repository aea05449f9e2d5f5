import { expect, test } from "vitest";
import { boxesOverlap } from "../../src/show/box.js";
import { inkBoxes } from "../../src/show/ink-boxes.js";

const marker = { shape: "circle", filled: true, colour: "#000", ring: false } as const;
const spot = (x: number, y: number): { x: number; y: number; width: number; height: number } => ({
  x,
  y,
  width: 1,
  height: 1,
});

test("covers a slanting line but not the corners beside it", () => {
  const boxes = inkBoxes(
    [
      [
        [0, 0],
        [200, 200],
      ],
    ],
    [],
  );
  expect(boxes.some((box) => boxesOverlap(box, spot(100, 100)))).toBe(true);
  expect(boxes.some((box) => boxesOverlap(box, spot(180, 20)))).toBe(false);
});

test("covers a level line with one box", () => {
  expect(
    inkBoxes(
      [
        [
          [0, 50],
          [200, 50],
        ],
      ],
      [],
    ),
  ).toEqual([{ x: -0.75, y: 49.25, width: 201.5, height: 1.5 }]);
});

test("covers a point with its bar and a suspect with its ring", () => {
  const [barred, ringed] = inkBoxes(
    [],
    [
      { ...marker, x: 50, y: 50, bar: { top: 20, bottom: 90, caps: 4 } },
      { ...marker, x: 50, y: 50, ring: true },
    ],
  );
  expect([barred?.y, barred?.height]).toEqual([20, 70]);
  expect(ringed?.width).toBeGreaterThanOrEqual(16);
});
