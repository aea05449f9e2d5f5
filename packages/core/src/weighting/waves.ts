import type { LobedPart, Wave } from "./weighting.js";

/** A wave of no delay: a constant. */
export function steady(value: number): Wave {
  return { seconds: 0, cosine: value, sine: 0 };
}

/** cosine · cos(2π f seconds) + sine · sin(2π f seconds). */
export function wave(seconds: number, cosine: number, sine = 0): Wave {
  return { seconds, cosine, sine };
}

/** sin^(2N)(π f T) = 2^(−2N)·(C(2N, N) + 2 Σ_k (−1)^k C(2N, N − k) cos(2π k f T)). */
export function evenSinePower(order: number, seconds: number): Wave[] {
  const scale = 4 ** -order;
  let binomial = 1;
  for (let k = 1; k <= order; k += 1) binomial = (binomial * (order + k)) / k;
  const waves = [steady(scale * binomial)];
  for (let k = 1; k <= order; k += 1) {
    binomial = (binomial * (order - k + 1)) / (order + k);
    waves.push(wave(k * seconds, 2 * scale * binomial * (k % 2 === 0 ? 1 : -1)));
  }
  return waves;
}

/** Product of two sums of waves: Re(A e^ia)·Re(B e^ib) = ½ Re(AB e^i(a+b)) + ½ Re(AB* e^i(a−b)); equal delays are merged. */
export function multiplyWaves(one: readonly Wave[], other: readonly Wave[]): Wave[] {
  const products: Wave[] = [];
  for (const a of one)
    for (const b of other) {
      const [cc, ss] = [0.5 * a.cosine * b.cosine, 0.5 * a.sine * b.sine];
      const [cs, sc] = [0.5 * a.cosine * b.sine, 0.5 * a.sine * b.cosine];
      products.push(wave(a.seconds + b.seconds, cc - ss, cs + sc));
      const later = a.seconds >= b.seconds;
      products.push(wave(Math.abs(a.seconds - b.seconds), cc + ss, later ? sc - cs : cs - sc));
    }
  return merged(products.toSorted((a, b) => a.seconds - b.seconds));
}

/** Neighbours in delay become one where only the rounding of their sums tells them apart. */
function merged(ascending: readonly Wave[]): Wave[] {
  const same = 4 * Number.EPSILON * (ascending.at(-1)?.seconds ?? 0);
  const waves: Wave[] = [];
  for (const { seconds, cosine, sine } of ascending) {
    const last = waves.at(-1);
    if (last === undefined || seconds - last.seconds > same)
      waves.push(wave(seconds <= same ? 0 : seconds, cosine, seconds <= same ? 0 : sine));
    else waves[waves.length - 1] = wave(last.seconds, last.cosine + cosine, last.seconds === 0 ? 0 : last.sine + sine);
  }
  return waves;
}

/** Product of two lists of parts. */
export function multiplyParts(one: readonly LobedPart[], other: readonly LobedPart[]): LobedPart[] {
  return one.flatMap((a) =>
    other.map((b) => ({
      envelopeAt: (hz: number) => a.envelopeAt(hz) * b.envelopeAt(hz),
      waves: multiplyWaves(a.waves, b.waves),
    })),
  );
}
