import { OutOfDomainError } from "@quietband/core";
import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { noiseAcross } from "../../src/chain/noise-across.js";
import { shotNoise } from "../../src/chain/shot-noise.js";
import { thermalNoise } from "../../src/chain/thermal-noise.js";

test("shot noise of 50 mV across a resistor equals its thermal noise: 2qI·R² = 4kTR at I·R = 2kT/q", () => {
  const kelvin = 300;
  const ohms = 47e3;
  const amperes = (2 * 1.380649e-23 * kelvin) / 1.602176634e-19 / ohms;
  const across = noiseAcross(shotNoise({ amperes }), { ohms });
  expectRelative(across.powerDensityAt(1), thermalNoise({ ohms, kelvin }).powerDensityAt(1), 1e-14);
  expect(across.unit).toBe("V");
});

test("refuses a voltage and a resistance of zero", () => {
  expect(() => noiseAcross(thermalNoise({ ohms: 1 }), { ohms: 1 })).toThrow(OutOfDomainError);
  expect(() => noiseAcross(shotNoise({ amperes: 1 }), { ohms: 0 })).toThrow(OutOfDomainError);
});
