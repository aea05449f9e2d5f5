// A budget of a thousand curves of fifteen points in one call, with uncertainty, shares and ranking, against a general-purpose
// quadrature from npm that gives the total alone, segment by segment.
import { curveFromPoints, polyline } from "@quietband/core";
import { noiseBudget } from "@quietband/figures";
import simpson from "integrate-adaptive-simpson";

const points = (part) =>
  Array.from({ length: 15 }, (_, k) => {
    const frequency = 0.1 * 10 ** ((5 * k) / 14);
    return { frequency, density: (1 + part / 1000) * 1e-9 * Math.sqrt(1 + (10 + part) / frequency) };
  });

const curves = Array.from({ length: 1000 }, (_, part) => points(part));
const sources = curves.map((part, k) => ({
  name: `part ${k}`,
  source: polyline(curveFromPoints(part, { unit: "V" })),
}));

export const budget = () => noiseBudget({ sources, fromHz: 0.1, toHz: 1e4 }).rms;

export function byQuadrature() {
  let power = 0;
  for (const part of curves)
    for (let k = 1; k < part.length; k += 1) {
      const [low, high] = [part[k - 1], part[k]];
      const slope = Math.log(high.density / low.density) / Math.log(high.frequency / low.frequency);
      // scaled to order 1: the quadrature knows an absolute tolerance only
      const integrand = (t) => Math.exp(2 * slope * (t - Math.log(low.frequency)) + t - Math.log(low.frequency));
      const scale = low.density ** 2 * low.frequency;
      power += scale * simpson(integrand, Math.log(low.frequency), Math.log(high.frequency), 1e-10, 30);
    }
  return Math.sqrt(power);
}
