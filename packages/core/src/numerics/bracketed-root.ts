/** Where a search for a root stopped. */
export interface Root {
  readonly x: number;
  readonly evaluations: number;
}

/**
 * A root of a continuous function between two points where its signs differ, by the ITP method (Oliveira, Takahashi, ACM
 * Trans. Math. Softw. 47, 2021): superlinear where the function is smooth, never slower than bisection by more than one step.
 * Stops when the bracket is narrower than `tolerance`. Undefined when the signs do not differ.
 */
export function bracketedRoot(
  valueAt: (x: number) => number,
  [low, high]: readonly [number, number],
  tolerance: number,
): Root | undefined {
  let a = low;
  let b = high;
  let atA = valueAt(a);
  let atB = valueAt(b);
  let evaluations = 2;
  if (atA === 0) return { x: a, evaluations };
  if (atB === 0) return { x: b, evaluations };
  if (atA > 0 === atB > 0) return undefined;
  const rising = atB > 0;
  const most = Math.ceil(Math.log2(Math.max((b - a) / (2 * tolerance), 1))) + 1;
  const scale = 0.2 / (b - a);
  for (let step = 0; b - a > 2 * tolerance && step < 200; step += 1) {
    const middle = 0.5 * (a + b);
    const slack = Math.max(tolerance * 2 ** (most - step) - 0.5 * (b - a), 0);
    const falsi = (atB * a - atA * b) / (atB - atA);
    const towards = Math.sign(middle - falsi);
    const shift = scale * (b - a) * (b - a);
    const truncated = shift <= Math.abs(middle - falsi) ? falsi + towards * shift : middle;
    const x = Math.abs(truncated - middle) <= slack ? truncated : middle - towards * slack;
    if (!(x > a && x < b)) break;
    const atX = valueAt(x);
    evaluations += 1;
    if (atX === 0) return { x, evaluations };
    if (atX > 0 === rising) [b, atB] = [x, atX];
    else [a, atA] = [x, atX];
  }
  return { x: 0.5 * (a + b), evaluations };
}
