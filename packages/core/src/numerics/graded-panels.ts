/** Where panels must shrink: 0, and the places around which an envelope peaks. */
export type NearestPeaks = (x: number) => readonly [below: number, above: number];

/**
 * Edges from `from` to `to` through all inner `knots`, each panel at most `share` times its distance from the peaks on both
 * sides: on such panels powers of the distance are polynomials to the digits that a rule of twenty nodes has.
 */
export function gradedPanels(
  [from, to]: readonly [number, number],
  knots: readonly number[],
  nearestPeaks: NearestPeaks,
  share: number,
): number[] {
  const stops = [...knots.filter((knot) => knot > from && knot < to), to].toSorted((one, other) => one - other);
  const edges = [from];
  let x = from;
  for (const stop of stops) {
    while (x < stop) {
      const [below, above] = nearestPeaks(x);
      // towards the peak above a panel may end where its own length is that share of what is left
      const reach = Math.min(x + share * (x - below), x + ((above - x) * share) / (1 + share));
      // a sliver before a stop joins its neighbour
      const next = reach >= stop - 0.1 * (reach - x) || !(reach > x) ? stop : reach;
      edges.push(next);
      x = next;
    }
  }
  return edges;
}
