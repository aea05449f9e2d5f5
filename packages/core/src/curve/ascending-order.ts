import type { CurvePoint } from "./curve.js";

/** Called with two different points at one frequency, the earlier given first; must throw. */
export type Contradiction = (first: CurvePoint, second: CurvePoint) => never;

/**
 * Indices that put points in ascending order of frequency, each frequency once: a point given twice alike counts once.
 * Undefined where the points are in that order already, as most tables are.
 */
export function ascendingOrder(
  points: readonly CurvePoint[],
  contradiction: Contradiction,
): readonly number[] | undefined {
  if (isAscending(points)) return undefined;
  const hz = Float64Array.from(points, ({ frequency }) => frequency);
  const order = Array.from(points, (_, index) => index).toSorted(
    (one, other) => (hz[one] as number) - (hz[other] as number) || one - other,
  );
  const kept: number[] = [];
  for (const index of order) {
    const before = points[kept.at(-1) ?? -1];
    const point = points[index] as CurvePoint;
    if (before === undefined || before.frequency !== point.frequency) kept.push(index);
    else if (!isAlike(before, point)) contradiction(before, point);
  }
  return kept;
}

function isAscending(points: readonly CurvePoint[]): boolean {
  let last = Number.NEGATIVE_INFINITY;
  for (const { frequency } of points) {
    if (!(frequency > last)) return false;
    last = frequency;
  }
  return true;
}

function isAlike(one: CurvePoint, other: CurvePoint): boolean {
  return one.density === other.density && one.uncertainty === other.uncertainty && one.inFit === other.inFit;
}
