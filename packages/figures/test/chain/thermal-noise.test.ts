import { OutOfDomainError } from "@quietband/core";
import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { thermalNoise } from "../../src/chain/thermal-noise.js";

test("is white and follows 4kTR", () => {
  for (const hz of [0, 1, 1e9])
    expectRelative(thermalNoise({ ohms: 1e3, kelvin: 300 }).powerDensityAt(hz), 4 * 1.380649e-23 * 300 * 1e3, 1e-15);
});

test("prints its temperature, and that it is assumed where none was given", () => {
  expect(thermalNoise({ ohms: 350, celsius: 85 }).assumptions).toEqual(["350 Ω at 85 °C."]);
  expect(thermalNoise({ ohms: 350 }).assumptions).toEqual(["350 Ω at 25 °C (assumed)."]);
  expectRelative(
    thermalNoise({ ohms: 350 }).powerDensityAt(1),
    thermalNoise({ ohms: 350, kelvin: 298.15 }).powerDensityAt(1),
    1e-15,
  );
});

test.each([{ ohms: 0 }, { ohms: 1, kelvin: 0 }, { ohms: 1, celsius: -273.15 }, { ohms: 1, kelvin: 1, celsius: 1 }])(
  "refuses %o",
  (options) => {
    expect(() => thermalNoise(options)).toThrow(OutOfDomainError);
  },
);
