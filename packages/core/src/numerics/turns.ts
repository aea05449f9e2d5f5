const splitter = 2 ** 27 + 1;

/** What the rounded product of two numbers leaves out: a·b = fl(a·b) + productError(a, b) exactly (Dekker 1971). */
export function productError(a: number, b: number): number {
  const product = a * b;
  const aHigh = splitter * a - (splitter * a - a);
  const bHigh = splitter * b - (splitter * b - b);
  const aLow = a - aHigh;
  const bLow = b - bHigh;
  return aLow * bLow - (product - aHigh * bHigh - aLow * bHigh - aHigh * bLow);
}

/**
 * a·b less its nearest whole number, in [−½, ½], right to an ulp of itself: phases of 1e9 turns keep their digits, where
 * the plain product has lost nine of them.
 */
export function turnsOf(a: number, b: number): number {
  const product = a * b;
  return product - Math.round(product) + productError(a, b);
}

/** sin(π·x) for |x| ≤ ½ and whole multiples added, without losing digits to π. */
export function sinPi(x: number): number {
  const whole = Math.round(x);
  const sine = Math.sin(Math.PI * (x - whole));
  return whole % 2 === 0 ? sine : -sine;
}

/** (sin(π·x)/(π·x))² for any x, given as turns and its nearest whole number's rest. */
export function sincSquared(x: number, rest: number): number {
  if (x === 0) return 1;
  const ratio = Math.sin(Math.PI * rest) / (Math.PI * x);
  return ratio * ratio;
}
