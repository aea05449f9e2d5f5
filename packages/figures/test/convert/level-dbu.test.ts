import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { levelDbu, rmsFromDbu } from "../../src/convert/level-dbu.js";

test("0 dBu is √0.6 V, +4 dBu 1.228 V, and dBV lies 2.218 dB below", () => {
  expectRelative(rmsFromDbu(0), 0.7745966692414834, 1e-15);
  expect(rmsFromDbu(4).toFixed(3)).toBe("1.228");
  expectRelative(levelDbu(1), 2.2184874961635637, 1e-14);
  expect(() => levelDbu(-1)).toThrow(/positive finite number of V; got -1/);
});
