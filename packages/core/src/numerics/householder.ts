/** Columns whose rest falls below this share of their length count as dependent. */
const rankTolerance = 1e-13;

/**
 * Reduces a (row by row) to its triangle R in place by Householder's reflections (Golub, Van Loan, Matrix Computations, 5.2)
 * and applies them to b; R's diagonal goes into `diagonal`, the rest of R stands in a's upper triangle. Says whether every
 * column is independent of those before it; the triangle is complete either way.
 */
export function triangularise(a: Float64Array, b: Float64Array, rows: number, diagonal: Float64Array): boolean {
  const columns = diagonal.length;
  let full = true;
  for (let c = 0; c < columns; c += 1) {
    let above = 0;
    for (let r = 0; r < c; r += 1) above += (a[r * columns + c] as number) ** 2;
    let rest = 0;
    for (let r = c; r < rows; r += 1) rest += (a[r * columns + c] as number) ** 2;
    const norm = Math.sqrt(rest);
    if (!(norm > rankTolerance * Math.sqrt(above + rest)) || norm === Number.POSITIVE_INFINITY) full = false;
    diagonal[c] = 0;
    if (norm === 0) continue;
    const lead = a[c * columns + c] as number;
    const signed = lead > 0 ? -norm : norm;
    diagonal[c] = signed;
    a[c * columns + c] = lead - signed;
    const half = signed * (lead - signed);
    for (let k = c + 1; k < columns; k += 1) {
      let dot = 0;
      for (let r = c; r < rows; r += 1) dot += (a[r * columns + c] as number) * (a[r * columns + k] as number);
      const share = dot / half;
      for (let r = c; r < rows; r += 1)
        a[r * columns + k] = (a[r * columns + k] as number) + share * (a[r * columns + c] as number);
    }
    let dot = 0;
    for (let r = c; r < rows; r += 1) dot += (a[r * columns + c] as number) * (b[r] as number);
    const share = dot / half;
    for (let r = c; r < rows; r += 1) b[r] = (b[r] as number) + share * (a[r * columns + c] as number);
  }
  return full;
}

/** Solves R·x = b, R in a's upper triangle and `diagonal`. */
export function backSubstitute(a: Float64Array, diagonal: Float64Array, b: Float64Array, x: Float64Array): void {
  const columns = diagonal.length;
  for (let c = columns - 1; c >= 0; c -= 1) {
    let sum = b[c] as number;
    for (let k = c + 1; k < columns; k += 1) sum -= (a[c * columns + k] as number) * (x[k] as number);
    x[c] = sum / (diagonal[c] as number);
  }
}

/** (RᵀR)⁻¹ = R⁻¹R⁻ᵀ, row by row. */
export function inverseOfSquare(a: Float64Array, diagonal: Float64Array): Float64Array {
  const columns = diagonal.length;
  const upper = new Float64Array(columns * columns);
  for (let c = 0; c < columns; c += 1) {
    upper[c * columns + c] = 1 / (diagonal[c] as number);
    for (let r = c - 1; r >= 0; r -= 1) {
      let sum = 0;
      for (let k = r + 1; k <= c; k += 1) sum += (a[r * columns + k] as number) * (upper[k * columns + c] as number);
      upper[r * columns + c] = -sum / (diagonal[r] as number);
    }
  }
  const inverse = new Float64Array(columns * columns);
  for (let r = 0; r < columns; r += 1)
    for (let c = 0; c < columns; c += 1) {
      let sum = 0;
      for (let k = Math.max(r, c); k < columns; k += 1)
        sum += (upper[r * columns + k] as number) * (upper[c * columns + k] as number);
      inverse[r * columns + c] = sum;
    }
  return inverse;
}
