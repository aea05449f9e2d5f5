import type { Box } from "./box.js";
import { markerRadius, type Pixel, type PlotMarker, ringRadius } from "./plot-layout.js";

/** Rectangles that cover lines and points, for labels to keep clear of. */
export function inkBoxes(runs: readonly (readonly Pixel[])[], markers: readonly PlotMarker[]): readonly Box[] {
  return [...runs.flatMap(runBoxes), ...markers.map(markerBox)];
}

/** A slanting segment is covered by short pieces, so that its empty corners stay free. */
const piece = 10;

function runBoxes(run: readonly Pixel[]): readonly Box[] {
  const boxes: Box[] = [];
  for (const [index, end] of run.entries()) {
    const start = run[index - 1];
    if (start === undefined) continue;
    const [dx, dy] = [end[0] - start[0], end[1] - start[1]];
    const count = Math.max(1, Math.min(200, Math.ceil(Math.min(Math.abs(dx), Math.abs(dy)) / piece)));
    for (let step = 0; step < count; step += 1)
      boxes.push(
        spanned(
          [start[0] + (dx * step) / count, start[1] + (dy * step) / count],
          [start[0] + (dx * (step + 1)) / count, start[1] + (dy * (step + 1)) / count],
        ),
      );
  }
  return boxes;
}

/** A line is a pixel and a half wide. */
function spanned(a: Pixel, b: Pixel): Box {
  const [x, y] = [Math.min(a[0], b[0]) - 0.75, Math.min(a[1], b[1]) - 0.75];
  return { x, y, width: Math.abs(a[0] - b[0]) + 1.5, height: Math.abs(a[1] - b[1]) + 1.5 };
}

function markerBox({ x, y, bar, ring }: PlotMarker): Box {
  const radius = ring ? ringRadius + 1 : 1.4 * markerRadius;
  const top = Math.min(y - radius, bar?.top ?? y);
  const bottom = Math.max(y + radius, bar?.bottom ?? y);
  return { x: x - radius, y: top, width: 2 * radius, height: bottom - top };
}
