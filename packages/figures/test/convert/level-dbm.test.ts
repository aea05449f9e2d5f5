import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { levelDbm, rmsFromDbm } from "../../src/convert/level-dbm.js";

// 0 dBm is 223.6 mV in 50 Ω and 774.6 mV in 600 Ω: √(R·1 mW); any text on levels.
test.each([
  [50, 0.223606797749979],
  [600, 0.7745966692414834],
  [75, 0.2738612787525831],
])("0 dBm in %d Ω", (ohms, volts) => {
  expect(Math.abs(levelDbm(volts, { ohms }))).toBeLessThan(1e-13);
  expectRelative(rmsFromDbm(0, { ohms }), volts, 1e-15);
  expectRelative(levelDbm(10 * volts, { ohms }), 20, 1e-13);
});

test("without a resistance, or with a wrong one, it is no level", () => {
  expect(() => levelDbm(1, {} as never)).toThrow(/the resistance the level is of/);
  expect(() => levelDbm(1, { ohms: 0 })).toThrow(/Ω; got 0/);
  expect(() => levelDbm(1, { ohm: 50 } as never)).toThrow(/knows no option "ohm"/);
});
