import { productError } from "../numerics/product-error.js";
import { sinPi } from "../numerics/sin-pi.js";
import { sumError } from "../numerics/sum-error.js";

/**
 * |Σ c_k e^(−2πik r)|², r in turns per sample. Sums that vanish at 0 Hz are divided by (1 − z⁻¹) beforehand, as often as they
 * vanish exactly, so that a difference of samples keeps its digits near 0 Hz.
 */
export interface TapGain {
  /** How often the taps vanish at 0 Hz: the gain goes as r^(2·zerosAtDc). */
  readonly zerosAtDc: number;
  /** For |turns| ≤ ½. */
  powerAt(turns: number): number;
}

export function tapGain(taps: readonly number[]): TapGain {
  let rest = [...taps];
  let zerosAtDc = 0;
  for (;;) {
    const running = runningSums(rest);
    if (running.at(-1) !== 0 || rest.length < 2) break;
    rest = running.slice(0, -1);
    zerosAtDc += 1;
  }
  const straight = Float64Array.from(rest);
  const alternating = straight.map((value, k) => (k % 2 === 0 ? value : -value));
  const size = straight.reduce((sum, value) => sum + Math.abs(value), 0);
  return {
    zerosAtDc,
    powerAt(turns: number): number {
      // Near half the rate z⁻¹ is near −1: the taps change signs in turn and the distance is counted from there.
      const near = Math.abs(turns) <= 0.25;
      const values = near ? straight : alternating;
      const distance = near ? turns : turns > 0 ? turns - 0.5 : turns + 0.5;
      const half = sinPi(distance);
      const wRe = 2 * half * half;
      const wIm = Math.sin(2 * Math.PI * distance);
      let power = plainPower(values, wRe, wIm);
      // What cancels to less than a quarter is summed again with the errors of every step.
      if (power < size * size * 0.0625) power = carefulPower(values, wRe, wIm);
      const step = 2 * sinPi(turns);
      for (let k = 0; k < zerosAtDc; k += 1) power *= step * step;
      return power;
    },
  };
}

/** |Σ c_k z^k|² by Horner in z = 1 − w: w = 1 − e^(−2πi·turns) without its cancellation, where |z| itself would round. */
function plainPower(taps: Float64Array, wRe: number, wIm: number): number {
  let re = 0;
  let im = 0;
  for (let k = taps.length - 1; k >= 0; k -= 1) {
    const next = re - (re * wRe - im * wIm) + (taps[k] as number);
    im -= re * wIm + im * wRe;
    re = next;
  }
  return re * re + im * im;
}

/**
 * The same with the rounding errors of every product and sum carried through a second recurrence: as if in twice the digits
 * (Graillat, Langlois, Louvet: Compensated Horner scheme, 2005). A pole a part in 1e9 inside the unit circle keeps fifteen
 * digits at 0 Hz, and so does a stop band of −200 dB.
 */
function carefulPower(taps: Float64Array, wRe: number, wIm: number): number {
  let re = 0;
  let im = 0;
  let lostRe = 0;
  let lostIm = 0;
  for (let k = taps.length - 1; k >= 0; k -= 1) {
    const rr = re * wRe;
    const ii = im * wIm;
    const ri = re * wIm;
    const ir = im * wRe;
    const byRe = rr - ii;
    const byIm = ri + ir;
    const less = re - byRe;
    const tap = taps[k] as number;
    const errorRe =
      productError(im, wIm) - productError(re, wRe) - sumError(rr, -ii) + sumError(re, -byRe) + sumError(less, tap);
    const errorIm = -productError(re, wIm) - productError(im, wRe) - sumError(ri, ir) + sumError(im, -byIm);
    const nextLost = lostRe - (lostRe * wRe - lostIm * wIm) + errorRe;
    lostIm = lostIm - (lostRe * wIm + lostIm * wRe) + errorIm;
    lostRe = nextLost;
    re = less + tap;
    im -= byIm;
  }
  const sumRe = re + lostRe;
  const sumIm = im + lostIm;
  return sumRe * sumRe + sumIm * sumIm;
}

function runningSums(values: readonly number[]): number[] {
  let sum = 0;
  return values.map((value) => {
    sum += value;
    return sum;
  });
}
