import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { levelDbv, rmsFromDbv } from "../../src/convert/level-dbv.js";

test("0 dBV is 1 V, a microvolt −120 dBV", () => {
  expect(levelDbv(1)).toBe(0);
  expectRelative(levelDbv(1e-6), -120, 1e-15);
  expectRelative(levelDbv({ rms: 1e-6 }), -120, 1e-15);
  expectRelative(rmsFromDbv(-6), 0.5011872336272722, 1e-15);
});

test("a peak-to-peak value is not a level", () => {
  expect(() => levelDbv({ kind: "peak-to-peak", rms: 1 } as never)).toThrow(
    /must be an RMS value in V; got a peak-to-peak/,
  );
});
