import { OutOfDomainError } from "@quietband/core";
import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { tone } from "../../src/chain/tone.js";

test.each([
  ["sine", (turn: number) => Math.sin(2 * Math.PI * turn)],
  ["triangle", (turn: number) => 4 * Math.abs(turn - 0.5) - 1],
  ["square", (turn: number) => (turn < 0.5 ? 1 : -1)],
] as const)("a %s has the RMS of its samples", (shape, at) => {
  const samples = Array.from({ length: 10_000 }, (_, k) => 1.5 * at((k + 0.5) / 10_000));
  const rms = Math.sqrt(samples.reduce((sum, value) => sum + value * value, 0) / samples.length);
  expectRelative(tone({ frequencyHz: 50, peakToPeak: 3, shape }).rms, rms, 1e-7);
});

test("an amplitude is that of a sine", () => {
  const hum = tone({ frequencyHz: 50, amplitude: 2 });
  expectRelative(hum.rms, Math.SQRT2, 1e-15);
  expect(hum.peakToPeak).toBe(4);
});

test.each([
  { frequencyHz: 50 },
  { frequencyHz: 50, amplitude: 1, peakToPeak: 2 },
  { frequencyHz: 50, amplitude: 1, shape: "square" as const },
  { frequencyHz: 50, peakToPeak: 1, shape: "round" as "square" },
  { frequencyHz: 0, amplitude: 1 },
  { frequencyHz: 50, amplitude: -1 },
])("refuses %o", (options) => {
  expect(() => tone(options)).toThrow(OutOfDomainError);
});
