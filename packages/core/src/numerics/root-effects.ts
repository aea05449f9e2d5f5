import { type Complex, conjugate, minus, over, plus, scaledBy, squareDifference, times } from "./complex.js";
import type { FractionPole, PartialFractions, Root } from "./partial-fractions.js";
import type { PoleIntegrals } from "./pole-integral.js";

/** How far each component of a pole or zero may be from what was meant, relative to itself: designs round them. */
const rootError = 4 * Number.EPSILON;
const nothing: Complex = Object.freeze({ re: 0, im: 0 });

/**
 * Bound on what the rounding of poles and zeros does to ½ ∫ X^(s−1) G dX, to first order. With G a product of (X + b²)^±m,
 * dG/d(b²) = ±m G/(X + b²), whose partial fractions follow from those of G: with T_m = ∫ X^(s−1)/((X+c)^m (X+b²)) dX,
 * T_m = (∫ X^(s−1)/(X+c)^m dX − T_(m−1))/(b² − c), T_0 = ∫ X^(s−1)/(X+b²) dX. For a zero the T_0 cancel and count as 0. A sharp
 * resonance well inside a band moves its integral little, one at an edge much: the derivative knows the difference.
 */
export function rootEffects(fractions: PartialFractions, index: number, integrals: readonly PoleIntegrals[]): number {
  let sum = 0;
  for (let k = 0; k < fractions.poles.length; k += 1) {
    const pole = fractions.poles[k] as FractionPole;
    const start = (integrals[k] as PoleIntegrals).values[0] as Complex;
    const whole = scaledBy(fractions.whole, start);
    sum += effectOf(pole, plus(whole, overRoot(pole, start, fractions, index, integrals)));
  }
  for (const root of fractions.zeros) sum += effectOf(root, overRoot(root, nothing, fractions, index, integrals));
  return sum;
}

function effectOf({ b, count, multiplicity }: Root, slope: Complex): number {
  const { re, im } = times(slope, b);
  return rootError * count * multiplicity * (Math.abs(re) * b.re + Math.abs(im) * b.im);
}

/** ∫ X^(s−1) G/(X + b²) dX, less what is whole. */
function overRoot(
  root: Root,
  start: Complex,
  { poles }: PartialFractions,
  index: number,
  integrals: readonly PoleIntegrals[],
): Complex {
  let sum = nothing;
  for (let j = 0; j < poles.length; j += 1) {
    const pole = poles[j] as FractionPole;
    const residues = pole.residues[index] as readonly Complex[];
    const { values } = integrals[j] as PoleIntegrals;
    if (pole === root) {
      for (let m = 0; m < residues.length; m += 1)
        sum = plus(sum, times(residues[m] as Complex, values[m + 1] as Complex));
    } else {
      const distance = squareDifference(root.b, pole.b);
      let before = start;
      for (let m = 0; m < residues.length; m += 1) {
        before = over(minus(values[m] as Complex, before), distance);
        sum = plus(sum, times(residues[m] as Complex, before));
      }
    }
    if (pole.count === 1) continue;
    const distance = squareDifference(root.b, conjugate(pole.b));
    let before = start;
    for (let m = 0; m < residues.length; m += 1) {
      before = over(minus(conjugate(values[m] as Complex), before), distance);
      sum = plus(sum, times(conjugate(residues[m] as Complex), before));
    }
  }
  return sum;
}
