import { productError } from "./product-error.js";

/**
 * a·b less its nearest whole number, in [−½, ½], right to an ulp of itself: phases of 1e9 turns keep their digits, where the
 * plain product has lost nine of them.
 */
export function turnsOf(a: number, b: number): number {
  const product = a * b;
  const lost = productError(a, b);
  const rest = product - Math.round(product);
  // Splitting overflows beyond 1e300, where a phase means nothing any more.
  if (!Number.isFinite(lost)) return Number.isFinite(rest) ? rest : 0;
  const sum = rest + (lost - Math.round(lost));
  return sum - Math.round(sum);
}
