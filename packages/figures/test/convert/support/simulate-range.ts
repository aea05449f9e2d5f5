/** What a simulated range is made of: a one-sided power density, already weighted, and a recorder. */
export interface SimulatedRecorder {
  /** unit²/Hz at f > 0; 0 outside the band. */
  readonly densityAt: (hz: number) => number;
  readonly recordSeconds: number;
  readonly sampleRateHz: number;
  /** Samples of one long series, a power of two; two series come out of each transform. */
  readonly length: number;
  readonly transforms: number;
  readonly seed: number;
  /** Hz above which density still folds down; half the sample rate unless given. */
  readonly reachHz?: number;
}

/** Mean and standard deviation of the simulated ranges, in the signal's unit, and how many there were. */
export interface SimulatedRange {
  readonly mean: number;
  readonly standardDeviation: number;
  readonly records: number;
  readonly ranges: readonly number[];
}

/**
 * Gaussian noise by inverse transform of independent complex normal values with the density folded to half the sample
 * rate, over many record lengths; records cut from it one after the other. Real and imaginary part are independent series.
 */
export function simulateRange(recorder: SimulatedRecorder): SimulatedRange {
  const { recordSeconds, sampleRateHz, length, transforms } = recorder;
  const samples = Math.round(recordSeconds * sampleRateHz);
  const amplitude = foldedAmplitudes(recorder);
  const normal = normalValues(recorder.seed);
  const real = new Float64Array(length);
  const imaginary = new Float64Array(length);
  const ranges: number[] = [];
  let count = 0;
  let mean = 0;
  let squares = 0;
  for (let transform = 0; transform < transforms; transform += 1) {
    for (let bin = 0; bin < length; bin += 1) {
      const scale = amplitude[Math.min(bin, length - bin)] as number;
      real[bin] = scale * normal();
      imaginary[bin] = scale * normal();
    }
    transformInPlace(real, imaginary);
    for (const series of [real, imaginary])
      for (let from = 0; from + samples <= length; from += samples) {
        let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
        for (let index = from; index < from + samples; index += 1) {
          const value = series[index] as number;
          if (value < low) low = value;
          if (value > high) high = value;
        }
        ranges.push(high - low);
        count += 1;
        const off = high - low - mean;
        mean += off / count;
        squares += off * (high - low - mean);
      }
  }
  return { mean, standardDeviation: Math.sqrt(squares / count), records: count, ranges };
}

/** Amplitude of each complex bin: real part and imaginary part of the series each get S(f)·Δf over both signs of f. */
function foldedAmplitudes({
  densityAt,
  sampleRateHz,
  length,
  reachHz = sampleRateHz / 2,
}: SimulatedRecorder): Float64Array {
  const spacing = sampleRateHz / length;
  return Float64Array.from({ length: length / 2 + 1 }, (_, bin) => {
    if (bin === 0) return 0;
    const hz = bin * spacing;
    let density = densityAt(hz);
    for (let image = sampleRateHz; image - hz <= reachHz; image += sampleRateHz)
      density += densityAt(image - hz) + densityAt(image + hz);
    return Math.sqrt((density * spacing) / 2);
  });
}

/** Standard normal values by Box and Muller on a 32-bit mixing generator. */
function normalValues(seed: number): () => number {
  let state = seed | 0;
  let spare = Number.NaN;
  const uniform = (): number => {
    state = (state + 0x9e3779b9) | 0;
    let mixed = Math.imul(state ^ (state >>> 16), 0x21f0aaad);
    mixed = Math.imul(mixed ^ (mixed >>> 15), 0x735a2d97);
    return ((mixed ^ (mixed >>> 15)) >>> 0) / 4294967296;
  };
  return () => {
    if (!Number.isNaN(spare)) {
      const kept = spare;
      spare = Number.NaN;
      return kept;
    }
    const radius = Math.sqrt(-2 * Math.log(1 - uniform()));
    const angle = 2 * Math.PI * uniform();
    spare = radius * Math.sin(angle);
    return radius * Math.cos(angle);
  };
}

/** Radix-2 transform, Σ x_k·exp(2πi jk/n), unscaled. */
function transformInPlace(real: Float64Array, imaginary: Float64Array): void {
  const length = real.length;
  for (let index = 1, mirrored = 0; index < length; index += 1) {
    let bit = length >> 1;
    for (; (mirrored & bit) !== 0; bit >>= 1) mirrored ^= bit;
    mirrored |= bit;
    if (index < mirrored) {
      [real[index], real[mirrored]] = [real[mirrored] as number, real[index] as number];
      [imaginary[index], imaginary[mirrored]] = [imaginary[mirrored] as number, imaginary[index] as number];
    }
  }
  const cosines = Float64Array.from({ length: length / 2 }, (_, index) => Math.cos((2 * Math.PI * index) / length));
  const sines = Float64Array.from({ length: length / 2 }, (_, index) => Math.sin((2 * Math.PI * index) / length));
  for (let half = 1; half < length; half *= 2) {
    const stride = length / (2 * half);
    for (let start = 0; start < length; start += 2 * half)
      for (let index = 0, turn = 0; index < half; index += 1, turn += stride) {
        const upper = start + index;
        const lower = upper + half;
        const c = cosines[turn] as number;
        const s = sines[turn] as number;
        const re = (real[lower] as number) * c - (imaginary[lower] as number) * s;
        const im = (real[lower] as number) * s + (imaginary[lower] as number) * c;
        real[lower] = (real[upper] as number) - re;
        imaginary[lower] = (imaginary[upper] as number) - im;
        real[upper] = (real[upper] as number) + re;
        imaginary[upper] = (imaginary[upper] as number) + im;
      }
  }
}
