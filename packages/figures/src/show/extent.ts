/** Least and greatest value. */
export type Extent = readonly [low: number, high: number];

/** Least and greatest of the positive finite values; undefined when there are none. */
export function positiveExtent(values: Iterable<number>): Extent | undefined {
  return extentWithin(values, 0);
}

/** Least and greatest of the finite values; undefined when there are none. */
export function finiteExtent(values: Iterable<number>): Extent | undefined {
  return extentWithin(values, Number.NEGATIVE_INFINITY);
}

/** A loop and not `Math.max(...values)`, which ends in a stack overflow on a long list. */
function extentWithin(values: Iterable<number>, above: number): Extent | undefined {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const value of values) {
    if (!(value > above && value < Number.POSITIVE_INFINITY)) continue;
    if (value < low) low = value;
    if (value > high) high = value;
  }
  return low <= high ? [low, high] : undefined;
}

/** Smallest extent that holds those given. */
export function joinExtents(...extents: readonly (Extent | undefined)[]): Extent | undefined {
  return finiteExtent(extents.flatMap((extent) => extent ?? []));
}

/**
 * Air at both ends of a logarithmic extent: a share of its own span, and never less span than the factor `least`, so
 * that one point, or many equal ones, still stand on an axis with ticks.
 */
export function airedLog([low, high]: Extent, share: number, least: number): Extent {
  const span = Math.log(high / low);
  const missing = Math.max(0, Math.log(least) - span) / 2;
  const factor = Math.exp(Math.max(share * span, missing));
  return [Math.max(low / factor, Number.MIN_VALUE), Math.min(high * factor, Number.MAX_VALUE)];
}

/** Air at both ends of a linear extent, none beyond an end at zero; a single value gets an axis around it. */
export function airedLinear([low, high]: Extent, share: number): Extent {
  if (low === high) return low === 0 ? [-1, 1] : airedLinear([low - Math.abs(low) / 10, high + Math.abs(high) / 10], 0);
  const air = share * (high - low);
  return [low === 0 ? 0 : low - air, high === 0 ? 0 : high + air];
}
