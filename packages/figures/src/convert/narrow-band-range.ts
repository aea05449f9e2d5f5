import { choleskyFactor } from "./cholesky-factor.js";
import { latinHypercube } from "./latin-hypercube.js";
import type { RecordDensity } from "./record-density.js";
import { recordPower, structureFunction } from "./structure-function.js";

const points = 48;
const draws = 2048;

/** A record holds this many turns of the band's middle, and few independent envelopes. */
const fewestTurns = 20;
const mostEnvelopes = 5;
const leastAnticorrelation = 0.97;

/** Mean frequency of a density, and the width of the flat band that would fluctuate as slowly: (∫S)²/∫S². */
function middleOf({ hz, density }: RecordDensity): { readonly middleHz: number; readonly widthHz: number } {
  let [power, moment, square] = [0, 0, 0];
  for (let index = 1; index < hz.length; index += 1) {
    const [from, to] = [hz[index - 1] as number, hz[index] as number];
    const [low, high] = [density[index - 1] as number, density[index] as number];
    power += ((to - from) * (low + high)) / 2;
    moment += ((to - from) * (low * (2 * from + to) + high * (from + 2 * to))) / 6;
    square += ((to - from) * (low * low + low * high + high * high)) / 3;
  }
  return { middleHz: moment / power, widthHz: (power * power) / square };
}

/**
 * Ranges of records of a band so narrow that its envelope hardly changes within one; undefined where it is not. Such noise
 * swings between plus and minus its envelope, of independent in-phase and quadrature parts (Rice 1944, 3.7): these are drawn
 * at 48 places, 2048 times, and some of many turns meets the envelope's maximum.
 */
export function narrowBandRanges(
  record: RecordDensity,
  seconds: number,
  anticorrelation: number,
): Float64Array | undefined {
  if (anticorrelation < leastAnticorrelation) return undefined;
  const { middleHz, widthHz } = middleOf(record);
  if (middleHz * seconds < fewestTurns || widthHz * seconds > mostEnvelopes) return undefined;
  const lags = Array.from({ length: points }, (_, lag) => (lag * seconds) / (points - 1));
  const baseband = { ...record, hz: record.hz.map((hz) => hz - middleHz), slowPower: 0, fastPower: 0 };
  const power = recordPower(baseband);
  const covariance = structureFunction(baseband, lags).map((gap) => power - gap);
  const shapes = shapesOf(covariance);
  const normals = latinHypercube(2 * shapes.length, draws);
  const inPhase = new Float64Array(points);
  const quadrature = new Float64Array(points);
  return Float64Array.from({ length: draws }, (_, draw) => {
    inPhase.fill(0);
    quadrature.fill(0);
    for (const [index, shape] of shapes.entries()) {
      const one = normals[2 * index]?.[draw] as number;
      const other = normals[2 * index + 1]?.[draw] as number;
      for (let point = 0; point < points; point += 1) {
        inPhase[point] = (inPhase[point] as number) + one * (shape[point] as number);
        quadrature[point] = (quadrature[point] as number) + other * (shape[point] as number);
      }
    }
    return envelopeRange(inPhase, quadrature);
  }).toSorted();
}

/** Twice the largest envelope. */
function envelopeRange(inPhase: Float64Array, quadrature: Float64Array): number {
  let most = 0;
  for (let point = 0; point < points; point += 1)
    most = Math.max(most, (inPhase[point] as number) ** 2 + (quadrature[point] as number) ** 2);
  return 2 * Math.sqrt(most);
}

/** Shapes whose sum, each times an independent normal value, has the covariance given by lag. */
function shapesOf(covariance: Float64Array): readonly Float64Array[] {
  // in cosine modes, slowest first, the matrix is nearly diagonal, and rounding does no harm
  const modes = Array.from({ length: points }, (_, k) =>
    Float64Array.from(
      { length: points },
      (_value, point) => Math.sqrt((k === 0 ? 1 : 2) / points) * Math.cos((Math.PI * k * (point + 0.5)) / points),
    ),
  );
  const spread = modes.map((mode) =>
    Float64Array.from({ length: points }, (_, row) =>
      mode.reduce((sum, value, point) => sum + value * (covariance[Math.abs(row - point)] as number), 0),
    ),
  );
  const factor = choleskyFactor(
    modes.map((mode) =>
      Float64Array.from(spread, (own) => mode.reduce((sum, value, row) => sum + value * (own[row] as number), 0)),
    ),
  );
  return factor.flatMap((_, column) => {
    if (factor[column]?.[column] === 0) return [];
    const shape = new Float64Array(points);
    for (let k = column; k < points; k += 1)
      for (let point = 0; point < points; point += 1)
        shape[point] = (shape[point] as number) + (factor[k]?.[column] as number) * (modes[k]?.[point] as number);
    return [shape];
  });
}
