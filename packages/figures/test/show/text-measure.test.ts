import { array, assert as check, constantFrom, integer, property, string } from "fast-check";
import { describe, expect, test } from "vitest";
import { textWidth, wrapText } from "../../src/show/text-measure.js";

describe("text width", () => {
  test("follows the widths of the Helvetica family: W is more than four times i", () => {
    expect(textWidth("WWWW", 12) / textWidth("iiii", 12)).toBeGreaterThan(4);
  });

  test("stays within 8 % above what Liberation Sans takes", () => {
    // Widths at 100 pixels from the font's own metrics (its table hmtx), version 2.
    const measured: readonly (readonly [string, number])[] = [
      ["100 nV/√Hz", 521.8],
      ["corner 53.19 Hz", 711.5],
      ["R1, 4.096 V reference (invented)", 1450.8],
      ["± one standard uncertainty", 1183.4],
      ["µW ≤ 3 Ω", 420.6],
      ["WMW illiterate", 644.4],
    ];
    for (const [text, width] of measured) {
      expect(textWidth(text, 100) / width, text).toBeGreaterThanOrEqual(1);
      expect(textWidth(text, 100) / width, text).toBeLessThanOrEqual(1.08);
    }
  });

  test("grows with the font size and with every character", () => {
    expect(textWidth("noise density", 24)).toBe(2 * textWidth("noise density", 12));
    expect(textWidth("", 12)).toBe(0);
  });
});

describe("wrapping", () => {
  const options = { size: 12, width: 100, maxLines: 3 };

  test("breaks at blanks and loses nothing while there is room", () => {
    const lines = wrapText("white floor and flicker below it", options);
    expect(lines.join(" ")).toBe("white floor and flicker below it");
    expect(lines.length).toBe(2);
  });

  test("ends in … what does not fit", () => {
    const lines = wrapText("a label that goes on and on about load, gain and temperature", options);
    expect(lines.length).toBe(3);
    expect(lines.at(-1)).toMatch(/…$/);
  });

  test("breaks a word without blanks where it must", () => {
    const lines = wrapText("x".repeat(200), options);
    expect(lines.length).toBe(3);
  });

  test("no line is wider than asked, for any text, and no character is halved", () => {
    const words = array(constantFrom("R1", "nV/√Hz", "Wechselspannungsverstärker", "𝑓", "漢字", "a", "\t", "\n"));
    check(
      property(words, string({ unit: "binary" }), integer({ min: 40, max: 300 }), (parts, tail, width) => {
        for (const line of wrapText(`${parts.join(" ")} ${tail}`, { size: 12, width, maxLines: 3 })) {
          expect(textWidth(line, 12)).toBeLessThanOrEqual(width);
          expect(line).not.toBe("");
        }
      }),
      { seed: 7, numRuns: 300 },
    );
  });

  test("a long text costs no more than its length", () => {
    expect(wrapText("mm ".repeat(200_000), options).length).toBe(3);
    expect(wrapText("m".repeat(600_000), options).length).toBe(3);
  });
});
