import { expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { gaussWeights, kronrodCount, kronrodNodes, kronrodWeights } from "../../src/numerics/gauss-kronrod.js";

test("the Kronrod rule integrates every even monomial to degree 30, the Gauss rule to 18, and both miss the next", () => {
  const moment = (weights: readonly number[], degree: number): number =>
    kronrodNodes.reduce((sum, node, k) => sum + (weights[k] as number) * node ** degree, 0);
  for (let degree = 0; degree <= 30; degree += 2)
    expectRelative(moment(kronrodWeights, degree), 2 / (degree + 1), 2e-15);
  for (let degree = 0; degree <= 18; degree += 2) expectRelative(moment(gaussWeights, degree), 2 / (degree + 1), 2e-15);
  expect(Math.abs(moment(gaussWeights, 20) * 10.5 - 1)).toBeGreaterThan(1e-6);
});

test("nodes ascend and are symmetric", () => {
  expect(kronrodNodes).toHaveLength(kronrodCount);
  for (let k = 1; k < kronrodCount; k += 1) expect(kronrodNodes[k]).toBeGreaterThan(kronrodNodes[k - 1] as number);
  for (let k = 0; k < kronrodCount; k += 1)
    expect(kronrodNodes[k] === -(kronrodNodes[kronrodCount - 1 - k] as number)).toBe(true);
});
