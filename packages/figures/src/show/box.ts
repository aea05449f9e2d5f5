/** A rectangle in pixels, y downwards. */
export interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** What rounding may make of edges that touch, in pixels. */
const touching = 1e-6;

/** Whether two rectangles share area; touching edges do not. */
export function boxesOverlap(a: Box, b: Box): boolean {
  return (
    a.x + touching < b.x + b.width &&
    b.x + touching < a.x + a.width &&
    a.y + touching < b.y + b.height &&
    b.y + touching < a.y + a.height
  );
}

/** Whether `inner` lies wholly in `outer`. */
export function boxInside(inner: Box, outer: Box): boolean {
  return (
    inner.x >= outer.x &&
    inner.y >= outer.y &&
    inner.x + inner.width <= outer.x + outer.width &&
    inner.y + inner.height <= outer.y + outer.height
  );
}
