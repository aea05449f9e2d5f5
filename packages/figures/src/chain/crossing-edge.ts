/** Bracket that is narrow enough, in ln x: an ulp or two. */
const narrow = 4 * Number.EPSILON;

/**
 * Where a positive function that does not fall, `valueAt`, crosses a target between `low` and `high`: decades upwards, then
 * false position with halved ends (Illinois) in logarithms of both, in which powers of frequency are straight lines.
 * Undefined where it does not cross.
 */
export function crossingEdge(
  valueAt: (x: number) => number,
  target: number,
  [low, high]: readonly [number, number],
): number | undefined {
  const excess = (x: number): number => Math.log(Math.max(valueAt(x), Number.MIN_VALUE) / target);
  let from = low;
  let atFrom = excess(from);
  if (atFrom === 0) return from;
  while (from < high) {
    const to = Math.min(from * 10, high);
    const atTo = excess(to);
    if (atTo === 0) return to;
    if (atFrom > 0 !== atTo > 0)
      return from * Math.exp(fallsTo((t) => excess(from * Math.exp(t)), Math.log(to / from), [atFrom, atTo]));
    [from, atFrom] = [to, atTo];
  }
  return undefined;
}

/** The root of a function between 0 and `end`, where its values have different signs. */
function fallsTo(excessAt: (t: number) => number, end: number, [atLow, atHigh]: readonly [number, number]): number {
  let [a, b] = [0, end];
  let [atA, atB] = [atLow, atHigh];
  for (let step = 0; step < 200 && Math.abs(b - a) > narrow * Math.max(1, Math.abs(b)); step += 1) {
    // b is the latest place; a keeps the other sign
    const straight = b - (atB * (b - a)) / (atB - atA);
    const t = Number.isFinite(straight) && step < 60 ? straight : 0.5 * (a + b);
    const atT = excessAt(t);
    if (atT === 0 || t === b) return t;
    if (atT > 0 === atB > 0) atA *= 0.5;
    else [a, atA] = [b, atB];
    [b, atB] = [t, atT];
  }
  return b;
}
