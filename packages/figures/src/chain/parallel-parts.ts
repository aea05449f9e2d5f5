import { type Spectrum, scaleSpectrum } from "@quietband/core";
import { requireWhole } from "../convert/domain.js";
import { type NamedSpectrum, namedSpectrum } from "./named-spectrum.js";

/**
 * The average of n equal parts with independent noise: S/n, density down by √n.
 *
 * What the parts share (a common supply, a common reference) does not average out. An uncertainty of the curve, which all
 * of them share, stays as it is.
 *
 * @param spectrum - noise of one part.
 * @param count - number of parts, a whole number from 1.
 * @throws OutOfDomainError for another count.
 *
 * @example
 * ```ts
 * import { bandNoise, whiteFlicker } from "@quietband/core";
 * import { parallelParts } from "@quietband/figures";
 * const four = parallelParts(whiteFlicker({ floor: 70e-9, cornerHz: 60 }), 4);
 * bandNoise(four, { fromHz: 0.1, toHz: 10 }).rms; // → 592.1e-9
 * ```
 */
export function parallelParts(spectrum: Spectrum, count: number): NamedSpectrum {
  requireWhole("The number of parts", count, [1, 1e9]);
  const name = (spectrum as Partial<NamedSpectrum>).name ?? "part";
  return namedSpectrum(scaleSpectrum(spectrum, 1 / Math.sqrt(count)), `${count} × ${name}`, [
    `${count} equal parts averaged; their noise is taken as independent.`,
  ]);
}
