import { withConjugates } from "./conjugates.js";
import type { ComplexHz } from "./weighting.js";

/** A centre and its flanks in steps of three from half a width on, so that no panel of an integrator jumps over the peak. */
export function flankKnots(centreHz: number, halfWidthHz: number): number[] {
  const knots = [centreHz];
  for (let away = halfWidthHz; away < 0.4 * centreHz; away *= 3) knots.push(centreHz - away, centreHz + away);
  return knots;
}

/** Knots of a resonance; of a damped one its two corners. */
export function resonanceKnots(centreHz: number, q: number): number[] {
  if (q < 0.5) return resonancePoles(centreHz, q).map(({ re }) => -re);
  return flankKnots(centreHz, (0.5 / q) * centreHz);
}

/** Roots of s² + s/q + 1, in units of the centre. */
export function resonancePoles(centreHz: number, q: number): ComplexHz[] {
  const half = 0.5 / q;
  const under = (1 - half) * (1 + half);
  if (under > 0) return withConjugates([{ re: -half * centreHz, im: Math.sqrt(under) * centreHz }]);
  const large = -(half + Math.sqrt(-under));
  return [
    { re: large * centreHz, im: 0 },
    { re: centreHz / large, im: 0 },
  ];
}

/** 1 − u², u = f/centre, by its factors, so that a sharp resonance keeps its digits beside its centre. */
export function detuning(hz: number, centreHz: number): number {
  return ((centreHz - hz) / centreHz) * (1 + hz / centreHz);
}
