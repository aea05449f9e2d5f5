import FFT from "fft.js";

/** From this many taps on a transform is faster than the sum of products. */
const longFrom = 128;

/** Σ_k taps[k]·taps[k + lag] for every lag from 0 up. */
export function autocorrelation(taps: readonly number[]): number[] {
  return taps.length < longFrom ? byProducts(taps) : byTransform(taps);
}

function byProducts(taps: readonly number[]): number[] {
  return taps.map((_, lag) => {
    let sum = 0;
    for (let k = 0; k + lag < taps.length; k += 1) sum += (taps[k] as number) * (taps[k + lag] as number);
    return sum;
  });
}

/** |transform|² of the taps with as many zeros behind, transformed back. */
function byTransform(taps: readonly number[]): number[] {
  const size = 2 ** Math.ceil(Math.log2(2 * taps.length));
  const transform = new FFT(size);
  const padded = new Float64Array(size);
  padded.set(taps);
  const spectrum = transform.createComplexArray();
  transform.realTransform(spectrum, padded);
  transform.completeSpectrum(spectrum);
  for (let k = 0; k < 2 * size; k += 2) {
    const [re, im] = [spectrum[k] as number, spectrum[k + 1] as number];
    spectrum[k] = re * re + im * im;
    spectrum[k + 1] = 0;
  }
  const back = transform.createComplexArray();
  transform.inverseTransform(back, spectrum);
  return taps.map((_, lag) => back[2 * lag] as number);
}
