import { choleskyFactor } from "./cholesky-factor.js";
import { latinHypercube } from "./latin-hypercube.js";

/** Paths that slow noise takes through a record, each at equally spaced points from its begin to its end. */
export interface SlowPaths {
  readonly paths: readonly Float64Array[];
  readonly points: number;
  /** Mean square about the record's mean, as the covariance has it. */
  readonly power: number;
}

/**
 * Equally likely paths of a Gaussian process about its record mean.
 *
 * The covariance of the points follows from the structure function; in cosine modes, slowest first, it is nearly diagonal,
 * and its Cholesky factor turns independent normal values into paths. The values are a Latin hypercube.
 *
 * @param structure - γ at the lags 0, 1, 2 ... between neighbouring points.
 */
export function slowPaths(structure: Float64Array, count: number): SlowPaths {
  const points = structure.length;
  const modes = cosineModes(points);
  const factor = choleskyFactor(modeCovariance(structure, modes));
  const columns = [...factor.keys()].filter((index) => (factor[index]?.[index] as number) > 0);
  const shapes = columns.map((column) => {
    const shape = new Float64Array(points);
    for (let mode = column; mode < modes.length; mode += 1) {
      const weight = factor[mode]?.[column] as number;
      const cosine = modes[mode] as Float64Array;
      for (let point = 0; point < points; point += 1)
        shape[point] = (shape[point] as number) + weight * (cosine[point] as number);
    }
    return shape;
  });
  const paths = Array.from({ length: count }, () => new Float64Array(points));
  const normals = latinHypercube(shapes.length, count);
  let power = 0;
  for (const [column, shape] of shapes.entries()) {
    for (const [index, path] of paths.entries()) {
      const normal = normals[column]?.[index] as number;
      for (let point = 0; point < points; point += 1)
        path[point] = (path[point] as number) + normal * (shape[point] as number);
    }
    for (const value of shape) power += (value * value) / points;
  }
  return { paths, points, power };
}

/** √2·cos(πk(i + ½)/points)/√points, k from 1: orthonormal, and none of them has a mean. */
function cosineModes(points: number): Float64Array[] {
  return Array.from({ length: points - 1 }, (_, index) =>
    Float64Array.from(
      { length: points },
      (_value, point) => Math.sqrt(2 / points) * Math.cos((Math.PI * (index + 1) * (point + 0.5)) / points),
    ),
  );
}

function modeCovariance(structure: Float64Array, modes: readonly Float64Array[]): Float64Array[] {
  const points = structure.length;
  const halfway = modes.map((mode) =>
    Float64Array.from({ length: points }, (_, row) => {
      let sum = 0;
      for (let point = 0; point < points; point += 1)
        sum -= (structure[Math.abs(row - point)] as number) * (mode[point] as number);
      return sum;
    }),
  );
  return modes.map((mode) =>
    Float64Array.from(halfway, (column) => {
      let sum = 0;
      for (let point = 0; point < points; point += 1) sum += (mode[point] as number) * (column[point] as number);
      return sum;
    }),
  );
}
