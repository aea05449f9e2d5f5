import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { readCurve } from "../../src/curve/read-curve.js";

function demo(file: string): string {
  return readFileSync(new URL(`../../../../fixtures/demo/${file}`, import.meta.url), "utf8");
}

// fixtures/demo/true-answers.json: the points as they were made, to six digits; invented parts.
const truths = JSON.parse(demo("true-answers.json")) as Record<string, { points: [number, number][] }>;

describe("the four demonstration curves", () => {
  test.each(["R1", "A1", "J1", "X1"])("%s reads to its points", (part) => {
    const { points, unit } = readCurve(demo(`${part}.csv`));
    const truth = truths[part]?.points ?? [];
    expect(unit).toBe("V");
    expect(points.map(({ frequency }) => frequency)).toEqual(truth.map(([hz]) => hz));
    // the dB axis of X1 was rounded to six digits there
    for (const [index, [, density]] of truth.entries())
      expectRelative(points[index]?.density ?? 0, density, part === "X1" ? 5e-6 : 0, `${part} point ${index}`);
  });
});
