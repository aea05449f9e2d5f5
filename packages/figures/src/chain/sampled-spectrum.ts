import { foldedSpectrum, type Spectrum, type Weighting } from "@quietband/core";

/** A folded spectrum as a sampler has it at all frequencies up to its rate: even about half the rate. */
export function sampledSpectrum(spectrum: Spectrum, sampleRateHz: number, weighting: Weighting | undefined): Spectrum {
  const folded = foldedSpectrum(spectrum, { sampleRateHz, weighting });
  const half = 0.5 * sampleRateHz;
  return Object.freeze({
    ...folded,
    support: Object.freeze([folded.support[0], sampleRateHz] as const),
    knots: Object.freeze([
      ...folded.knots,
      half,
      ...folded.knots.map((hz) => sampleRateHz - hz).toSorted((one, other) => one - other),
    ]),
    powerDensityAt: (hz: number) => folded.powerDensityAt(hz <= half ? hz : sampleRateHz - hz),
  });
}
