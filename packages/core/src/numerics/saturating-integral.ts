import type { BoundedValue } from "./bounded-value.js";
import type { PowerLawTerm } from "./power-law.js";
import { logRatio } from "./power-law-integral.js";
import { saturatingPart } from "./saturating-part.js";
import { wholePower } from "./whole-power.js";

/** u^(2·numeratorOrder) / (1 + u^(2·order)), u = x/cutoff: first-order and Butterworth power gains. */
export interface Saturation {
  readonly cutoff: number;
  readonly order: number;
  readonly numeratorOrder: number;
}

/**
 * ∫ level · (x/at)^(−a) · u^(2m)/(1 + u^(2n)) dx over [from, to], u = x/cutoff, 0 ≤ from < to ≤ ∞, with a bound on its absolute
 * error; undefined where it diverges or leaves the range of doubles.
 *
 * The band is split at the cutoff. Below it 1/(1 + u^(2n)) is near 1, above it is u^(−2n)/(1 + u^(−2n)), which is the
 * same integral in 1/u; see {@link saturatingPart}. Each part is taken relative to the integrand at the edge that holds
 * most of it, so deep stop bands, steep exponents and far edges neither overflow nor lose digits.
 */
export function saturatingIntegral(
  term: PowerLawTerm,
  gain: Saturation,
  from: number,
  to: number,
): BoundedValue | undefined {
  if (term.level === 0) return { value: 0, error: 0 };
  const { cutoff, order, numeratorOrder } = gain;
  // Exact where they nearly vanish, which is where the width multiplies what they lost.
  const rise = 2 * numeratorOrder + 1 - term.exponent;
  const fall = term.exponent - (2 * (numeratorOrder - order) + 1);
  let value = 0;
  let error = 0;
  if (from < cutoff) {
    if (from === 0 && rise <= 0) return undefined;
    const high = Math.min(to, cutoff);
    const part = partOf(rise, order, high / cutoff, from === 0 ? Number.POSITIVE_INFINITY : logRatio(from, high));
    const edge = rise >= 0 ? high : from;
    const size = sizeAt(term, edge, edge / cutoff, 2 * numeratorOrder);
    value += size.value * part.value;
    error += size.value * part.error + size.error * part.value;
  }
  if (to > cutoff) {
    if (to === Number.POSITIVE_INFINITY && fall <= 0) return undefined;
    const low = Math.max(from, cutoff);
    const part = partOf(fall, order, cutoff / low, to === Number.POSITIVE_INFINITY ? to : logRatio(low, to));
    const edge = fall >= 0 ? low : to;
    const size = sizeAt(term, edge, cutoff / edge, 2 * (order - numeratorOrder));
    value += size.value * part.value;
    error += size.value * part.error + size.error * part.value;
  }
  return regular(value) ? { value, error } : undefined;
}

function partOf(lead: number, order: number, u: number, width: number): BoundedValue {
  const top = wholePower(u, 2 * order);
  const { value, error } = saturatingPart(lead, 2 * order, top, width);
  // top carries the rounding of u, 2n times, and of its own products
  return { value, error: error + (value * Number.EPSILON * (2 * order + 2) * top) / (1 + top) };
}

/** S(x)·x·u^count with its error: the power law's, as in powerLawIntegralError, and a rounding per factor u. */
function sizeAt({ at, level, exponent }: PowerLawTerm, x: number, u: number, count: number): BoundedValue {
  const reach = x === at ? 0 : Math.log(x / at);
  const power = exponent === 0 || x === at ? 1 : (x / at) ** -exponent;
  const gain = wholePower(u, count);
  const value = level * power * x * gain;
  const relative = 4 + Math.abs(exponent) * (1 + 4 * Math.abs(reach)) + count;
  if (regular(power) && regular(gain) && regular(value) && regular(level * power))
    return { value, error: Number.EPSILON * relative * value };
  // A factor leaves the range of doubles although the product may not.
  const logs = [Math.log(level), -exponent * reach, Math.log(x), count * Math.log(u)];
  const sum = logs.reduce((total, log) => total + log, 0);
  const lost = logs.reduce((total, log) => total + Math.abs(log), 0);
  const combined = Math.exp(sum);
  return { value: combined, error: Number.EPSILON * (relative + 2 * lost) * combined };
}

function regular(size: number): boolean {
  return size > 1e-290 && size < 1e290;
}
