import { type Complex, minus, over, plus, polar, scaledBy, sizeOf, times } from "./complex.js";

const mostSteps = 400;

/**
 * All complex roots of Σ coefficients[k]·x^k, in no order, by the simultaneous iteration of Aberth (Math. Comp. 27, 1973) on
 * Newton's correction. Simple roots come to a few ulp times their own condition; an m-fold root to the m-th root of an ulp.
 */
export function polynomialRoots(coefficients: readonly number[]): Complex[] {
  const first = coefficients.findIndex((value) => value !== 0);
  const last = coefficients.findLastIndex((value) => value !== 0);
  if (first < 0) return [];
  const inner = coefficients.slice(first, last + 1);
  const zeros = Array.from({ length: first }, () => ({ re: 0, im: 0 }));
  return [...zeros, ...rootsOf(inner)];
}

function rootsOf(coefficients: readonly number[]): Complex[] {
  const degree = coefficients.length - 1;
  const radius = Math.abs((coefficients[0] as number) / (coefficients[degree] as number)) ** (1 / degree);
  const roots = Array.from({ length: degree }, (_, k) => polar(radius, (2 * Math.PI * k) / degree + 0.4));
  for (let step = 0; step < mostSteps; step += 1) {
    let moved = 0;
    for (const [k, root] of roots.entries()) {
      const shift = correction(coefficients, roots, k);
      roots[k] = minus(root, shift);
      moved = Math.max(moved, sizeOf(shift) / sizeOf(root));
    }
    if (!(moved > 4e-16)) break;
  }
  return roots;
}

/** N/(1 − N·Σ 1/(x − x_j)), N the correction of Newton. */
function correction(coefficients: readonly number[], roots: readonly Complex[], k: number): Complex {
  const x = roots[k] as Complex;
  const newton = newtonStep(coefficients, x);
  let repulsion: Complex = { re: 0, im: 0 };
  for (const [j, other] of roots.entries()) {
    if (j === k) continue;
    const apart = minus(x, other);
    if (apart.re !== 0 || apart.im !== 0) repulsion = plus(repulsion, over({ re: 1, im: 0 }, apart));
  }
  const damping = minus({ re: 1, im: 0 }, times(newton, repulsion));
  return sizeOf(damping) === 0 ? newton : over(newton, damping);
}

/** p(x)/p′(x), outside the unit circle by the reversed polynomial in 1/x, where powers do not overflow; 0 where p is lost in rounding. */
function newtonStep(coefficients: readonly number[], x: Complex): Complex {
  const degree = coefficients.length - 1;
  const inside = sizeOf(x) <= 1;
  const at = inside ? x : over({ re: 1, im: 0 }, x);
  const reach = sizeOf(at);
  let value: Complex = { re: 0, im: 0 };
  let slope: Complex = { re: 0, im: 0 };
  let size = 0;
  for (let k = 0; k <= degree; k += 1) {
    const coefficient = coefficients[inside ? degree - k : k] as number;
    slope = plus(times(slope, at), value);
    value = plus(times(value, at), { re: coefficient, im: 0 });
    size = size * reach + Math.abs(coefficient);
  }
  if (sizeOf(value) <= Number.EPSILON * size) return { re: 0, im: 0 };
  if (inside) return over(value, slope);
  // p(x) = x^n q(1/x): p/p′ = x·q/(n·q − (1/x)·q′)
  return over(times(x, value), minus(scaledBy(degree, value), times(at, slope)));
}
