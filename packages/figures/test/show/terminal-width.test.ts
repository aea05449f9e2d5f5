import { expect, test } from "vitest";
import { oneLine, padText, terminalWidth } from "../../src/show/terminal-width.js";

test("counts what a terminal shows", () => {
  expect(["nV/√Hz", "雑音", "e\u0301", "", "𝑓", "ノイズ", "–±²"].map(terminalWidth)).toEqual([6, 4, 1, 0, 1, 6, 3]);
});

test("fills up to a width and never cuts", () => {
  expect(padText("7 µV", 6, true)).toBe("  7 µV");
  expect(padText("7 µV", 6, false)).toBe("7 µV  ");
  expect(padText("7 µV", 2, true)).toBe("7 µV");
});

test("puts any text on one line without control characters", () => {
  expect(oneLine("a\r\n\tb\u0007c\u009bd")).toBe("a b\uFFFDc\uFFFDd");
});
