import { backSubstitute, inverseOfSquare, triangularise } from "./householder.js";

/** Solution of a linear least-squares problem and (AᵀA)⁻¹. */
export interface LinearSolution {
  readonly solution: Float64Array;
  /** Row by row. */
  readonly inverse: Float64Array;
  /** Σ (A·solution − b)². */
  readonly sumOfSquares: number;
}

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
  const a = matrix.slice();
  const b = right.slice();
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
  const diagonal = new Float64Array(columns);
  if (!triangularise(a, b, rows, diagonal)) return undefined;
  const solution = new Float64Array(columns);
  backSubstitute(a, diagonal, b, solution);
  let sumOfSquares = 0;
  for (let r = columns; r < rows; r += 1) sumOfSquares += (b[r] as number) ** 2;
  const inverse = inverseOfSquare(a, diagonal);
  for (let c = 0; c < columns; c += 1) {
    solution[c] = (solution[c] as number) / (scale[c] as number);
    for (let k = 0; k < columns; k += 1)
      inverse[c * columns + k] = (inverse[c * columns + k] as number) / ((scale[c] as number) * (scale[k] as number));
  }
  return { solution, inverse, sumOfSquares };
}
