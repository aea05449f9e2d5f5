import { type Frame, type FramePlan, layoutFrame, margin } from "./frame.js";
import type { Guides } from "./guides.js";
import { inkBoxes } from "./ink-boxes.js";
import { type KeyEntry, keyGutter, layoutKey } from "./key.js";
import { placeLabels } from "./place-labels.js";
import type { PlotArea, PlotLayout, PlotLine, PlotMarker } from "./plot-layout.js";

/** What stands in a frame, and what the key says of it. */
export interface PlotContent {
  readonly areas: readonly PlotArea[];
  readonly lines: readonly PlotLine[];
  readonly markers: readonly PlotMarker[];
  readonly guides: Guides;
  readonly entries: readonly KeyEntry[];
  /** Series drawn faint without an entry; the key counts them. */
  readonly unnamed: number;
}

/**
 * Fits frame, content and key together. The key's labels decide how wide the plot is, and the content decides which
 * labels there are: so the content is laid out once in a provisional frame, and once more in the final one.
 */
export function composePlot(
  plan: Omit<FramePlan, "gutter">,
  about: { readonly title: string; readonly description: string },
  contentIn: (frame: Frame) => PlotContent,
): PlotLayout {
  const first = contentIn(layoutFrame({ ...plan, gutter: 0 }));
  const gutter = keyGutter(
    first.entries.map(({ label }) => label),
    plan.width,
  );
  const frame = layoutFrame({ ...plan, gutter });
  const { areas, lines, markers, guides, entries, unnamed } = contentIn(frame);
  const { plot } = frame;
  const column = { x: plot.x + plot.width + margin, y: plot.y, width: gutter - margin, height: plot.height };
  const edges = areas.flatMap(({ x, upper, lower }) =>
    [upper, lower].map((side) => x.map((at, index) => [at, side[index] as number] as const)),
  );
  const runs = [...[...lines, ...guides.lines].flatMap((line) => line.runs), ...edges];
  return {
    title: about.title,
    // A note may be cut in the picture; in the description it stands in full.
    description: `${about.description} ${plan.note}`.trimEnd(),
    frame,
    shades: guides.shades,
    areas,
    guides: guides.lines,
    lines,
    markers,
    labels: placeLabels(guides.labels, inkBoxes(runs, markers), plot),
    key: layoutKey(entries, unnamed, column),
  };
}
