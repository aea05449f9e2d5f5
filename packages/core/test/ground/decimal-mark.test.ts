import { expect, test } from "vitest";
import { commaUse } from "../../src/ground/decimal-mark.js";

test.each([
  ["2,4", "decimal"],
  ["0,001", "decimal"],
  ["12345,678", "decimal"],
  ["1,0000", "decimal"],
  ["1,000; 0,5", "decimal"],
  ["1234,567", "decimal"],
  ["123,456", "ambiguous"],
  ["1,000", "ambiguous"],
  ["12,500 Hz", "ambiguous"],
  ["nothing, 5", "none"],
  ["1.5", "none"],
  ["1, 5", "none"],
  ["5,", "none"],
  ["", "none"],
])("%j uses its commas as: %s", (text, use) => {
  expect(commaUse(text)).toBe(use);
});

test("looks at its stretch of the text only", () => {
  expect(commaUse("2,4 3 2,4", 3, 6)).toBe("none");
});
