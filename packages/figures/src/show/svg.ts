import { OutOfDomainError } from "@quietband/core";

/** One element of a picture, as plain data: numbers in attributes are pixels and are rounded only when written. */
export interface SvgElement {
  readonly tag: string;
  readonly attributes: Readonly<Record<string, string | number>>;
  readonly children: readonly (SvgElement | string)[];
}

/** Decimals of a pixel that are written: 1/100 px cannot be seen and keeps stored pictures equal across machines. */
export const pixelDigits = 2;

/** An element; attributes given as `undefined` are left out. */
export function svgElement(
  tag: string,
  attributes: Readonly<Record<string, string | number | undefined>> = {},
  children: readonly (SvgElement | string)[] = [],
): SvgElement {
  const present: Record<string, string | number> = {};
  for (const [name, value] of Object.entries(attributes)) if (value !== undefined) present[name] = value;
  return { tag, attributes: present, children };
}

/** Writes an element and all below it, one line each; the only place where a number becomes text and text is escaped. */
export function writeSvg(root: SvgElement): string {
  const lines: string[] = [];
  writeElement(root, "", lines);
  return `${lines.join("\n")}\n`;
}

/** A pixel number as it stands in attributes: rounded, never "-0", never in exponent notation. */
export function pixelText(value: number): string {
  if (!Number.isFinite(value))
    throw new OutOfDomainError(`A plot coordinate must be a finite number of pixels; got ${value}.`);
  const scale = 10 ** pixelDigits;
  const rounded = Math.round(value * scale) / scale;
  return rounded === 0 ? "0" : String(rounded);
}

function writeElement(element: SvgElement, indent: string, lines: string[]): void {
  const attributes = Object.entries(element.attributes)
    .map(([name, value]) => ` ${name}="${escapeXml(typeof value === "number" ? pixelText(value) : value)}"`)
    .join("");
  const open = `${indent}<${element.tag}${attributes}`;
  const [only] = element.children;
  if (only === undefined) {
    lines.push(`${open}/>`);
    return;
  }
  if (element.children.length === 1 && typeof only === "string") {
    lines.push(`${open}>${escapeXml(only)}</${element.tag}>`);
    return;
  }
  lines.push(`${open}>`);
  for (const child of element.children) {
    if (typeof child === "string") lines.push(`${indent}  ${escapeXml(child)}`);
    else writeElement(child, `${indent}  `, lines);
  }
  lines.push(`${indent}</${element.tag}>`);
}

const entities: Readonly<Record<string, string>> = Object.freeze({
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
});

/** Escapes mark-up and replaces what XML 1.0 cannot hold at all: control characters and lone surrogates. */
function escapeXml(text: string): string {
  let out = "";
  for (const character of text) {
    const code = character.codePointAt(0) as number;
    out += isXmlCharacter(code) ? (entities[character] ?? character) : "\uFFFD";
  }
  return out;
}

function isXmlCharacter(code: number): boolean {
  if (code < 0x20) return code === 0x09 || code === 0x0a || code === 0x0d;
  return !(code >= 0xd800 && code <= 0xdfff) && code !== 0xfffe && code !== 0xffff;
}
