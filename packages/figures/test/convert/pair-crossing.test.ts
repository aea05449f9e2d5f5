import { test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { normalTail } from "../../src/convert/normal-tail.js";
import { pairCrossing } from "../../src/convert/pair-crossing.js";

test("independent samples cross with Φ·(1 − Φ), at the middle with Rice's arccos(ρ)/2π", () => {
  for (const z of [0, 0.7, 2, 4]) expectRelative(pairCrossing(1)(z), normalTail(z) * (1 - normalTail(z)), 1e-12);
  for (const gap of [1e-6, 0.1, 0.5, 1.5])
    expectRelative(pairCrossing(gap)(0), Math.acos(1 - gap) / (2 * Math.PI), 1e-10);
});

test("a small step crosses at Rice's rate: √(2 gap)/2π · exp(−z²/2)", () => {
  expectRelative(pairCrossing(1e-8)(3), (Math.sqrt(2e-8) / (2 * Math.PI)) * Math.exp(-4.5), 1e-6);
});
