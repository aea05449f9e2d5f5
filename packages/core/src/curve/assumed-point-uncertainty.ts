/** Relative standard uncertainty (k = 1) of a point that states none: what a careful eye reads off a plot. */
export const assumedPointUncertainty = 0.05;

/** Frequencies and densities must be so large and so small at most: their squares have to be doubles in full precision. */
export const curveRange: readonly [number, number] = Object.freeze([1e-150, 1e150]);
