import { expect, test } from "vitest";
import { distinctSeries, seriesStyle } from "../../src/show/series-style.js";

/** Relative luminance of a colour, WCAG 2.1. */
function luminance(colour: string): number {
  const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((at) => {
    const share = Number.parseInt(colour.slice(at, at + 2), 16) / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

const styles = Array.from({ length: distinctSeries }, (_, index) => seriesStyle(index));

test("no two of the distinct series share dashes and marker: they are told apart without colour", () => {
  expect(new Set(styles.map(({ dash, marker }) => `${dash.join()} ${marker}`)).size).toBe(distinctSeries);
});

test("neighbours differ in lightness, so that they differ in grey print", () => {
  for (const [index, { colour }] of styles.entries()) {
    const next = styles[index + 1];
    if (next === undefined) continue;
    const [light = 0, dark = 0] = [luminance(colour), luminance(next.colour)].toSorted((a, b) => b - a);
    expect((light + 0.05) / (dark + 0.05), `${colour} beside ${next.colour}`).toBeGreaterThan(1.5);
  }
});

test("every colour stands out from paper, three to one as WCAG 2.1 asks of graphics", () => {
  for (const { colour } of styles) expect(1.05 / (luminance(colour) + 0.05), colour).toBeGreaterThan(3);
});
