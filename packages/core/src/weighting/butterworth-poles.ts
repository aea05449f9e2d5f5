import type { ComplexHz } from "./weighting.js";

/** Poles of the Butterworth prototype on the unit circle, left half: e^(iπ(2k + n − 1)/(2n)), k = 1 .. n. */
export function butterworthPoles(order: number): ComplexHz[] {
  return Array.from({ length: order }, (_, index) => {
    const angle = (Math.PI * (2 * index + 1)) / (2 * order);
    const middle = 2 * index + 1 === order;
    return { re: -Math.sin(angle), im: middle ? 0 : Math.cos(angle) };
  });
}
