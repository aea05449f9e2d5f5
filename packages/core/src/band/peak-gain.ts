import type { Weighting } from "../weighting/weighting.js";

const samplesBetweenKnots = 24;
const goldenSteps = 60;

/**
 * Largest power gain in a band: samples between knots (a few lobes where it has any), then golden sections around the best.
 * At a maximum the gain is flat, so half the digits of the place give all digits of the gain.
 */
export function peakGain(weighting: Weighting, [fromHz, toHz]: readonly [number, number]): number {
  const scales = [...weighting.knots, ...(weighting.lobes === undefined ? [] : lobeEdges(weighting.lobes.lobeHz))];
  const finite = [...scales, fromHz, toHz].filter((hz) => hz > 0 && hz < Number.POSITIVE_INFINITY);
  const low = fromHz === 0 ? Math.min(...finite) * 1e-3 : fromHz;
  const high = toHz === Number.POSITIVE_INFINITY ? Math.max(...finite) * 1e3 : toHz;
  const edges = [low, ...scales.filter((hz) => hz > low && hz < high).toSorted((one, other) => one - other), high];
  const grid: number[] = [];
  for (let k = 1; k < edges.length; k += 1) {
    const from = edges[k - 1] as number;
    const ratio = (edges[k] as number) / from;
    for (let step = 0; step < samplesBetweenKnots; step += 1) grid.push(from * ratio ** (step / samplesBetweenKnots));
  }
  grid.push(high);
  const gains = grid.map((hz) => weighting.powerGainAt(hz));
  const best = gains.indexOf(Math.max(...gains));
  const around = goldenMaximum(
    weighting,
    grid[Math.max(best - 1, 0)] as number,
    grid[Math.min(best + 1, grid.length - 1)] as number,
  );
  return Math.max(around, gains[best] as number, fromHz === 0 ? weighting.powerGainAt(0) : 0);
}

function lobeEdges(lobeHz: number): number[] {
  return Array.from({ length: 8 }, (_, index) => 0.5 * lobeHz * (index + 1));
}

function goldenMaximum(weighting: Weighting, low: number, high: number): number {
  const share = (Math.sqrt(5) - 1) / 2;
  let a = low;
  let b = high;
  let left = weighting.powerGainAt(b - share * (b - a));
  let right = weighting.powerGainAt(a + share * (b - a));
  for (let step = 0; step < goldenSteps; step += 1) {
    if (left > right) {
      b = a + share * (b - a);
      right = left;
      left = weighting.powerGainAt(b - share * (b - a));
    } else {
      a = b - share * (b - a);
      left = right;
      right = weighting.powerGainAt(a + share * (b - a));
    }
  }
  return Math.max(left, right);
}
