import { expect, test } from "vitest";
import { linearAxis } from "../../src/show/linear-axis.js";

const label = (value: number): string => String(value);

test("labels round steps from zero", () => {
  const axis = linearAxis({ domain: [0, 1.3e-6], range: [300, 0], label, room: () => 24 });
  expect(axis.ticks.map(({ value }) => value)).toEqual([0, 2e-7, 4e-7, 6e-7, 8e-7, 1e-6, 1.2e-6]);
  expect(axis.at(0)).toBe(300);
});

test("labels fewer steps where they are wide", () => {
  const axis = linearAxis({ domain: [-4, 6], range: [0, 300], label, room: () => 90 });
  expect(axis.ticks.map(({ value }) => value)).toEqual([0, 5]);
});

test("labels what leaves room where no step fits as a whole", () => {
  const axis = linearAxis({ domain: [0, 10], range: [0, 60], label, room: (text) => (text === "0" ? 10 : 150) });
  expect(axis.ticks.length).toBeGreaterThanOrEqual(1);
});

test("unlabelled lines never fall on labelled ones", () => {
  const axis = linearAxis({ domain: [990, 1010], range: [0, 500], label, room: () => 40 });
  const labelled = new Set(axis.ticks.map(({ at }) => at));
  expect(axis.minor.filter((at) => labelled.has(at))).toEqual([]);
  expect(axis.minor.length).toBeGreaterThan(axis.ticks.length);
});

test("the label learns the largest tick, so that one prefix can serve the whole axis", () => {
  const seen = new Set<number>();
  linearAxis({
    domain: [-3, 2],
    range: [0, 400],
    label: (value, largest) => {
      seen.add(largest);
      return String(value);
    },
    room: () => 20,
  });
  expect([...seen]).toEqual([3]);
});
