/** Relative standard uncertainty (k = 1) of a point that states none: what a careful eye reads off a plot. */
export const assumedPointUncertainty = 0.05;
