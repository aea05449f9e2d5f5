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
