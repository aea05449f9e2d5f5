import { expect, test } from "vitest";
import { residualBars } from "../../src/show/residual-bars.js";

test("draws bars left and right of the model, the largest as wide as there is room", () => {
  const rows = [
    { label: "1 Hz", residualDb: 0.4 },
    { label: "10 Hz", residualDb: -0.8, remark: "left out" },
    { label: "100 Hz", residualDb: 0.004 },
  ];
  expect(residualBars(rows, { width: 8 })).toBe(
    [
      "  1 Hz   +0.40 dB           │████",
      " 10 Hz   −0.80 dB   ████████│           left out",
      "100 Hz    0.00 dB           │",
      "                    −0.80 dB│+0.80 dB",
    ].join("\n"),
  );
});

test("a perfect fit has no bars and no scale", () => {
  expect(residualBars([{ label: "1 Hz", residualDb: 0 }], { width: 4 })).toBe("1 Hz   0.00 dB       │");
});

test("no line ends in blanks, and a label cannot break one", () => {
  const lines = residualBars([{ label: "a\nb", residualDb: 1, remark: "c\u001bd" }]).split("\n");
  expect(lines.length).toBe(2);
  for (const line of lines) expect(line).toBe(line.trimEnd());
  expect(lines.join("")).not.toContain("\u001b");
});

test("refuses no residual, one that is no number, and a width out of range", () => {
  expect(() => residualBars([])).toThrow(/at least one residual/);
  expect(() => residualBars([{ label: "1 Hz", residualDb: Number.NaN }])).toThrow(/residual at 1 Hz must be a finite/);
  expect(() => residualBars([{ label: "1 Hz", residualDb: 1 }], { width: 2 })).toThrow(/from 4 to 60; got 2/);
});
