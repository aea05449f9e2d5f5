import { latinHypercube } from "./latin-hypercube.js";

/** Of the power about the record's mean, what may stay outside. */
const mostLeft = 1e-3;
/** Draws: 2048 hold the range of a broad band to 0.4 %; a narrow band needs more, and has few components. */
const fewestDraws = 2048;
const mostDraws = 8192;
const products = 2e7;

/**
 * Equally likely records of a Gaussian process about their mean, sample by sample, where a few components make nearly all
 * of it: noise of a narrow band, or records that are short. Undefined where more than `mostModes` are needed.
 *
 * The covariance about the record's mean follows from the structure function; Cholesky's factor with the largest remaining
 * variance first stops when 0.1 % of the power is left (Harbrecht, Peters, Schneider, Appl. Numer. Math. 62, 2012).
 *
 * @param structure - γ at the lags 0, 1, 2 ... samples.
 */
export function principalPaths(structure: Float64Array, mostModes: number): Float64Array[] | undefined {
  const shapes = principalShapes(structure, mostModes);
  if (shapes === undefined) return undefined;
  const samples = structure.length;
  const count = Math.round(Math.max(fewestDraws, Math.min(mostDraws, products / (samples * shapes.length))));
  const normals = latinHypercube(shapes.length, count);
  return Array.from({ length: count }, (_, draw) => {
    const path = new Float64Array(samples);
    for (const [mode, shape] of shapes.entries()) {
      const normal = normals[mode]?.[draw] as number;
      for (let sample = 0; sample < samples; sample += 1)
        path[sample] = (path[sample] as number) + normal * (shape[sample] as number);
    }
    return path;
  });
}

function principalShapes(structure: Float64Array, mostModes: number): Float64Array[] | undefined {
  const samples = structure.length;
  const rowMeans = rowMeansOf(structure);
  const mean = rowMeans.reduce((sum, value) => sum + value, 0) / samples;
  const left = rowMeans.map((row) => 2 * row - mean);
  const power = left.reduce((sum, value) => sum + value, 0);
  const shapes: Float64Array[] = [];
  for (let remaining = power; remaining > mostLeft * power; ) {
    if (shapes.length >= mostModes) return undefined;
    const pivot = left.indexOf(left.reduce((most, value) => Math.max(most, value), 0));
    const shape = Float64Array.from(
      rowMeans,
      (row, sample) => row + (rowMeans[pivot] as number) - mean - (structure[Math.abs(sample - pivot)] as number),
    );
    for (const known of shapes) {
      const part = known[pivot] as number;
      for (let sample = 0; sample < samples; sample += 1)
        shape[sample] = (shape[sample] as number) - part * (known[sample] as number);
    }
    const scale = 1 / Math.sqrt(left[pivot] as number);
    remaining = 0;
    for (let sample = 0; sample < samples; sample += 1) {
      shape[sample] = (shape[sample] as number) * scale;
      left[sample] = sample === pivot ? 0 : Math.max(0, (left[sample] as number) - (shape[sample] as number) ** 2);
      remaining += left[sample] as number;
    }
    shapes.push(shape);
  }
  return shapes;
}

/** Mean over the other samples of γ at their distance, sample by sample. */
function rowMeansOf(structure: Float64Array): Float64Array {
  const samples = structure.length;
  const sums = new Float64Array(samples);
  for (let lag = 1; lag < samples; lag += 1) sums[lag] = (sums[lag - 1] as number) + (structure[lag] as number);
  return Float64Array.from(sums, (sum, sample) => (sum + (sums[samples - 1 - sample] as number)) / samples);
}
