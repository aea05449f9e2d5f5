import { cascade, firstOrderHighPass, secondOrderLowPass, type Weighting } from "@quietband/core";

/**
 * The measurement filter that low-frequency figures are often taken through: first order at the lower edge, second order
 * (Butterworth) at the upper. Common practice, no source: it is common, not standard.
 */
export function usualFilter(fromHz: number, toHz: number): Weighting {
  return cascade(firstOrderHighPass({ cutoffHz: fromHz }), secondOrderLowPass({ naturalHz: toHz, q: Math.SQRT1_2 }));
}
