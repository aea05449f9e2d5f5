import type { Box } from "./box.js";
import type { Frame } from "./frame.js";
import type { PlacedKeyEntry } from "./key.js";
import type { PlacedLabel } from "./place-labels.js";
import type { MarkerShape } from "./series-style.js";

/** Pixels, y downwards. */
export type Pixel = readonly [x: number, y: number];

/** A line through pixels; runs are drawn apart from each other. */
export interface PlotLine {
  readonly runs: readonly (readonly Pixel[])[];
  readonly colour: string;
  readonly dash: readonly number[];
  readonly width: number;
}

/** The area between an upper and a lower line over the same x. */
export interface PlotArea {
  readonly x: readonly number[];
  readonly upper: readonly number[];
  readonly lower: readonly number[];
  readonly colour: string;
}

/** Pixels of a bar and half the width of its caps, 0 for none: on several series caps would hide the markers' shapes. */
interface MarkerBar {
  readonly top: number;
  readonly bottom: number;
  readonly caps: number;
}

/** A point; `bar` spans its uncertainty. */
export interface PlotMarker {
  readonly x: number;
  readonly y: number;
  readonly shape: MarkerShape;
  readonly filled: boolean;
  readonly colour: string;
  readonly bar?: MarkerBar;
  /** Circled, to draw the eye to a suspect. */
  readonly ring: boolean;
}

/** A shaded stretch of the plot with an edge at either end that lies inside. */
export interface PlotShade {
  readonly box: Box;
  readonly edges: readonly number[];
}

/** Everything in a picture as plain data, in pixels: what tests look at and ink is made from. */
export interface PlotLayout {
  readonly title: string;
  readonly description: string;
  readonly frame: Frame;
  readonly shades: readonly PlotShade[];
  readonly areas: readonly PlotArea[];
  readonly guides: readonly PlotLine[];
  readonly lines: readonly PlotLine[];
  readonly markers: readonly PlotMarker[];
  readonly labels: readonly PlacedLabel[];
  readonly key: readonly PlacedKeyEntry[];
}

/** Radius of the ring around a suspect. */
export const ringRadius = 8;

/** Radius of a point marker; small enough that the bar of 5 % shows on two decades. */
export const markerRadius = 2.7;
