import { expect, test } from "vitest";
import { pixelText, svgElement, writeSvg } from "../../src/show/svg.js";
import { parseXml } from "./support/parse-xml.js";

test("text and attributes come back from a parser as they were given", () => {
  const hostile = `R&D <b>"7 µV"</b> 'x' ]]> &amp; –`;
  const root = parseXml(writeSvg(svgElement("text", { label: hostile }, [hostile])));
  expect(root.text).toBe(hostile);
  expect(root.attributes["label"]).toBe(hostile);
});

test("characters that XML cannot hold become a replacement character", () => {
  const root = parseXml(writeSvg(svgElement("text", {}, ["a\u0000b\u001bc\uD800d\uFFFEe"])));
  expect(root.text).toBe("a\uFFFDb\uFFFDc\uFFFDd\uFFFDe");
});

test("a pair of surrogates stays the character it is", () => {
  expect(parseXml(writeSvg(svgElement("text", {}, ["𝑓"]))).text).toBe("𝑓");
});

test("numbers are rounded to a hundredth of a pixel, without negative zero or exponents", () => {
  expect([1 / 3, -0.001, 1e-9, 12, 2.005, 1234567.891].map(pixelText)).toEqual([
    "0.33",
    "0",
    "0",
    "12",
    "2.01",
    "1234567.89",
  ]);
});

test("a coordinate that is not finite is refused and never written", () => {
  for (const value of [Number.NaN, Number.POSITIVE_INFINITY])
    expect(() => writeSvg(svgElement("rect", { x: value }))).toThrow(/finite number of pixels; got/);
});

test("attributes given as undefined are left out", () => {
  expect(writeSvg(svgElement("g", { x: undefined, y: 2 }))).toBe('<g y="2"/>\n');
});
