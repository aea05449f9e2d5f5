import { area, line } from "d3-shape";
import type { Box } from "./box.js";
import type { Frame, TextLine } from "./frame.js";
import { markerInk, ringInk } from "./ink-marker.js";
import type { PlacedKeyEntry } from "./key.js";
import type { PlacedLabel } from "./place-labels.js";
import type { Pixel, PlotArea, PlotLayout, PlotLine } from "./plot-layout.js";
import { ink } from "./series-style.js";
import { pixelDigits, pixelText, type SvgElement, svgElement, writeSvg } from "./svg.js";
import { ascent, fontFamily } from "./text-measure.js";

/** An interval lets the grid and a shaded band show through. */
const areaOpacity = 0.22;

/** Draws a laid-out plot. */
export function inkPlot(layout: PlotLayout): string {
  return picture(layout, plotInk(layout));
}

/** The ink of a laid-out plot: nothing is decided here but its order. */
export function plotInk(layout: PlotLayout): readonly SvgElement[] {
  const { frame, key } = layout;
  return [
    ...layout.shades.map(({ box }) => svgElement("rect", { ...box, fill: ink.shade })),
    ...gridLines(frame),
    ...layout.shades.flatMap(({ box, edges }) =>
      edges.map((x) => segment([x, box.y], [x, box.y + box.height], { stroke: ink.shadeEdge, "stroke-width": 1 })),
    ),
    svgElement("rect", { ...frame.plot, fill: "none", stroke: ink.frame }),
    clipped(frame.plot, [
      ...layout.areas.map(areaPath),
      ...layout.guides.map(linePath),
      ...layout.lines.map(linePath),
      ...layout.markers.flatMap(markerInk),
    ]),
    ...layout.labels.flatMap(labelInk),
    ...key.map(keyInk),
    ...frame.texts.map(textInk),
  ];
}

/** The root of every picture: white paper, one font, a title and a description for those who listen. */
export function picture(
  about: {
    readonly title: string;
    readonly description: string;
    readonly frame: { readonly width: number; readonly height: number };
  },
  children: readonly SvgElement[],
): string {
  const { width, height } = about.frame;
  return writeSvg(
    svgElement(
      "svg",
      {
        xmlns: "http://www.w3.org/2000/svg",
        width,
        height,
        viewBox: `0 0 ${pixelText(width)} ${pixelText(height)}`,
        role: "img",
        "font-family": fontFamily,
      },
      [
        svgElement("title", {}, [about.title]),
        svgElement("desc", {}, [about.description]),
        svgElement("rect", { width, height, fill: ink.paper }),
        ...children,
      ],
    ),
  );
}

/** A line of text. */
export function textInk(text: TextLine): SvgElement {
  return svgElement(
    "text",
    {
      x: text.x,
      y: text.y,
      "font-size": text.size,
      fill: text.colour,
      "text-anchor": text.anchor === "start" ? undefined : text.anchor,
      "font-weight": text.bold ? "bold" : undefined,
    },
    [text.text],
  );
}

function gridLines({ plot, x, y }: Frame): readonly SvgElement[] {
  const vertical = (at: number, stroke: string): SvgElement =>
    segment([at, plot.y], [at, plot.y + plot.height], { stroke, "stroke-width": 1 });
  const horizontal = (at: number, stroke: string): SvgElement =>
    segment([plot.x, at], [plot.x + plot.width, at], { stroke, "stroke-width": 1 });
  return [
    ...x.minor.map((at) => vertical(at, ink.fineGrid)),
    ...y.minor.map((at) => horizontal(at, ink.fineGrid)),
    ...x.ticks.map(({ at }) => vertical(at, ink.grid)),
    ...y.ticks.map(({ at }) => horizontal(at, ink.grid)),
  ];
}

/** A nested picture clips to its own edges: no clip-path, hence no id that could meet its like in a page of plots. */
function clipped(plot: Box, children: readonly SvgElement[]): SvgElement {
  const { x, y, width, height } = plot;
  const viewBox = [x, y, width, height].map(pixelText).join(" ");
  return svgElement("svg", { x, y, width, height, viewBox, overflow: "hidden", "aria-hidden": "true" }, children);
}

function segment(from: Pixel, to: Pixel, attributes: Readonly<Record<string, string | number>>): SvgElement {
  return svgElement("line", { x1: from[0], y1: from[1], x2: to[0], y2: to[1], ...attributes });
}

function linePath({ runs, colour, dash, width }: PlotLine): SvgElement {
  const draw = line<Pixel>(
    ([x]) => x,
    ([, y]) => y,
  ).digits(pixelDigits);
  return svgElement("path", {
    d: runs.map((run) => draw(run.map(([x, y]) => [x, y])) ?? "").join(""),
    fill: "none",
    stroke: colour,
    "stroke-width": width,
    "stroke-linejoin": "round",
    "stroke-dasharray": dash.length === 0 ? undefined : dash.map(pixelText).join(" "),
  });
}

function areaPath({ x, upper, lower, colour }: PlotArea): SvgElement {
  const draw = area<number>(
    (index) => x[index] as number,
    (index) => lower[index] as number,
    (index) => upper[index] as number,
  ).digits(pixelDigits);
  return svgElement("path", {
    d: draw([...x.keys()]) ?? "",
    fill: colour,
    "fill-opacity": areaOpacity,
    stroke: "none",
  });
}

/** A label in the plot, on a patch of paper: unlike an outlined text, every viewer draws that right. */
function labelInk({ text, size, bold, colour, box }: PlacedLabel): readonly SvgElement[] {
  return [
    svgElement("rect", { ...box, rx: 2, fill: ink.paper, "fill-opacity": 0.75 }),
    svgElement(
      "text",
      {
        x: box.x + box.width / 2,
        y: box.y + size * ascent,
        "font-size": size,
        fill: colour,
        "text-anchor": "middle",
        "font-weight": bold ? "bold" : undefined,
      },
      [text],
    ),
  ];
}

/** One entry of the key; its full label pops up where a viewer shows titles. */
function keyInk({ label, swatch, swatchBox, lines }: PlacedKeyEntry): SvgElement {
  const y = swatchBox.y + swatchBox.height / 2;
  const middle: Pixel = [swatchBox.x + swatchBox.width / 2, y];
  const parts: SvgElement[] = [svgElement("title", {}, [label])];
  if (swatch.fill === true)
    parts.push(
      svgElement("rect", { ...swatchBox, y: y - 5, height: 10, fill: swatch.colour, "fill-opacity": areaOpacity }),
    );
  if (swatch.line !== undefined) {
    const run: readonly Pixel[] = [
      [swatchBox.x, y],
      [swatchBox.x + swatchBox.width, y],
    ];
    parts.push(linePath({ runs: [run], colour: swatch.colour, ...swatch.line }));
  }
  if (swatch.marker !== undefined) {
    const [x] = middle;
    const bar = swatch.bar === true ? { bar: { top: y - 7, bottom: y + 7, caps: 4 } } : {};
    parts.push(...markerInk({ x, y, ...swatch.marker, ...bar, colour: swatch.colour, ring: swatch.ring === true }));
  } else if (swatch.ring === true) parts.push(ringInk(middle));
  return svgElement("g", {}, [...parts, ...lines.map(textInk)]);
}
