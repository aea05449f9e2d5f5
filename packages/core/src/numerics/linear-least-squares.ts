/** Solution of a linear least-squares problem and (AᵀA)⁻¹. */
export interface LinearSolution {
  readonly solution: Float64Array;
  /** Row by row. */
  readonly inverse: Float64Array;
  /** Σ (A·solution − b)². */
  readonly sumOfSquares: number;
}

/** Columns whose rest falls below this share of their length count as dependent. */
const rankTolerance = 1e-13;

/**
 * min |A·x − b|² by Householder QR with columns scaled to unit length (Golub, Van Loan, Matrix Computations, 5.3), A row by
 * row with the given number of columns. Undefined where A has not full column rank.
 */
export function linearLeastSquares(
  matrix: Float64Array,
  right: Float64Array,
  columns: number,
): LinearSolution | undefined {
  const rows = right.length;
  if (rows < columns) return undefined;
  const a = Float64Array.from(matrix);
  const b = Float64Array.from(right);
  const scale = new Float64Array(columns);
  for (let c = 0; c < columns; c += 1) {
    let largest = 0;
    for (let r = 0; r < rows; r += 1) largest = Math.max(largest, Math.abs(a[r * columns + c] as number));
    if (!(largest > 0) || !Number.isFinite(largest)) return undefined;
    let sum = 0;
    for (let r = 0; r < rows; r += 1) sum += ((a[r * columns + c] as number) / largest) ** 2;
    scale[c] = largest * Math.sqrt(sum);
    for (let r = 0; r < rows; r += 1) a[r * columns + c] = (a[r * columns + c] as number) / (scale[c] as number);
  }
  const diagonal = triangularise(a, b, rows, columns);
  if (diagonal === undefined) return undefined;
  const solution = new Float64Array(columns);
  for (let c = columns - 1; c >= 0; c -= 1) {
    let sum = b[c] as number;
    for (let k = c + 1; k < columns; k += 1) sum -= (a[c * columns + k] as number) * (solution[k] as number);
    solution[c] = sum / (diagonal[c] as number);
  }
  let sumOfSquares = 0;
  for (let r = columns; r < rows; r += 1) sumOfSquares += (b[r] as number) ** 2;
  const inverse = inverseFrom(a, diagonal, columns);
  for (let c = 0; c < columns; c += 1) {
    solution[c] = (solution[c] as number) / (scale[c] as number);
    for (let k = 0; k < columns; k += 1)
      inverse[c * columns + k] = (inverse[c * columns + k] as number) / ((scale[c] as number) * (scale[k] as number));
  }
  return { solution, inverse, sumOfSquares };
}

/** Reduces A to R in place, applies the same reflections to b, and returns R's diagonal. */
function triangularise(a: Float64Array, b: Float64Array, rows: number, columns: number): Float64Array | undefined {
  const diagonal = new Float64Array(columns);
  for (let c = 0; c < columns; c += 1) {
    let norm = 0;
    for (let r = c; r < rows; r += 1) norm += (a[r * columns + c] as number) ** 2;
    norm = Math.sqrt(norm);
    if (!(norm > rankTolerance)) return undefined;
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
  return diagonal;
}

/** (RᵀR)⁻¹ = R⁻¹R⁻ᵀ. */
function inverseFrom(a: Float64Array, diagonal: Float64Array, columns: number): Float64Array {
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
