import type { DensityPlotOptions } from "./density-options.js";
import { bandText, cornerText, floorText } from "./density-words.js";
import { type Frame, textSize } from "./frame.js";
import { dropGuide, type Guides, joinGuides, labelHeight, levelGuide, stretchGuide } from "./guides.js";
import type { LabelRequest } from "./place-labels.js";
import type { PlotMarker } from "./plot-layout.js";
import { ink } from "./series-style.js";
import { textWidth } from "./text-measure.js";

/** Lays out floor, corner, band and the names of suspects in a frame. */
export function layoutMarks(
  { floor, cornerHz, band }: DensityPlotOptions,
  unit: string,
  frame: Frame,
  markers: readonly PlotMarker[],
): Guides {
  const guides: Guides[] = [];
  if (floor !== undefined) guides.push(levelGuide(floor, floorText(floor, unit), frame));
  if (cornerHz !== undefined) {
    // From where the density is √2 above the floor, which is what a corner means.
    const top = floor === undefined ? frame.plot.y : frame.y.at(floor * Math.SQRT2);
    guides.push(dropGuide(cornerHz, cornerText(cornerHz), frame, top));
  }
  if (band !== undefined) guides.push(stretchGuide([band.fromHz, band.toHz], bandText(band), frame));
  const labels = markers.filter(({ ring }) => ring).map(suspectLabel);
  return joinGuides([...guides, { shades: [], lines: [], labels }]);
}

function suspectLabel({ x, y }: PlotMarker): LabelRequest {
  const text = "misread?";
  const [width, height] = [textWidth(text, textSize.label), labelHeight];
  const offset = 11;
  const places = [
    { x: x + offset, y: y - height / 2, width, height },
    { x: x - offset - width, y: y - height / 2, width, height },
    { x: x - width / 2, y: y - offset - height, width, height },
    { x: x - width / 2, y: y + offset, width, height },
  ];
  return { text, size: textSize.label, colour: ink.alarm, places };
}
