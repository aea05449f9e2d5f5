import { expect, test } from "vitest";
import { arrayBlock } from "../../src/numerics/array-block.js";

test("arrays of one block have their lengths and do not overlap", () => {
  const [first, second, third] = arrayBlock([3, 0, 2]);
  first.fill(1);
  third.fill(2);
  expect([Array.from(first), Array.from(second), Array.from(third)]).toEqual([[1, 1, 1], [], [2, 2]]);
});
