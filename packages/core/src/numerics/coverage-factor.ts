import { bracketedRoot } from "./bracketed-root.js";
import { gaussLegendre } from "./gauss-legendre.js";

const rule = gaussLegendre(48);

/**
 * The factor k for which ± k standard deviations hold the given probability: Student's t for a whole number of degrees of
 * freedom, the normal factor for infinitely many. To 1e-12.
 */
export function coverageFactor(probability: number, degrees: number): number {
  const within = Number.isFinite(degrees) ? (angle: number) => studentWithin(angle, degrees) : normalWithin;
  const far = Number.isFinite(degrees) ? Math.PI / 2 : 9;
  const found = bracketedRoot((x) => within(x) - probability, [0, far], 1e-15)?.x ?? Number.NaN;
  return Number.isFinite(degrees) ? Math.sqrt(degrees) * Math.tan(found) : found;
}

/** P(|t| < √ν·tan θ) for whole ν: finite sums in θ (Abramowitz, Stegun 26.7.3 and 26.7.4). */
function studentWithin(angle: number, degrees: number): number {
  const [sine, cosine] = [Math.sin(angle), Math.cos(angle)];
  const odd = degrees % 2 === 1;
  let term = odd ? cosine : 1;
  let sum = degrees === 1 ? 0 : term;
  for (let k = odd ? 3 : 2; k < degrees; k += 2) {
    term *= ((k - 1) / k) * cosine * cosine;
    sum += term;
  }
  return odd ? (2 / Math.PI) * (angle + sine * sum) : sine * sum;
}

/** P(|z| < x). */
function normalWithin(x: number): number {
  const sum = rule.nodes.reduce((total, node, i) => {
    const at = 0.5 * x * (1 + node);
    return total + (rule.weights[i] as number) * Math.exp(-0.5 * at * at);
  }, 0);
  return (x * sum) / Math.sqrt(2 * Math.PI);
}
