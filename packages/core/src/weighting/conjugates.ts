import type { ComplexHz } from "./weighting.js";

/** Every place off the real axis followed by its exact conjugate; the real ones once. */
export function withConjugates(upper: readonly ComplexHz[]): ComplexHz[] {
  return upper.flatMap(({ re, im }) =>
    im === 0
      ? [{ re, im: 0 }]
      : [
          { re, im },
          { re, im: -im },
        ],
  );
}

/** Places in Hz of a prototype in units of its cutoff. */
export function atScale(hz: number, places: readonly ComplexHz[]): ComplexHz[] {
  return places.map(({ re, im }) => ({ re: re * hz, im: im * hz }));
}

/** Π|p|², which a gain of 1 at 0 Hz asks of a low-pass without zeros. */
export function squaredSize(places: readonly ComplexHz[]): number {
  return places.reduce((product, { re, im }) => product * (re * re + im * im), 1);
}
