/** Shapes of point markers; each can be drawn filled or hollow. */
export type MarkerShape = "circle" | "square" | "triangle" | "diamond" | "pentagon" | "nabla";

/** How one series looks: told apart by hue, by lightness, by dashes and by marker, so no reader depends on one of them. */
export interface SeriesStyle {
  readonly colour: string;
  /** Lengths of dash and gap in pixels; empty for an unbroken line. */
  readonly dash: readonly number[];
  readonly marker: MarkerShape;
}

type InkName =
  | "paper"
  | "title"
  | "text"
  | "faint"
  | "frame"
  | "grid"
  | "fineGrid"
  | "shade"
  | "shadeEdge"
  | "guide"
  | "alarm"
  | "rest";

/** Colours that are not a series' own. */
export const ink: Readonly<Record<InkName, string>> = Object.freeze({
  paper: "#ffffff",
  title: "#16202a",
  text: "#34404b",
  faint: "#64707c",
  frame: "#8b959e",
  grid: "#d3d9de",
  fineGrid: "#edf0f2",
  shade: "#f3ead2",
  shadeEdge: "#c9b88a",
  guide: "#6d5a1e",
  alarm: "#b3261e",
  rest: "#c6ccd2",
});

/** How many series stay distinguishable in one picture; what is beyond is drawn as faint company. */
export const distinctSeries = 12;

// Neighbours alternate between dark and light, so that they differ in grey as well; red-green pairs differ in lightness.
const colours = ["#1c4f82", "#c8641b", "#3c2a63", "#3f9aa6", "#7a1f35", "#8a9a2b"] as const;
const dashes: readonly (readonly number[])[] = [[], [9, 4], [4, 2.5], [12, 3, 2, 3], [6, 2, 2, 2, 2, 2]];
const markers: readonly MarkerShape[] = ["circle", "square", "triangle", "diamond", "pentagon", "nabla"];

/** Style of the series with this number, counted from 0; the first thirty differ in colour or dashes. */
export function seriesStyle(index: number): SeriesStyle {
  return {
    colour: colours[index % colours.length] as string,
    dash: dashes[index % dashes.length] as readonly number[],
    marker: markers[index % markers.length] as MarkerShape,
  };
}

/** Style of series beyond those that can be told apart. */
export const restStyle: SeriesStyle = Object.freeze({ colour: ink.rest, dash: [], marker: "circle" });
