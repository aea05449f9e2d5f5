/** Least and largest frequency and density of a point: their squares must be doubles in full precision. */
export const curveRange: readonly [least: number, largest: number] = Object.freeze([1e-150, 1e150]);
