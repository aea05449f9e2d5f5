import { normalTail } from "./normal-tail.js";
import { pairCrossing } from "./pair-crossing.js";

/** A stationary, sampled Gaussian process as its up-crossings see it. */
export interface SampledNoise {
  /** Samples in the record, at least 2. */
  readonly samples: number;
  /** Whole lags, ascending from 1, spaced geometrically once they are many. */
  readonly lags: readonly number[];
  /** 1 − correlation at the lags. */
  readonly gaps: Float64Array;
  /** Share of this process in the power a record shows about its mean: 1 when nothing slower moves the level. */
  readonly share: number;
}

/** Minus the logarithm of the chance that a record of the process stays below a level, by level. */
export interface CrossingHazard {
  /** For the steps of the whole record, levels from `lowestLevel` up by `levelStep`. */
  readonly table: Float64Array;
  /** −ln Φ at the same levels: that the record does not begin above. */
  readonly start: Float64Array;
  /** Level above which a record of pure noise goes once in a thousand. */
  readonly top: number;
  /** Largest anticorrelation, 0 to 1: near 1 the noise is an oscillation, and minima follow maxima. */
  readonly anticorrelation: number;
}

export const lowestLevel = -5;
export const levelStep: number = 1 / 32;
const highestLevel = 12;
const levels = (highestLevel - lowestLevel) / levelStep + 1;

/**
 * Up-crossings as a Poisson process (Rice 1944/45), with what a finite rate, a finite record and roughness do to it:
 *
 * - the chance to cross in one step is that of two samples, exactly, so white samples give Φ(z)^N exactly and rough noise
 *   (one RC pole) its finite rate; given that the record is below, it is divided by Φ(z) less a dead time;
 * - crossings come in clumps: the rate is divided by the mean number in a clump, taken from the time the process stays
 *   about a level, Σ P(x_k > z | x_0 > z). See docs/method.md for how well this holds.
 */
export function crossingHazard(noise: SampledNoise): CrossingHazard {
  const { samples, gaps, share } = noise;
  const crossing = pairCrossing(gaps[0] as number);
  const anticorrelation = Math.max(0, gaps.reduce((most, gap) => Math.max(most, gap), 0) - 1);
  const smooth = Math.max(0, 1 - 4 * crossing(0));
  const deadTime = (0.15 * smooth * share) / (share + 0.15);
  const thinning = clumpThinning(noise, anticorrelation);
  const table = new Float64Array(levels);
  const start = new Float64Array(levels);
  let top = highestLevel;
  for (let index = levels - 1; index >= 0; index -= 1) {
    const z = lowestLevel + index * levelStep;
    const below = normalTail(-z);
    const ready = Math.max(below - deadTime * Math.exp((-z * z) / 2), below / 5);
    const chance = Math.min(crossing(z) / ready, 1 - 1e-12);
    const clump = Math.max(0, Math.min(thinning.length - 1.001, z / thinningStep));
    const at = Math.floor(clump);
    const thin = (thinning[at] as number) * (1 - clump + at) + (thinning[at + 1] as number) * (clump - at);
    table[index] = -(samples - 1) * Math.log1p(-chance) * thin;
    start[index] = z > 0 ? -Math.log1p(-normalTail(z)) : -Math.log(below);
    if ((table[index] as number) + (start[index] as number) < 1e-3) top = z;
  }
  return { table, start, top, anticorrelation };
}

const singleEvenness = Math.PI / 4;
const smoothEvenness = 0.6;
const roughEvenness = 0.36;
const thinningStep = 0.5;
const thinningLevels = 18;

/**
 * One over the mean number of up-crossings in a clump, at levels 0, ½, 1 ...
 *
 * y is the mean stay above a level, seen from a sample above it, over the stay a smooth process would have (4/π times the
 * mean stay of one crossing). Clumps of noise with power at many scales differ so much in size that their mean number
 * grows only as y^0.45 (found by simulation of eight kinds of spectra, ± 10 % of the rate, 1 % of the range); those of a
 * narrow band are alike and it grows as y.
 */
function clumpThinning(noise: SampledNoise, anticorrelation: number): Float64Array {
  const { samples, lags, gaps } = noise;
  const exponent = 0.45 + 0.55 * anticorrelation ** 16;
  const levelsUp = Array.from({ length: thinningLevels }, (_, level) => level * thinningStep);
  const tails = Float64Array.from(levelsUp, normalTail);
  const stays = new Float64Array(thinningLevels).fill(1);
  for (const [index, lag] of lags.entries()) {
    const before = index === 0 ? 0 : (lags[index - 1] as number);
    const width = ((lags[index + 1] ?? lag + 1) - before) * (1 - lag / samples);
    const crossing = pairCrossing(gaps[index] as number);
    for (const [level, z] of levelsUp.entries()) {
      const tail = tails[level] as number;
      const excess = 1 - crossing(z) / tail - tail;
      if (excess > 0) stays[level] = (stays[level] as number) + width * excess;
    }
  }
  const single = pairCrossing(gaps[0] as number);
  const evenness = clumpEvenness(noise, anticorrelation);
  return stays.map((stay, level) => {
    const crossings = (stay * single(levelsUp[level] as number)) / (tails[level] as number);
    return Math.max(1, crossings * evenness) ** -exponent;
  });
}

/**
 * Square of the mean stay of a clump over its mean square, at high levels: π/4 where the envelope is smooth and its
 * excursions are parabolas, 1/4 where it is rough (a resonance: its envelope wanders as one RC pole does). At the levels that
 * records reach, simulation finds 0.6 and 0.36. Which of them shows in the power of time with which the correlation falls from
 * crest to crest: nearly 2, or 1.
 */
function clumpEvenness({ gaps }: SampledNoise, anticorrelation: number): number {
  const [first, second, , fourth] = crestGaps(gaps);
  if (first === undefined || second === undefined || fourth === undefined) return singleEvenness;
  const power = Math.log2(Math.max(1, (fourth - second) / (second - first)));
  const rough = Math.max(0, Math.min(1, (1.6 - power) / 0.6));
  const narrow = smoothEvenness * (roughEvenness / smoothEvenness) ** rough;
  return singleEvenness * (narrow / singleEvenness) ** (anticorrelation ** 16);
}

/** 1 − correlation at its first four crests, each the vertex of the parabola through three lags. */
function crestGaps(gaps: Float64Array): number[] {
  const crests: number[] = [];
  for (let index = 1; index + 1 < gaps.length && crests.length < 4; index += 1) {
    const [before, here, after] = [gaps[index - 1] as number, gaps[index] as number, gaps[index + 1] as number];
    if (here >= before || here > after) continue;
    crests.push(here - (after - before) ** 2 / (8 * (before + after - 2 * here)));
  }
  return crests;
}
