import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { amplitudeRatioDb, amplitudeRatioFromDb } from "../../src/convert/amplitude-ratio-db.js";
import { powerRatioDb, powerRatioFromDb } from "../../src/convert/power-ratio-db.js";

test("twice the power is 3.01 dB, twice the amplitude 6.02 dB", () => {
  expectRelative(powerRatioDb(2), 3.010299956639812, 1e-15);
  expectRelative(amplitudeRatioDb(2), 6.020599913279624, 1e-15);
  expectRelative(amplitudeRatioDb(3, 1.5), 6.020599913279624, 1e-14);
  expectRelative(powerRatioFromDb(10), 10, 1e-15);
  expectRelative(amplitudeRatioFromDb(20), 10, 1e-15);
});

test("a ratio of nothing is refused", () => {
  expect(() => powerRatioDb(0)).toThrow(/power must be a positive/);
  expect(() => powerRatioDb(1, -1)).toThrow(/reference must be/);
  expect(() => powerRatioFromDb(Number.POSITIVE_INFINITY)).toThrow(/dB; got Infinity/);
});
