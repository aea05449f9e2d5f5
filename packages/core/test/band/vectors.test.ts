import { describe, expect, test } from "vitest";
import { relativeError } from "../../../../test/support/relative.js";
import {
  type BandCase,
  edgeOf,
  type ReferenceSpectrum,
  type ReferenceWeighting,
  referenceCases,
  spectrumOf,
  weightingOf,
} from "../../../../test/support/vectors.js";
import { bandNoise } from "../../src/band/band-noise.js";
import { foldedSpectrum } from "../../src/band/folded-spectrum.js";
import { noiseBandwidth } from "../../src/band/noise-bandwidth.js";
import { prepareBand } from "../../src/band/prepare-band.js";
import { spectralMoment } from "../../src/band/spectral-moment.js";
import { toneSkirt } from "../../src/spectrum/tone-skirt.js";

// Source of every number here: fixtures/reference (mpmath, 50 digits, two independent routes each).

/** Half an ulp of the reference once it is a double. */
const ofReference = 1.2e-16;

const isExact = (weighting: ReferenceWeighting): boolean =>
  weighting === null || ("kind" in weighting && weighting.kind === "tableGain");

describe.each(["bands.json", "piecewise.json"])("band noise of %s", (file) => {
  test.each(referenceCases<BandCase>(file))("$id", ({ spectrum, weighting, band, rms, condition }) => {
    const noise = bandNoise(spectrumOf(spectrum), {
      fromHz: band[0],
      toHz: edgeOf(band[1]),
      weighting: weightingOf(weighting),
    });
    const error = relativeError(noise.rms, Number(rms));
    expect(error).toBeLessThanOrEqual((isExact(weighting) ? 4e-15 : 1e-12) * Math.max(1, condition));
    expect(error, "the stated bound is true").toBeLessThanOrEqual(noise.numericalError + ofReference);
  });
});

interface MomentCase extends BandCase {
  readonly m0: string;
  readonly m2: string;
}

const conditions = new Map(referenceCases<BandCase>("bands.json").map(({ id, condition }) => [id, condition]));

test.each(referenceCases<MomentCase & { readonly of: string }>("moments.json"))(
  "spectral moments of $of",
  ({ spectrum, weighting, band, m0, m2, of }) => {
    const options = { fromHz: band[0], toHz: edgeOf(band[1]), weighting: weightingOf(weighting) };
    for (const [order, expected] of [
      [0, m0],
      [2, m2],
    ] as const) {
      const moment = spectralMoment(spectrumOf(spectrum), order, options);
      const error = relativeError(moment.value, Number(expected));
      expect(error).toBeLessThanOrEqual(2e-12 * Math.max(1, conditions.get(of) ?? 1));
      expect(error, "the stated bound is true").toBeLessThanOrEqual(moment.numericalError + ofReference);
    }
  },
);

interface NoiseBandwidthCase {
  readonly id: string;
  readonly weighting: ReferenceWeighting;
  readonly enbwDc: string;
  readonly enbwPeak: string;
}

test.each(referenceCases<NoiseBandwidthCase>("enbw.json"))("noise bandwidth $id", ({ weighting, enbwDc, enbwPeak }) => {
  const made = weightingOf(weighting);
  if (made === undefined) throw new Error("a noise bandwidth needs a weighting");
  for (const [relativeTo, expected] of [
    ["dc", enbwDc],
    ["peak", enbwPeak],
  ] as const) {
    const found = noiseBandwidth(made, { relativeTo });
    const error = relativeError(found.hz, Number(expected));
    expect(error).toBeLessThanOrEqual(2e-12);
    expect(error, "the stated bound is true").toBeLessThanOrEqual(found.numericalError + ofReference);
  }
});

interface SkirtCase {
  readonly id: string;
  readonly spectrum: ReferenceSpectrum;
  readonly toneFrequency: number;
  readonly amplitude: number;
  readonly reference: number;
  readonly bands: readonly {
    readonly band: readonly [number, number | "inf"];
    readonly leaveOut: number;
    readonly rms: string;
  }[];
}

test.each(referenceCases<SkirtCase>("skirt.json"))("skirt bands of $id", (given) => {
  for (const { band, leaveOut, rms } of given.bands) {
    const skirt = toneSkirt(spectrumOf(given.spectrum), {
      toneHz: given.toneFrequency,
      amplitude: given.amplitude,
      reference: given.reference,
      leaveOutHz: leaveOut,
    });
    const noise = bandNoise(skirt, { fromHz: band[0], toHz: edgeOf(band[1]) });
    const error = relativeError(noise.rms, Number(rms));
    expect(error).toBeLessThanOrEqual(1e-12);
    expect(error, "the stated bound is true").toBeLessThanOrEqual(noise.numericalError + ofReference);
  }
});

interface FoldedCase {
  readonly id: string;
  readonly spectrum: ReferenceSpectrum;
  readonly weighting: ReferenceWeighting;
  readonly sampleRate: number;
  readonly frequencies: readonly number[];
  readonly density: readonly string[];
}

test.each(referenceCases<FoldedCase>("folded.json"))("folded density of $id", (given) => {
  const folded = foldedSpectrum(spectrumOf(given.spectrum), {
    sampleRateHz: given.sampleRate,
    weighting: weightingOf(given.weighting),
  });
  for (const [index, hz] of given.frequencies.entries())
    expect(relativeError(folded.powerDensityAt(hz), Number(given.density[index]))).toBeLessThanOrEqual(2e-12);
});

test.each(referenceCases<BandCase>("bands.json"))(
  "a prepared band gives $id",
  ({ spectrum, weighting, band, rms, condition }) => {
    const made = weightingOf(weighting);
    const [fromHz, toHz] = [band[0], edgeOf(band[1])];
    if (made === undefined && (fromHz === 0 || toHz === Number.POSITIVE_INFINITY)) return;
    const found = prepareBand(made, { fromHz, toHz }).rmsOf(spectrumOf(spectrum));
    expect(relativeError(found, Number(rms))).toBeLessThanOrEqual(1e-12 * Math.max(1, condition));
  },
);
