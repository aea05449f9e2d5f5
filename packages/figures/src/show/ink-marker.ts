import { markerRadius, type Pixel, type PlotMarker, ringRadius } from "./plot-layout.js";
import { ink, type MarkerShape } from "./series-style.js";
import { pixelText, type SvgElement, svgElement } from "./svg.js";

/** Corners, turn of the first one (radians, clockwise from right) and radius, chosen so that all look equally large. */
const polygons: Readonly<
  Record<Exclude<MarkerShape, "circle">, { readonly corners: number; readonly turn: number; readonly size: number }>
> = Object.freeze({
  square: { corners: 4, turn: Math.PI / 4, size: 1.25 },
  triangle: { corners: 3, turn: -Math.PI / 2, size: 1.4 },
  diamond: { corners: 4, turn: 0, size: 1.35 },
  pentagon: { corners: 5, turn: -Math.PI / 2, size: 1.15 },
  nabla: { corners: 3, turn: Math.PI / 2, size: 1.4 },
});

/** A point: its bar, its shape (hollow ones are filled with paper) and, for a suspect, the ring around it. */
export function markerInk(marker: PlotMarker): readonly SvgElement[] {
  const { x, y, colour, bar } = marker;
  const parts: SvgElement[] = [];
  if (bar !== undefined) {
    const { top, bottom, caps } = bar;
    const [left, right] = [x - caps, x + caps].map(pixelText);
    const ends = caps === 0 ? "" : [top, bottom].map((y1) => `M${left},${pixelText(y1)}H${right}`).join("");
    const d = `M${pair(x, top)}V${pixelText(bottom)}${ends}`;
    parts.push(svgElement("path", { d, fill: "none", stroke: colour, "stroke-width": 1.2 }));
  }
  parts.push(shapeInk(marker.shape, [x, y], colour, marker.filled));
  if (marker.ring) parts.push(ringInk([x, y]));
  return parts;
}

/** The shape of a marker alone. */
function shapeInk(shape: MarkerShape, [x, y]: Pixel, colour: string, filled: boolean): SvgElement {
  const look = { fill: filled ? colour : ink.paper, stroke: colour, "stroke-width": 1.4 };
  if (shape === "circle") return svgElement("circle", { cx: x, cy: y, r: markerRadius, ...look });
  const { corners, turn, size } = polygons[shape];
  const points = Array.from({ length: corners }, (_, corner) => {
    const angle = turn + (2 * Math.PI * corner) / corners;
    return pair(x + size * markerRadius * Math.cos(angle), y + size * markerRadius * Math.sin(angle));
  });
  return svgElement("polygon", { points: points.join(" "), ...look });
}

/** The ring around a suspect. */
export function ringInk([x, y]: Pixel): SvgElement {
  return svgElement("circle", {
    cx: x,
    cy: y,
    r: ringRadius,
    fill: "none",
    stroke: ink.alarm,
    "stroke-width": 1.6,
  });
}

function pair(x: number, y: number): string {
  return `${pixelText(x)},${pixelText(y)}`;
}
