import { sinPi } from "../numerics/sin-pi.js";
import { turnsOf } from "../numerics/turns.js";
import { wholePower } from "../numerics/whole-power.js";

/**
 * |sin(πMt)/(M sin(πt))|^(2N) for |t| ≤ ½ turns a sample: N averages of M samples in a row. M·t less its whole turns keeps the
 * digits beside the zeros.
 */
export function averageGain(turns: number, count: number, order: number): number {
  if (turns === 0) return 1;
  const quotient = sinPi(turnsOf(turns, count)) / (count * sinPi(turns));
  return wholePower(quotient * quotient, order);
}

/** The same without the numerator: what the lobes stand under. */
export function averageEnvelope(turns: number, count: number, order: number): number {
  const below = count * sinPi(turns);
  return 1 / wholePower(below * below, order);
}
