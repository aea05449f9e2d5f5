/** Where a search for a root stopped. */
export interface Root {
  readonly x: number;
  readonly evaluations: number;
}

/**
 * A root of a continuous function between two points where its signs differ, by Chandrupatla's method (Advances in
 * Engineering Software 28, 1997): inverse quadratic interpolation where the last points allow it, bisection elsewhere. Stops
 * when the bracket is narrower than `tolerance` or an ulp of the root. Undefined when the signs do not differ.
 */
export function bracketedRoot(
  valueAt: (x: number) => number,
  [low, high]: readonly [number, number],
  tolerance: number,
): Root | undefined {
  let [a, b] = [high, low];
  let [atA, atB] = [valueAt(a), valueAt(b)];
  let evaluations = 2;
  if (atA === 0) return { x: a, evaluations };
  if (atB === 0) return { x: b, evaluations };
  if (atA > 0 === atB > 0) return undefined;
  let share = 0.5;
  for (;;) {
    const x = a + share * (b - a);
    const atX = valueAt(x);
    evaluations += 1;
    let [c, atC] = [a, atA];
    if (atX > 0 !== atA > 0) {
      [c, atC] = [b, atB];
      [b, atB] = [a, atA];
    }
    [a, atA] = [x, atX];
    const best = Math.abs(atA) < Math.abs(atB) ? a : b;
    const least = (2 * Number.EPSILON * Math.abs(best) + 0.5 * tolerance) / Math.abs(b - c);
    if (atX === 0 || least > 0.5 || evaluations > 400) return { x: best, evaluations };
    share = Math.min(Math.max(nextShare([a, b, c], [atA, atB, atC]), least), 1 - least);
  }
}

function nextShare(
  [a, b, c]: readonly [number, number, number],
  [atA, atB, atC]: readonly [number, number, number],
): number {
  const place = (a - b) / (c - b);
  const height = (atA - atB) / (atC - atB);
  if (!(height * height < place && (1 - height) ** 2 < 1 - place)) return 0.5;
  return (atA / (atB - atA)) * (atC / (atB - atC)) + ((c - a) / (b - a)) * (atA / (atC - atA)) * (atB / (atC - atB));
}
