import type { BoundedValue } from "./bounded-value.js";
import { logRatio } from "./power-law-integral.js";
import { saturatingPart } from "./saturating-part.js";

/**
 * ∫ t^(s−1)/(1+t) dt over [from, to], 0 ≤ from < to ≤ ∞, for real s; infinite where it diverges (from = 0 needs s > 0,
 * to = ∞ needs s < 1). With to = ∞ this is the incomplete Beta integral J(s, y) behind every first-order and Butterworth
 * gain; its complement has from = 0.
 *
 * Split at t = 1; what lies above is the mirror image t → 1/t, s → 1 − s. Both parts are positive: nothing cancels.
 */
export function powerOverOnePlus(s: number, from: number, to: number): BoundedValue {
  if ((from === 0 && s <= 0) || (to === Number.POSITIVE_INFINITY && s >= 1))
    return { value: Number.POSITIVE_INFINITY, error: 0 };
  let value = 0;
  let error = 0;
  if (from < 1) {
    const high = Math.min(to, 1);
    const part = saturatingPart(s, 1, high, from === 0 ? Number.POSITIVE_INFINITY : logRatio(from, high));
    const scale = (s >= 0 ? high : from) ** s;
    value += scale * part.value;
    error += scale * part.error;
  }
  if (to > 1) {
    const low = Math.max(from, 1);
    const part = saturatingPart(
      1 - s,
      1,
      1 / low,
      to === Number.POSITIVE_INFINITY ? Number.POSITIVE_INFINITY : logRatio(low, to),
    );
    const edge = s <= 1 ? low : to;
    // not edge^(s − 1): the rounding of s − 1 counts ln(edge) times
    const scale = edge ** s / edge;
    value += scale * part.value;
    error += scale * part.error;
  }
  return { value, error: error + 2 * Number.EPSILON * value };
}
