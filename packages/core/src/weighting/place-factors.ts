import { OutOfDomainError } from "../ground/errors.js";
import type { ComplexHz } from "./weighting.js";

/** |jf − p|²/|p|² of a real place, or |jf − p|²|jf − p̄|²/|p|⁴ of a pair. */
export type PlaceFactor = (hz: number) => number;

/**
 * The factors of |H|² that places in Hz, none of them 0, stand for; complex ones taken with their conjugates. The difference of squares in a pair
 * is formed by its factors, so that sharp resonances and notches keep their digits.
 */
export function placeFactors(what: string, places: readonly ComplexHz[]): PlaceFactor[] {
  const lower = places.filter(({ im }) => im < 0);
  const factors: PlaceFactor[] = [];
  for (const { re, im } of places) {
    if (!(Number.isFinite(re) && Number.isFinite(im)))
      throw new OutOfDomainError(`A ${what} must be a finite complex number of Hz; got ${re} and ${im}.`);
    if (im < 0) continue;
    if (im === 0) {
      factors.push(realFactor(re));
      continue;
    }
    const partner = lower.findIndex((place) => place.re === re && place.im === -im);
    if (partner < 0) throw lacking(what, re, im);
    lower.splice(partner, 1);
    factors.push(pairFactor(re, im));
  }
  const [left] = lower;
  if (left !== undefined) throw lacking(what, left.re, left.im);
  return factors;
}

function realFactor(re: number): PlaceFactor {
  return (hz) => {
    const u = hz / re;
    return 1 + u * u;
  };
}

/** ((|p| − f)(|p| + f))² + (2 Re p · f)², with |p| − f by way of im where the place is close to the axis. */
function pairFactor(re: number, im: number): PlaceFactor {
  const size = Math.hypot(re, im);
  const beyond = (re * re) / (size + im);
  return (hz) => {
    const off = ((im - hz + beyond) / size) * (1 + hz / size);
    const loss = (2 * re * (hz / size)) / size;
    return off * off + loss * loss;
  };
}

function lacking(what: string, re: number, im: number): OutOfDomainError {
  return new OutOfDomainError(
    `Every complex ${what} needs its conjugate beside it; ${re} and ${im} in Hz has none; list both.`,
  );
}
