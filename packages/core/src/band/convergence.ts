import { DivergentIntegralError, OutOfDomainError } from "../ground/errors.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";

/**
 * Decides from the end exponents alone, before anything is integrated, whether a band has a finite power, and refuses
 * bands that reach where the spectrum or the weighting is not defined.
 */
export function requireConvergent(
  spectrum: Spectrum,
  weighting: Weighting | undefined,
  fromHz: number,
  toHz: number,
): void {
  requireSupport(spectrum, weighting, fromHz, toHz);
  const falls = weighting === undefined ? "" : ` through ${weighting.name}`;
  if (fromHz === 0) {
    const exponent = spectrum.lowExponent + (weighting?.lowExponent ?? 0);
    if (exponent >= 1)
      throw new DivergentIntegralError(
        `The power${falls} grows without limit towards 0 Hz, where it goes as f^−${rounded(exponent)} (below 1 is needed); move fromHz up to the lowest frequency that matters, for instance one over the observation time.`,
        "fromHz",
      );
  }
  if (toHz === Number.POSITIVE_INFINITY) {
    const exponent = spectrum.highExponent + (weighting?.highExponent ?? 0);
    if (exponent <= 1)
      throw new DivergentIntegralError(
        `The power${falls} grows without limit towards high frequencies, where it goes as f^−${rounded(exponent)} (above 1 is needed); move toHz down to a finite edge or add a low-pass weighting.`,
        "toHz",
      );
  }
}

function requireSupport(spectrum: Spectrum, weighting: Weighting | undefined, fromHz: number, toHz: number): void {
  const [low, high] = spectrum.support;
  if (fromHz < low)
    throw new OutOfDomainError(
      `The spectrum is defined from ${low} Hz; the band begins at ${fromHz} Hz; say how it goes on below, for instance beyond: { below: 1 }, or move fromHz up.`,
    );
  if (toHz > high)
    throw new OutOfDomainError(
      `The spectrum is defined up to ${high} Hz; the band ends at ${toHz} Hz; say how it goes on above, for instance beyond: { above: 0 }, or move toHz down.`,
    );
  if (weighting === undefined) return;
  const [first, last] = weighting.support;
  if (fromHz < first || toHz > last)
    throw new OutOfDomainError(
      `${weighting.name} is defined from ${first} Hz to ${last} Hz; the band runs from ${fromHz} Hz to ${toHz} Hz; narrow the band or give the gain over all of it.`,
    );
}

function rounded(exponent: number): string {
  return String(Number(exponent.toPrecision(4))).replace("-", "−");
}
