import { expect, test } from "vitest";
import { expectRelative, relativeError } from "../../../../test/support/relative.js";
import { adaptiveRule, integrateAdaptive, type PanelFunction } from "../../src/numerics/adaptive.js";

const onPanels =
  (valueAt: (x: number) => number): PanelFunction =>
  (nodes, values) => {
    for (let k = 0; k < nodes.length; k += 1) values[k] = valueAt(nodes[k] as number);
  };

test("a resonance of Q = 1e5 with knots at its flanks is found and bounded", () => {
  const q = 1e5;
  const gain = onPanels((x) => 1 / (((1 - x) * (1 + x)) ** 2 + (x / q) ** 2));
  const found = integrateAdaptive(gain, [1e-6, 1 - 0.5 / q, 1, 1 + 0.5 / q, 1e6]);
  // ∫₀^∞ = (π/2)·Q; what lies below 1e-6 and above 1e6 is 1e-6 + 3e-19
  const expected = (Math.PI / 2) * q - 1e-6;
  expect(found.converged).toBe(true);
  expect(Math.abs(found.value - expected)).toBeLessThanOrEqual(found.error);
  // a node is right to an ulp, which at the flank of this resonance is 1e-11 of the value
  expectRelative(found.value, expected, 1e-11);
});

test("tiny values are as good as large ones: the tolerance is relative", () => {
  const one = integrateAdaptive(
    onPanels((x) => 1e-300 / x),
    [0.1, 10],
  );
  expectRelative(one.value, 2e-300 * Math.LN10, 1e-14);
});

test("a kink is within the stated error always when announced, and nearly always when not", () => {
  let kinks = 0;
  let missed = 0;
  for (let kink = 0.2; kink < 9.9; kink += 0.0137) {
    const valueAt = onPanels((x) => Math.abs(x - kink));
    const expected = 0.5 * ((kink - 0.1) ** 2 + (10 - kink) ** 2);
    const told = integrateAdaptive(valueAt, [0.1, kink, 10]);
    expect(Math.abs(told.value - expected)).toBeLessThanOrEqual(told.error);
    // two rules can agree by chance on a panel with a kink: contracts ask for knots
    const untold = integrateAdaptive(valueAt, [0.1, 10], { relativeTolerance: 1e-9 });
    kinks += 1;
    if (Math.abs(untold.value - expected) > Math.max(untold.error, 1e-9 * expected)) missed += 1;
  }
  expect(missed / kinks).toBeLessThan(0.05);
});

test("a singular integrand stops at the limit of halvings and says so", () => {
  const found = integrateAdaptive(
    onPanels((x) => 1 / Math.abs(x - 1.234567)),
    [0.1, 10],
    { mostHalvings: 60 },
  );
  expect(found.converged).toBe(false);
});

test("the rule of one integrand serves others that are as smooth", () => {
  const { nodes, weights } = adaptiveRule(
    onPanels((x) => 1 / (1 + x * x)),
    [1e-3, 1, 1e3],
  );
  let sum = 0;
  for (let k = 0; k < nodes.length; k += 1)
    sum += (weights[k] as number) / (1 + (nodes[k] as number) ** 2) / (nodes[k] as number);
  // ∫ dx / (x(1+x²)) = ½ ln(x²/(1+x²))
  const anti = (x: number): number => 0.5 * Math.log((x * x) / (1 + x * x));
  expect(relativeError(sum, anti(1e3) - anti(1e-3))).toBeLessThan(1e-13);
});
