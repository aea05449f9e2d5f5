import { choleskyFactor } from "./cholesky-factor.js";
import { normalScore } from "./normal-quantile.js";
import { randomNumbers } from "./random-numbers.js";
import type { RecordDensity } from "./record-density.js";
import { recordPower, structureFunction } from "./structure-function.js";

const points = 48;
const draws = 2048;
const seed = 7;

/** A band is narrow where a record holds this many turns of its middle and few independent envelopes. */
const fewestTurns = 5;
const mostEnvelopes = 5;
const leastAnticorrelation = 0.97;
/** Up to so many turns the noise itself is drawn; beyond, some turn meets the envelope's maximum. */
const mostTurns = 40;
const instantsATurn = 24;

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
 * at 48 places, 2048 times, and the range is that of their turns, or twice the envelope's maximum where turns are many.
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
  const random = randomNumbers(seed);
  const normal = (): number => normalScore(Math.min(random() + 1e-10, 1 - 1e-10));
  const turns = turnsOf(Math.min(middleHz * seconds, mostTurns));
  const inPhase = new Float64Array(points);
  const quadrature = new Float64Array(points);
  return Float64Array.from({ length: draws }, () => {
    inPhase.fill(0);
    quadrature.fill(0);
    for (const shape of shapes) {
      const [one, other] = [normal(), normal()];
      for (let point = 0; point < points; point += 1) {
        inPhase[point] = (inPhase[point] as number) + one * (shape[point] as number);
        quadrature[point] = (quadrature[point] as number) + other * (shape[point] as number);
      }
    }
    return middleHz * seconds > mostTurns
      ? envelopeRange(inPhase, quadrature)
      : carrierRange(inPhase, quadrature, turns);
  }).toSorted();
}

/** Twice the largest envelope. */
function envelopeRange(inPhase: Float64Array, quadrature: Float64Array): number {
  let most = 0;
  for (let point = 0; point < points; point += 1)
    most = Math.max(most, (inPhase[point] as number) ** 2 + (quadrature[point] as number) ** 2);
  return 2 * Math.sqrt(most);
}

/** Cosine and sine of the middle frequency through a record, and where each instant lies among the places. */
interface Turns {
  readonly cosine: Float64Array;
  readonly sine: Float64Array;
}

function turnsOf(count: number): Turns {
  const instants = Math.ceil(count * instantsATurn) + 1;
  const angle = (index: number): number => (2 * Math.PI * count * index) / (instants - 1);
  return {
    cosine: Float64Array.from({ length: instants }, (_, index) => Math.cos(angle(index))),
    sine: Float64Array.from({ length: instants }, (_, index) => Math.sin(angle(index))),
  };
}

/** The range itself: of few turns the envelope's maximum need not meet one. */
function carrierRange(inPhase: Float64Array, quadrature: Float64Array, { cosine, sine }: Turns): number {
  const perInstant = (points - 1) / (cosine.length - 1);
  let [low, high] = [0, 0];
  for (let index = 0; index < cosine.length; index += 1) {
    const place = Math.min(index * perInstant, points - 1.000001);
    const at = Math.floor(place);
    const part = place - at;
    const one = (inPhase[at] as number) * (1 - part) + (inPhase[at + 1] as number) * part;
    const other = (quadrature[at] as number) * (1 - part) + (quadrature[at + 1] as number) * part;
    const value = one * (cosine[index] as number) - other * (sine[index] as number);
    if (value > high) high = value;
    else if (value < low) low = value;
  }
  return high - low;
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
