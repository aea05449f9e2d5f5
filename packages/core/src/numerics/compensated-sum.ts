/** Sum of the first `count` values with Neumaier's compensation: right to an ulp where plain addition loses one a term. */
export function compensatedSum(values: ArrayLike<number>, count: number = values.length): number {
  let sum = 0;
  let lost = 0;
  for (let index = 0; index < count; index += 1) {
    const value = values[index] as number;
    const next = sum + value;
    lost += Math.abs(sum) >= Math.abs(value) ? sum - next + value : value - next + sum;
    sum = next;
  }
  return sum + lost;
}
