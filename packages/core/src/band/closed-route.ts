import type { BoundedValue } from "../numerics/bounded-value.js";
import { preparePartialFractions } from "../numerics/partial-fractions.js";
import type { PowerLawTerm } from "../numerics/power-law.js";
import { rationalIntegral } from "../numerics/rational-integral.js";
import { saturatingIntegral } from "../numerics/saturating-integral.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";
import { eachTermOver } from "./exact-route.js";
import type { RoutedPower } from "./routed-power.js";

/** A closed form whose own bound is wider than this share hands over to the integrator. */
const widestBound = 1e-13;

type ClosedIntegral = (term: PowerLawTerm, low: number, high: number) => BoundedValue | undefined;

/**
 * Power laws through poles and zeros, term by term in closed form: first-order and Butterworth gains by one integral, others by
 * partial fractions. Where a term is not well conditioned the integrator takes the whole band.
 */
export function closedPower(
  spectrum: Spectrum,
  weighting: Weighting | undefined,
  fromHz: number,
  toHz: number,
): RoutedPower | undefined {
  if (spectrum.pieces === undefined || weighting === undefined) return undefined;
  const integral = integralThrough(weighting);
  if (integral === undefined) return undefined;
  const found = sumOfTerms(spectrum, integral, fromHz, toHz);
  return found !== undefined && found.error <= widestBound * found.power ? found : undefined;
}

function integralThrough({ saturating, rational }: Weighting): ClosedIntegral | undefined {
  if (saturating !== undefined) {
    const { cutoffHz: cutoff, order, numeratorOrder } = saturating;
    return (term, low, high) => saturatingIntegral(term, { cutoff, order, numeratorOrder }, low, high);
  }
  const fractions = rational === undefined ? undefined : preparePartialFractions(rational);
  return fractions === undefined ? undefined : (term, low, high) => rationalIntegral(term, fractions, low, high);
}

function sumOfTerms(
  spectrum: Spectrum,
  integral: ClosedIntegral,
  fromHz: number,
  toHz: number,
): RoutedPower | undefined {
  let power = 0;
  let error = 0;
  let missing = 0;
  eachTermOver(spectrum.pieces ?? [], fromHz, toHz, (term, low, high) => {
    const part = missing > 0 ? undefined : integral(term, low, high);
    if (part === undefined) missing += 1;
    else {
      power += part.value;
      error += part.error + Number.EPSILON * power;
    }
  });
  return missing === 0 ? { power, error, status: "exact", evaluations: 0 } : undefined;
}
