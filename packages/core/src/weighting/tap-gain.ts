/**
 * |Σ c_k e^(−2πik r)|², r in turns per sample. Sums that vanish at 0 Hz are divided by (1 − z⁻¹) beforehand, as often as they
 * vanish exactly, so that a difference of samples keeps its digits near 0 Hz.
 */
export interface TapGain {
  /** How often the taps vanish at 0 Hz: the gain goes as r^(2·zerosAtDc). */
  readonly zerosAtDc: number;
  powerAt(turns: number): number;
}

export function tapGain(taps: readonly number[]): TapGain {
  let rest = [...taps];
  let zerosAtDc = 0;
  for (;;) {
    const running = runningSums(rest);
    if (running.at(-1) !== 0 || rest.length < 2) break;
    rest = running.slice(0, -1);
    zerosAtDc += 1;
  }
  return {
    zerosAtDc,
    powerAt(turns: number): number {
      const [cosine, sine] = [Math.cos(2 * Math.PI * turns), Math.sin(2 * Math.PI * turns)];
      let re = 0;
      let im = 0;
      for (let k = rest.length - 1; k >= 0; k -= 1)
        [re, im] = [re * cosine + im * sine + (rest[k] as number), im * cosine - re * sine];
      const step = 2 * Math.sin(Math.PI * turns);
      let power = re * re + im * im;
      for (let k = 0; k < zerosAtDc; k += 1) power *= step * step;
      return power;
    },
  };
}

function runningSums(values: readonly number[]): number[] {
  let sum = 0;
  return values.map((value) => {
    sum += value;
    return sum;
  });
}
