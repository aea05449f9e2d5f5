import { type Box, boxesOverlap, boxInside } from "./box.js";

/** A label and the places it may go, best first. */
export interface LabelRequest {
  readonly text: string;
  readonly size: number;
  readonly bold?: boolean;
  readonly colour: string;
  readonly places: readonly Box[];
}

/** A label that found its place. */
export interface PlacedLabel {
  readonly text: string;
  readonly size: number;
  readonly bold: boolean;
  readonly colour: string;
  readonly box: Box;
}

/**
 * Puts each label, in the order given, where it covers least ink; never on another label and never outside `bounds`.
 * A label with no such place is dropped: its text still stands in the description of the picture.
 */
export function placeLabels(
  requests: readonly LabelRequest[],
  ink: readonly Box[],
  bounds: Box,
): readonly PlacedLabel[] {
  const placed: PlacedLabel[] = [];
  for (const { text, size, bold = false, colour, places } of requests) {
    const box = leastCovering(places, ink, (place) => {
      return boxInside(place, bounds) && !placed.some((other) => boxesOverlap(other.box, place));
    });
    if (box !== undefined) placed.push({ text, size, bold, colour, box });
  }
  return placed;
}

function leastCovering(places: readonly Box[], ink: readonly Box[], allowed: (place: Box) => boolean): Box | undefined {
  let best: Box | undefined;
  let least = Number.POSITIVE_INFINITY;
  for (const place of places) {
    if (!allowed(place)) continue;
    const covered = ink.filter((other) => boxesOverlap(other, place)).length;
    if (covered >= least) continue;
    best = place;
    least = covered;
    if (covered === 0) break;
  }
  return best;
}
