import type { Spectrum } from "@quietband/core";

/** A part that may be chosen. */
export interface Candidate {
  /** For reports; the spectrum's own name unless given. Names must differ. */
  readonly name?: string | undefined;
  /** Its noise: voltage noise of an amplifier, noise of a reference. */
  readonly spectrum: Spectrum;
  /** Current noise at its input, A²/Hz; it counts across the source resistance. */
  readonly currentNoise?: Spectrum | undefined;
  /** Amplitude gain that refers it to where candidates are compared, 1 unless given: 1/2.5 for a 2.5 V reference. */
  readonly gain?: number | undefined;
}
