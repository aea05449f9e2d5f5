import type { ComplexHz } from "./weighting.js";

/** (1 − u²)² and (u/q)², the first by its factors so that a sharp resonance keeps its digits beside its centre. */
export function resonanceTerms(
  hz: number,
  centreHz: number,
  q: number,
): { readonly detuning: number; readonly damping: number } {
  const u = hz / centreHz;
  const off = ((centreHz - hz) / centreHz) * (1 + u);
  const loss = u / q;
  return { detuning: off * off, damping: loss * loss };
}

/** The centre, and at high q the flanks in steps of three from half a width on, so that no panel jumps over the peak. */
export function resonanceKnots(centreHz: number, q: number): number[] {
  const knots = [centreHz];
  for (let width = 0.5 / q; width < 0.4; width *= 3) knots.push(centreHz * (1 - width), centreHz * (1 + width));
  return knots;
}

/** Roots of s² + s/q + 1, in units of the centre. */
export function resonancePoles(centreHz: number, q: number): ComplexHz[] {
  const half = 0.5 / q;
  const under = (1 - half) * (1 + half);
  if (under >= 0) {
    const [re, im] = [-half * centreHz, Math.sqrt(under) * centreHz];
    return im === 0
      ? [
          { re, im },
          { re, im },
        ]
      : [
          { re, im },
          { re, im: -im },
        ];
  }
  const large = -(half + Math.sqrt(-under));
  return [
    { re: large * centreHz, im: 0 },
    { re: centreHz / large, im: 0 },
  ];
}
