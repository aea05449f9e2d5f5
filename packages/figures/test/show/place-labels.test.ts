import { array, assert as check, integer, property, record } from "fast-check";
import { expect, test } from "vitest";
import { boxesOverlap, boxInside } from "../../src/show/box.js";
import { placeLabels } from "../../src/show/place-labels.js";

const bounds = { x: 0, y: 0, width: 100, height: 100 };
const request = { text: "label", size: 12, colour: "#000" };
const at = (x: number, y: number): { x: number; y: number; width: number; height: number } => ({
  x,
  y,
  width: 30,
  height: 10,
});

test("takes the first place that covers nothing", () => {
  const [placed] = placeLabels([{ ...request, places: [at(0, 0), at(50, 50)] }], [at(10, 5)], bounds);
  expect(placed?.box).toEqual(at(50, 50));
});

test("takes the place that covers least when all cover something", () => {
  const ink = [at(0, 0), at(5, 0), at(50, 50)];
  const [placed] = placeLabels([{ ...request, places: [at(0, 0), at(50, 50)] }], ink, bounds);
  expect(placed?.box).toEqual(at(50, 50));
});

test("of places that cover as much the first is taken", () => {
  const [placed] = placeLabels([{ ...request, places: [at(0, 0), at(50, 50)] }], [at(0, 0), at(50, 50)], bounds);
  expect(placed?.box).toEqual(at(0, 0));
});

test("drops a label rather than put it on another or outside", () => {
  const places = [at(0, 0), at(90, 0)];
  const placed = placeLabels(
    [
      { ...request, places },
      { ...request, text: "second", places },
    ],
    [],
    bounds,
  );
  expect(placed.map(({ text }) => text)).toEqual(["label"]);
});

test("no two labels ever overlap", () => {
  const places = array(record({ x: integer({ max: 120 }), y: integer({ max: 120 }) }), { maxLength: 6 });
  check(
    property(
      array(places, { maxLength: 12 }),
      array(record({ x: integer({ max: 90 }), y: integer({ max: 90 }) })),
      (wanted, ink) => {
        const requests = wanted.map((list) => ({ ...request, places: list.map(({ x, y }) => at(x, y)) }));
        const placed = placeLabels(
          requests,
          ink.map(({ x, y }) => at(x, y)),
          bounds,
        );
        for (const [index, one] of placed.entries()) {
          expect(boxInside(one.box, bounds)).toBe(true);
          for (const other of placed.slice(index + 1)) expect(boxesOverlap(one.box, other.box)).toBe(false);
        }
      },
    ),
    { seed: 5, numRuns: 300 },
  );
});
