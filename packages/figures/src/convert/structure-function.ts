import type { RecordDensity } from "./record-density.js";

/**
 * γ(τ) = ∫ S(f)·(1 − cos 2πfτ) df at one lag or many: half the mean square of x(t + τ) − x(t). With it nothing cancels:
 * what is slower than the record drops out instead of being subtracted.
 *
 * @param share - what of the density counts, by node; all of it unless given.
 */
export function structureFunction(
  record: RecordDensity,
  lags: readonly number[] | Float64Array,
  share?: (hz: number) => number,
): Float64Array {
  const { hz, density: whole } = record;
  const density = share === undefined ? whole : whole.map((value, index) => value * share(hz[index] as number));
  const [first = 0] = hz;
  const slow = record.slowPower * (share?.(first) ?? 1);
  const fast = record.fastPower * (share?.(Number.POSITIVE_INFINITY) ?? 1);
  return Float64Array.from(lags, (lag) =>
    lag === 0
      ? 0
      : fast + slow * oneMinusCos(2 * Math.PI * first * lag) + bandStructure(hz, density, 2 * Math.PI * lag),
  );
}

/** Power of the density, or of a share of it. */
export function recordPower(record: RecordDensity, share?: (hz: number) => number): number {
  const { hz, density } = record;
  const at = (index: number): number => (density[index] as number) * (share?.(hz[index] as number) ?? 1);
  let sum =
    record.slowPower * (share?.(hz[0] as number) ?? 1) + record.fastPower * (share?.(Number.POSITIVE_INFINITY) ?? 1);
  for (let index = 1; index < hz.length; index += 1)
    sum += (((hz[index] as number) - (hz[index - 1] as number)) * (at(index - 1) + at(index))) / 2;
  return sum;
}

/** Trapezoid where a panel holds little of a turn, Filon's exact integral of straight line times cosine where more. */
function bandStructure(hz: Float64Array, density: Float64Array, omega: number): number {
  let sum = 0;
  let from = hz[0] as number;
  let levelFrom = density[0] as number;
  let halfSineFrom = Math.sin((omega * from) / 2);
  let halfCosineFrom = Math.cos((omega * from) / 2);
  for (let index = 1; index < hz.length; index += 1) {
    const to = hz[index] as number;
    const level = density[index] as number;
    const width = to - from;
    const halfSine = Math.sin((omega * to) / 2);
    const halfCosine = Math.cos((omega * to) / 2);
    if (omega * width < 0.1) sum += width * (levelFrom * halfSineFrom * halfSineFrom + level * halfSine * halfSine);
    else {
      const swing = (2 * (level * halfSine * halfCosine - levelFrom * halfSineFrom * halfCosineFrom)) / omega;
      const turned = 2 * (halfSineFrom * halfSineFrom - halfSine * halfSine);
      sum += (width * (levelFrom + level)) / 2 - swing - ((level - levelFrom) * turned) / (width * omega * omega);
    }
    from = to;
    levelFrom = level;
    halfSineFrom = halfSine;
    halfCosineFrom = halfCosine;
  }
  return sum;
}

function oneMinusCos(angle: number): number {
  const half = Math.sin(angle / 2);
  return 2 * half * half;
}
