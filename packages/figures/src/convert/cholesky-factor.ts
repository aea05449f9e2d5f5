/** Lower factor; modes without power of their own beyond rounding get a zero column. */
export function choleskyFactor(covariance: readonly Float64Array[]): Float64Array[] {
  const size = covariance.length;
  const factor = covariance.map(() => new Float64Array(size));
  const least = 1e-7 * covariance.reduce((sum, row, index) => sum + (row[index] as number), 0);
  for (let column = 0; column < size; column += 1) {
    const own = factor[column] as Float64Array;
    let pivot = covariance[column]?.[column] as number;
    for (let k = 0; k < column; k += 1) pivot -= (own[k] as number) ** 2;
    if (pivot <= least) continue;
    own[column] = Math.sqrt(pivot);
    for (let row = column + 1; row < size; row += 1) {
      const other = factor[row] as Float64Array;
      let sum = covariance[row]?.[column] as number;
      for (let k = 0; k < column; k += 1) sum -= (own[k] as number) * (other[k] as number);
      other[column] = sum / (own[column] as number);
    }
  }
  return factor;
}
