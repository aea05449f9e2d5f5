import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { flattenPath } from "../../src/curve/flatten-path.js";
import { MalformedDataError, NoiseError } from "../../src/ground/errors.js";

const placesOf = (path: string, tolerance = 0.01): string[] =>
  flattenPath(path, tolerance).map((subpath) => subpath.map(({ x, y }) => `${x},${y}`).join(" "));

// Source of the paths: W3C SVG 2, chapter 9 (paths): the grammar's notes and its examples; from memory.
describe("the grammar of SVG 2", () => {
  test("M 100 100 L 300 100 L 200 300 z closes to its start", () => {
    expect(placesOf("M 100 100 L 300 100 L 200 300 z")).toEqual(["100,100 300,100 200,300 100,100"]);
  });

  test("superfluous white space and separators may go, and a repeated command is a line after a move", () => {
    expect(placesOf("M 100 200 L 200 100 -100 -200")).toEqual(placesOf("M100 200L200 100L-100-200"));
    expect(placesOf("m 1 2 3 4")).toEqual(["1,2 4,6"]);
    expect(placesOf("M.6.5l-.1-.1")).toEqual(["0.6,0.5 0.5,0.4"]);
    expect(placesOf("M1e2-2.5E1h5v-5")).toEqual(["100,-25 105,-25 105,-30"]);
  });

  test("relative and absolute forms of a line lead to one place", () => {
    expect(placesOf("M 10 10 h 5 v 5 l 5 5 H 40 V 50")).toEqual(["10,10 15,10 15,15 20,20 40,20 40,50"]);
  });

  test("flags of an arc may stand without separators", () => {
    expect(placesOf("M0 0a1 1 0 012 0", 0.5)).toEqual(placesOf("M 0 0 a 1 1 0 0 1 2 0", 0.5));
  });

  test("a new subpath begins at every move and after every close", () => {
    expect(placesOf("M0 0H1M2 2H3")).toEqual(["0,0 1,0", "2,2 3,2"]);
    expect(placesOf("M0 0H1zL5 5")).toEqual(["0,0 1,0 0,0", "0,0 5,5"]);
  });
});

describe("curves keep their exact geometry", () => {
  test("the chain of cubics M100,200 C100,100 250,100 250,200 S400,300 400,200 stays within the tolerance", () => {
    const [places = []] = flattenPath("M100,200 C100,100 250,100 250,200 S400,300 400,200", 0.01);
    for (const { x, y } of places) {
      const first = x <= 250;
      const along = first ? (x - 100) / 150 : (x - 250) / 150;
      // x(t) = 3t² − 2t³ of the span, y(t) = 200 ∓ 300·t(1−t)
      let t = along;
      for (let step = 0; step < 60; step += 1) t -= (3 * t * t - 2 * t ** 3 - along) / Math.max(6 * t * (1 - t), 1e-3);
      const expected = 200 + (first ? -1 : 1) * 300 * t * (1 - t);
      expect(Math.abs(y - expected)).toBeLessThan(0.02);
    }
    expect(places.at(-1)).toEqual({ x: 400, y: 200 });
  });

  test("the quadratics M200,300 Q400,50 600,300 T1000,300 pass through their middles", () => {
    const [places = []] = flattenPath("M200,300 Q400,50 600,300 T1000,300", 0.01);
    const nearest = (x: number): number =>
      places.reduce((best, place) => (Math.abs(place.x - x) < Math.abs(best.x - x) ? place : best)).y;
    expect(Math.abs(nearest(400) - 175)).toBeLessThan(0.5);
    expect(Math.abs(nearest(800) - 425)).toBeLessThan(0.5);
  });

  test("the quarter arc M300,200 h-150 a150,150 0 1,0 150,-150 z lies on its circle", () => {
    const [places = []] = flattenPath("M300,200 h-150 a150,150 0 1,0 150,-150 z", 0.01);
    for (const { x, y } of places.slice(1, -1)) expectRelative(Math.hypot(x - 300, y - 200), 150, 1e-12);
    expect(places.length).toBeGreaterThan(100);
  });

  test("a turned ellipse a25,50 -30 0,1 50,-25 lies on its ellipse, and its chords within the tolerance", () => {
    const [places = []] = flattenPath("M350,250 a25,50 -30 0,1 50,-25", 0.001);
    const turn = (-30 * Math.PI) / 180;
    const own = places.map(({ x, y }) => ({
      x: Math.cos(turn) * x + Math.sin(turn) * y,
      y: 2 ** -1 * (Math.cos(turn) * y - Math.sin(turn) * x),
    }));
    // on a circle of radius 25 once the long axis is halved: all distances from its centre agree
    const [a, b, c] = [own[0], own[Math.floor(own.length / 2)], own.at(-1)] as { x: number; y: number }[];
    if (a === undefined || b === undefined || c === undefined) throw new Error("the arc has three places");
    const d = 2 * (a.x * (b.y - c.y) + b.x * (c.y - a.y) + c.x * (a.y - b.y));
    const square = ({ x, y }: { x: number; y: number }): number => x * x + y * y;
    const centre = {
      x: (square(a) * (b.y - c.y) + square(b) * (c.y - a.y) + square(c) * (a.y - b.y)) / d,
      y: (square(a) * (c.x - b.x) + square(b) * (a.x - c.x) + square(c) * (b.x - a.x)) / d,
    };
    // the chord is 55.8 long across the radius of 25: both radii are scaled up by half the chord on the unit circle
    const half = {
      x: (Math.cos(turn) * 50 - Math.sin(turn) * 25) / 2,
      y: (-Math.cos(turn) * 25 - Math.sin(turn) * 50) / 2,
    };
    const radius = 25 * Math.hypot(half.x / 25, half.y / 50);
    for (const place of own) expectRelative(Math.hypot(place.x - centre.x, place.y - centre.y), radius, 1e-6);
  });

  test("radii too small for an arc are scaled up, and a zero radius is a line", () => {
    const [places = []] = flattenPath("M0 0A1 1 0 0 1 20 0", 0.001);
    expect(places.every(({ x, y }) => Math.abs(Math.hypot(x - 10, y) - 10) < 1e-9)).toBe(true);
    expect(placesOf("M0 0A0 5 0 0 1 20 0")).toEqual(["0,0 20,0"]);
  });
});

describe("what is no path", () => {
  test.each(["", "L 1 2", "M 1", "M 1 2 L 3", "M 1 2 X 3 4", "M a b", "M 1e999 0 L 2 2", "M0 0A1 1 0 2 0 5 5"])(
    "%o",
    (path) => {
      expect(() => flattenPath(path, 0.1)).toThrow(MalformedDataError);
    },
  );

  test("a thousand mutated paths give places or the module's own error, never anything else", () => {
    const valid =
      "M100,200 C100,100 250,100 250,200 S400,300 400,200 Q410 190 420 180T430,170a5 5 10 1 0 20 3h10v-4l3 3z";
    fc.assert(
      fc.property(
        fc.array(
          fc.tuple(
            fc.nat(valid.length),
            fc.constantFrom("", "-", ".", "e9", "M", "z", " ", "NaN", "1e400", "A", "#", "0000"),
          ),
          {
            minLength: 1,
            maxLength: 4,
          },
        ),
        (edits) => {
          let path = valid;
          for (const [at, text] of edits) path = path.slice(0, at) + text + path.slice(at + 1);
          try {
            return flattenPath(path, 0.5).every((subpath) =>
              subpath.every(({ x, y }) => Number.isFinite(x) && Number.isFinite(y)),
            );
          } catch (error) {
            return error instanceof NoiseError;
          }
        },
      ),
      { seed: 7, numRuns: 1000 },
    );
  });
});
