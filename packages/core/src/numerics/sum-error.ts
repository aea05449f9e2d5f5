/** What the rounded sum of two numbers leaves out: a + b = fl(a + b) + sumError(a, b) exactly (Knuth 1969). */
export function sumError(a: number, b: number): number {
  const sum = a + b;
  const fromB = sum - a;
  return a - (sum - fromB) + (b - fromB);
}
