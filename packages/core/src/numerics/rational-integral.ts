import type { BoundedValue } from "./bounded-value.js";
import { type Complex, sizeOf, times } from "./complex.js";
import type { FractionPole, PartialFractions, Residue } from "./partial-fractions.js";
import { type PoleIntegrals, poleIntegrals } from "./pole-integral.js";
import { poleStretch } from "./pole-stretch.js";
import type { PowerLawTerm } from "./power-law.js";
import { logRatio, powerLawIntegral } from "./power-law-integral.js";
import { rootEffects } from "./root-effects.js";

/** Largest relative error that counts as well conditioned. */
const mostError = 1e-13;

/**
 * ∫ level · (x/at)^(−a) · |H|² dx over [from, to], 0 ≤ from < to ≤ ∞, for a rational power gain given by its
 * {@link PartialFractions}, with a bound on its absolute error; undefined where that would be above 1e-13 of the value
 * (clustered poles, narrow bands, an edge on a sharp resonance, steep exponents): there the adaptive integrator is the better route.
 *
 * With X = x², s = z − i + (1−a)/2, ∫ x^(−a) X^(z−i)/(X + c) dx = ½ ∫ X^(s−1)/(X + c) dX: `poleIntegrals`. Every i with residues
 * is exact. Below all poles, where the gain goes as X^z, i = 0 does not cancel; above them the largest i; in between the
 * one whose s is nearest ½.
 *
 * The error adds the roundings of every part, as absolute values, so it knows what they cancel; the derivatives of the
 * result with respect to poles and zeros times their rounding; and the roundings of gain and term.
 */
export function rationalIntegral(
  term: PowerLawTerm,
  fractions: PartialFractions,
  from: number,
  to: number,
): BoundedValue | undefined {
  if (term.level === 0) return { value: 0, error: 0 };
  const first = indexFor(fractions, term.exponent, from / fractions.unit, to / fractions.unit);
  if (first === "split") return sumOfTwo(term, fractions);
  if (first === undefined) return undefined;
  // Among poles decades apart the next smaller index often cancels less.
  return (
    withIndex(term, fractions, first, [from, to]) ??
    (first > 0 && to < Number.POSITIVE_INFINITY ? withIndex(term, fractions, first - 1, [from, to]) : undefined)
  );
}

function withIndex(
  term: PowerLawTerm,
  fractions: PartialFractions,
  index: number,
  [from, to]: readonly [number, number],
): BoundedValue | undefined {
  const { unit, zerosAtOrigin, whole } = fractions;
  const lead = 0.5 * (2 * (zerosAtOrigin - index) + 1 - term.exponent);
  const sum = sumOverPoles(fractions, index, lead, [from, to]);
  if (sum === undefined) return undefined;
  let { value, error } = sum;
  if (whole > 0) {
    const exponent = term.exponent - 2 * zerosAtOrigin;
    const direct = powerLawIntegral({ at: 1, level: whole, exponent }, from / unit, to / unit);
    value += direct;
    error += 8 * Number.EPSILON * direct;
  }
  const scale = levelAtUnit(term, unit) * unit;
  const relative = error / value + termError(term, lead, unit, [from, to]) + (polesOf(fractions) + 4) * Number.EPSILON;
  const total = scale * value;
  if (!(relative <= mostError && total > 1e-290 && total < 1e300)) return undefined;
  return { value: total, error: total * relative };
}

/** From 0 to ∞ with an exponent near an odd number every index has a divergent half: each half gets its own. */
function sumOfTwo(term: PowerLawTerm, fractions: PartialFractions): BoundedValue | undefined {
  const below = rationalIntegral(term, fractions, 0, fractions.unit);
  const above = rationalIntegral(term, fractions, fractions.unit, Number.POSITIVE_INFINITY);
  return below && above && { value: below.value + above.value, error: below.error + above.error };
}

/** ½ Σ Re(residue · ∫), with the term's level at the unit as 1. */
function sumOverPoles(
  fractions: PartialFractions,
  index: number,
  lead: number,
  [from, to]: readonly [number, number],
): BoundedValue | undefined {
  const { unit } = fractions;
  const infinite = from === 0 || to === Number.POSITIVE_INFINITY;
  const width = infinite ? Number.POSITIVE_INFINITY : logRatio(from, to);
  const stretch = poleStretch(lead, from / unit, to / unit, width);
  if (stretch === undefined) return undefined;
  const integrals: PoleIntegrals[] = [];
  const roundings = 0.5 * Number.EPSILON * (4 * polesOf(fractions) + 4);
  let value = 0;
  let error = 0;
  for (const pole of fractions.poles) {
    const found = poleIntegrals(pole, stretch, pole.multiplicity + 1);
    if (found === undefined) return undefined;
    integrals.push(found);
    const residues = pole.residues[index] as readonly Residue[];
    for (let m = 0; m < residues.length; m += 1) {
      const residue = residues[m] as Residue;
      const integral = found.values[m] as Complex;
      value += 0.5 * pole.count * times(residue, integral).re;
      error += 0.5 * pole.count * residue.size * ((found.errors[m] as number) + roundings * sizeOf(integral));
    }
  }
  return { value, error: error + rootEffects(fractions, index, integrals) };
}

function polesOf({ poles }: PartialFractions): number {
  return poles.reduce((sum, { count, multiplicity }) => sum + count * multiplicity, 0);
}

/** The residues to use; undefined where none has a finite integral over this band, "split" where two halves have. */
function indexFor(
  { zerosAtOrigin, poles }: PartialFractions,
  exponent: number,
  low: number,
  high: number,
): number | "split" | undefined {
  const last = (poles[0] as FractionPole).residues.length - 1;
  const rise = 0.5 * (2 * zerosAtOrigin + 1 - exponent);
  let wanted = Math.round(rise - 0.5);
  if (poles.every(({ b }) => high <= sizeOf(b))) wanted = 0;
  if (poles.every(({ b }) => low >= sizeOf(b))) wanted = last;
  // s = rise − index: above 0 from 0 on, below 1 to ∞, with some distance where there is a choice
  for (const margin of [0.2, 0]) {
    const least = Math.max(0, high === Number.POSITIVE_INFINITY ? Math.floor(rise - 1 + margin) + 1 : 0);
    const most = Math.min(last, low === 0 ? Math.ceil(rise - margin) - 1 : last);
    if (least <= most) return Math.min(Math.max(wanted, least), most);
    if (low === 0 && high === Number.POSITIVE_INFINITY && last > 0) return "split";
  }
  return undefined;
}

function levelAtUnit({ at, level, exponent }: PowerLawTerm, unit: number): number {
  return exponent === 0 || unit === at ? level : level * (unit / at) ** -exponent;
}

/** The rounding of the level at the unit and, for an exponent that is itself rounded, what that and lead's do over the band. */
function termError(
  { at, exponent }: PowerLawTerm,
  lead: number,
  unit: number,
  edges: readonly [number, number],
): number {
  if (exponent === 0) return 4 * Number.EPSILON;
  const steep = Math.abs(exponent);
  let reach = 0;
  for (const edge of edges) if (edge > 0 && edge < Number.POSITIVE_INFINITY) reach += Math.abs(Math.log(edge / unit));
  const leadError = Number.isInteger(exponent) ? 0 : Math.abs(lead);
  return (
    Number.EPSILON * (4 + steep * (1 + 4 * Math.abs(Math.log(unit / at))) + 2 * Math.max(steep, leadError) * reach)
  );
}
