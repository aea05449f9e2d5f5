import type { Spectrum } from "@quietband/core";
import type { NamedSpectrum } from "./named-spectrum.js";
import type { StatedNoise } from "./stated-noise.js";
import type { Tone } from "./tone.js";

/** What can stand in a budget: a spectrum with or without a name, a stated figure, or a tone. */
export type NoiseSource = Spectrum | NamedSpectrum | StatedNoise | Tone;

/** Whether a source has a density at all. */
export function isSpectrum(source: NoiseSource): source is Spectrum {
  return !("kind" in source);
}
