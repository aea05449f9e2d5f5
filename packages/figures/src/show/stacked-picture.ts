import { picture, plotInk } from "./ink-plot.js";
import type { PlotLayout } from "./plot-layout.js";
import { pixelText, svgElement } from "./svg.js";

/** Several plots in one picture, one below the other. */
export interface StackedLayout {
  readonly title: string;
  readonly description: string;
  readonly frame: { readonly width: number; readonly height: number };
  readonly panels: readonly PlotLayout[];
}

/** Stacks plots of one width; what each shows is told once, in the picture's description. */
export function stackPlots(title: string, panels: readonly PlotLayout[]): StackedLayout {
  return {
    title,
    description: panels.map(({ description }) => description).join(" "),
    frame: {
      width: Math.max(...panels.map(({ frame }) => frame.width)),
      height: panels.reduce((sum, { frame }) => sum + frame.height, 0),
    },
    panels,
  };
}

/** Draws plots one below the other. */
export function inkStack(layout: StackedLayout): string {
  let top = 0;
  const children = layout.panels.map((panel) => {
    const { width, height } = panel.frame;
    const viewBox = `0 0 ${pixelText(width)} ${pixelText(height)}`;
    const element = svgElement("svg", { x: 0, y: top, width, height, viewBox }, plotInk(panel));
    top += height;
    return element;
  });
  return picture(layout, children);
}
