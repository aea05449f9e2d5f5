import { expect } from "vitest";
import { type Box, boxesOverlap, boxInside } from "../../../src/show/box.js";
import type { PlotLayout } from "../../../src/show/plot-layout.js";
import { everyElement, numbersIn, parseXml, type XmlElement } from "./parse-xml.js";

/** A piece of text and where it stands. */
export interface TextBox {
  readonly text: string;
  readonly box: Box;
}

/** Every piece of text in a layout. */
export function textBoxes({ frame, labels, key }: PlotLayout): readonly TextBox[] {
  return [...frame.texts, ...labels, ...key.flatMap(({ lines }) => lines)];
}

/** What holds of every plot: no texts on each other or outside the picture, ticks on both axes, something inside. */
export function expectReadable(layout: PlotLayout): void {
  const texts = textBoxes(layout);
  const { width, height, plot, x, y } = layout.frame;
  for (const [index, one] of texts.entries()) {
    expect(boxInside(one.box, { x: 0, y: 0, width, height }), `"${one.text}" lies inside the picture`).toBe(true);
    for (const other of texts.slice(index + 1))
      expect(boxesOverlap(one.box, other.box), `"${one.text}" stands on "${other.text}"`).toBe(false);
  }
  for (const label of layout.labels) expect(boxInside(label.box, plot), `"${label.text}" lies in the plot`).toBe(true);
  for (const axis of [x, y]) {
    expect(axis.ticks.length).toBeGreaterThanOrEqual(2);
    for (const tick of axis.ticks) {
      expect(tick.value).toBeGreaterThanOrEqual(axis.domain[0]);
      expect(tick.value).toBeLessThanOrEqual(axis.domain[1]);
    }
  }
  expect(layout.lines.length + layout.markers.length).toBeGreaterThan(0);
}

const words = new Set([
  "xmlns",
  "role",
  "font-family",
  "fill",
  "stroke",
  "text-anchor",
  "font-weight",
  "overflow",
  "aria-hidden",
]);

/** Parses a picture and checks what holds of every one: well-formed, all numbers finite, named, no identifiers. */
export function expectSound(svg: string): XmlElement {
  const root = parseXml(svg);
  expect(root.tag).toBe("svg");
  expect(root.attributes["role"]).toBe("img");
  expect(root.children.slice(0, 2).map(({ tag }) => tag)).toEqual(["title", "desc"]);
  for (const { text } of root.children.slice(0, 2)) expect(text.length).toBeGreaterThan(0);
  for (const { tag, attributes } of everyElement(root)) {
    expect(Object.keys(attributes)).not.toContain("id");
    for (const [name, value] of Object.entries(attributes)) {
      if (words.has(name) || name === "stroke-linejoin") continue;
      const numbers = numbersIn(value);
      expect(numbers.length, `${tag} ${name}="${value.slice(0, 60)}"`).toBeGreaterThan(0);
      expect(numbers.every(Number.isFinite), `${tag} ${name}="${value.slice(0, 200)}"`).toBe(true);
    }
  }
  return root;
}

/** All texts of a picture in the order of the document. */
export function textsOf(root: XmlElement): readonly string[] {
  return everyElement(root)
    .filter(({ tag }) => tag === "text")
    .map(({ text }) => text);
}

/** Same elements, same words; coordinates may differ by what rounding to a hundredth of a pixel can make. */
export function expectSamePicture(actual: XmlElement, stored: XmlElement): void {
  expect(actual.tag).toBe(stored.tag);
  expect(actual.text.trim()).toBe(stored.text.trim());
  expect(Object.keys(actual.attributes)).toEqual(Object.keys(stored.attributes));
  for (const [name, value] of Object.entries(actual.attributes)) {
    const expected = stored.attributes[name] ?? "";
    const [numbers, others] = [numbersIn(value), numbersIn(expected)];
    expect(value.replace(/[\d.]+/g, "#")).toBe(expected.replace(/[\d.]+/g, "#"));
    for (const [index, number] of numbers.entries())
      expect(Math.abs(number - (others[index] ?? Number.NaN)), `${actual.tag} ${name}`).toBeLessThanOrEqual(0.011);
  }
  expect(actual.children.map(({ tag }) => tag)).toEqual(stored.children.map(({ tag }) => tag));
  for (const [index, child] of actual.children.entries())
    expectSamePicture(child, stored.children[index] as XmlElement);
}
