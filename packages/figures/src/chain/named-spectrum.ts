import type { Spectrum } from "@quietband/core";

/** A spectrum that says in a report what it is and what it rests on. It is a spectrum: every function of core takes it. */
export interface NamedSpectrum extends Spectrum {
  readonly name: string;
  /** Sentences a report must print whatever the band: a temperature, a model and where it ends. */
  readonly assumptions: readonly string[];
}

/**
 * A spectrum with a name, for budgets and comparisons.
 *
 * @param spectrum - any spectrum: a polyline, a fit, a model.
 * @param name - what a report calls it.
 * @param assumptions - sentences a report must print with it; those it already has come first.
 *
 * @example
 * ```ts
 * import { whiteFlicker } from "@quietband/core";
 * import { namedSpectrum } from "@quietband/figures";
 * const amplifier = namedSpectrum(whiteFlicker({ floor: 7e-9, cornerHz: 0.02 }), "amplifier");
 * amplifier.name; // → amplifier
 * ```
 */
export function namedSpectrum(spectrum: Spectrum, name: string, assumptions: readonly string[] = []): NamedSpectrum {
  const already = (spectrum as Partial<NamedSpectrum>).assumptions ?? [];
  return Object.freeze({ ...spectrum, name, assumptions: Object.freeze([...already, ...assumptions]) });
}
