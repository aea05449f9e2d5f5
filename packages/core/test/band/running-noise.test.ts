import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { bandNoise } from "../../src/band/band-noise.js";
import { runningNoise } from "../../src/band/running-noise.js";
import { whiteFlicker } from "../../src/spectrum/white-flicker.js";

const spectrum = whiteFlicker({ floor: 5e-9, cornerHz: 30 });
const edgesHz = [0.2, 1, 7, 1e4];

test("against the upper edge it is the band noise up to each edge", () => {
  const { rms, moving } = runningNoise(spectrum, { fromHz: 0.1, edgesHz });
  expect(moving).toBe("toHz");
  for (const [index, toHz] of edgesHz.entries())
    expectRelative(rms[index] ?? 0, bandNoise(spectrum, { fromHz: 0.1, toHz }).rms, 2e-15);
});

test("against the lower edge it is the band noise from each edge up", () => {
  const { rms, moving } = runningNoise(spectrum, { toHz: 1e5, edgesHz });
  expect(moving).toBe("fromHz");
  for (const [index, fromHz] of edgesHz.entries())
    expectRelative(rms[index] ?? 0, bandNoise(spectrum, { fromHz, toHz: 1e5 }).rms, 2e-15);
});

test("edges that do not ascend, cross the fixed edge, or come with two fixed edges or none are refused", () => {
  expect(() => runningNoise(spectrum, { fromHz: 0.1, edgesHz: [1, 1] })).toThrow(
    /edgesHz must ascend; got 1 Hz after 1 Hz/,
  );
  expect(() => runningNoise(spectrum, { fromHz: 2, edgesHz: [1, 3] })).toThrow(/toHz, the upper band edge/);
  expect(() => runningNoise(spectrum, { edgesHz: [1] })).toThrow(/one fixed edge/);
  expect(() => runningNoise(spectrum, { fromHz: 1, toHz: 9, edgesHz: [2] })).toThrow(/one fixed edge/);
  expect(() => runningNoise(spectrum, { fromHz: 1, edgesHz: [] })).toThrow(/at least one frequency/);
});
