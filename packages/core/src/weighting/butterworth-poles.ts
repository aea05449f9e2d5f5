import { withConjugates } from "./conjugates.js";
import type { ComplexHz } from "./weighting.js";

/** Poles of the Butterworth prototype: evenly on the left half of the unit circle, e^(iπ(2k + n − 1)/(2n)), k = 1 .. n. */
export function butterworthPoles(order: number): ComplexHz[] {
  const upper = Array.from({ length: Math.ceil(order / 2) }, (_, index) => {
    const angle = (Math.PI * (2 * index + 1)) / (2 * order);
    const real = 2 * index + 1 === order;
    return real ? { re: -1, im: 0 } : { re: -Math.sin(angle), im: Math.cos(angle) };
  });
  return withConjugates(upper);
}
