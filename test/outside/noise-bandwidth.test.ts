import {
  bandNoise,
  besselLowPass,
  butterworthLowPass,
  cascade,
  chebyshevLowPass,
  firstOrderLowPass,
  identicalPoles,
  movingAverage,
  noiseBandwidth,
  powerLaws,
  resonator,
  secondOrderLowPass,
  sincDecimator,
} from "@quietband/core";
import { describe, expect, test } from "vitest";
import { published } from "../support/published.js";
import { expectRelative } from "../support/relative.js";

interface IdenticalRow {
  readonly poles: number;
  readonly publishedOverF3dB: number;
  readonly publishedOverPole: number;
}

describe("n RC poles (public table in six decimals, seen; last digits off by one: compare at 1e-6)", () => {
  test.each(published<IdenticalRow>("enbw_rc_poles").values)("$poles poles", (row) => {
    const byCutoff = noiseBandwidth(identicalPoles({ order: row.poles, cutoffHz: 1 })).hz;
    expect(Math.abs(byCutoff - row.publishedOverF3dB)).toBeLessThanOrEqual(1e-6);
    // a bench filter is quoted by its poles: a cascade of first orders
    const byPole = noiseBandwidth(
      cascade(...Array.from({ length: row.poles }, () => firstOrderLowPass({ cutoffHz: 1 }))),
    ).hz;
    expect(Math.abs(byPole - row.publishedOverPole)).toBeLessThanOrEqual(1e-6);
  });
});

interface ButterworthRow {
  readonly order: number;
  readonly published: number;
}

describe("Butterworth (S. Winder 2002, table A.3, and a public table; closed form π/(2n)/sin(π/(2n)))", () => {
  test.each(published<ButterworthRow>("enbw_butterworth").values)("order $order", (row) => {
    const found = noiseBandwidth(butterworthLowPass({ order: row.order, cutoffHz: 1 })).hz;
    const x = Math.PI / (2 * row.order);
    expectRelative(found, x / Math.sin(x), 4e-15);
    expect(Math.abs(found - row.published)).toBeLessThanOrEqual(5e-7);
  });
});

interface ChebyshevRow {
  readonly rippleDb: number;
  readonly order: number;
  readonly publishedPeakNormalisedOverRippleEdge: number | null;
  readonly exactPeakNormalisedOverRippleEdge: number;
  readonly exactDcNormalisedOverRippleEdge: number;
  readonly exactPeakNormalisedOverF3dB: number;
  readonly f3dBOverRippleEdge: number;
}

describe("Chebyshev I in its three normalisations (eleven entries seen, the rest computed by residues)", () => {
  test.each(published<ChebyshevRow>("enbw_chebyshev").values)("order $order, $rippleDb dB", (row) => {
    const filter = chebyshevLowPass({ order: row.order, rippleDb: row.rippleDb, edgeHz: 1 });
    const peak = noiseBandwidth(filter, { relativeTo: "peak" }).hz;
    expectRelative(peak, row.exactPeakNormalisedOverRippleEdge, 1e-12);
    expectRelative(noiseBandwidth(filter, { relativeTo: "dc" }).hz, row.exactDcNormalisedOverRippleEdge, 1e-12);
    expectRelative(peak / row.f3dBOverRippleEdge, row.exactPeakNormalisedOverF3dB, 1e-12);
    // one printed entry is off by 0.51 of its last digit
    if (row.publishedPeakNormalisedOverRippleEdge !== null)
      expect(Math.abs(peak - row.publishedPeakNormalisedOverRippleEdge)).toBeLessThanOrEqual(0.52e-4);
  });
});

interface BesselRow {
  readonly order: number;
  readonly exactOverF3dB: number;
}

test.each(published<BesselRow>("enbw_bessel").values)(
  "Bessel order $order (computed by residues, no table seen)",
  (row) => {
    expectRelative(noiseBandwidth(besselLowPass({ order: row.order, cutoffHz: 1 })).hz, row.exactOverF3dB, 1e-12);
  },
);

interface SecondOrderRow {
  readonly Q: number;
  readonly bandpassEnbwOverF0: number;
  readonly lowpassEnbwOverF0: number;
}

test.each(published<SecondOrderRow>("enbw_second_order").values)(
  "second order, Q = $Q: (π/2)·f₀/Q and (π/2)·Q·f₀ (Davenport and Root 1958; from memory)",
  ({ Q, bandpassEnbwOverF0, lowpassEnbwOverF0 }) => {
    expectRelative(noiseBandwidth(resonator({ centreHz: 1, q: Q })).hz, bandpassEnbwOverF0, 1e-12);
    expectRelative(noiseBandwidth(secondOrderLowPass({ naturalHz: 1, q: Q })).hz, lowpassEnbwOverF0, 1e-12);
  },
);

interface SincRow {
  readonly N: number;
  readonly enbwTimesT: number;
}

describe("sinc^N (Gradshteyn and Ryzhik 3.82; from memory)", () => {
  test.each(published<SincRow>("sinc_power_integrals").values)("N = $N", ({ N, enbwTimesT }) => {
    // a decimator of large ratio has the lobes of sinc^N; its images bring the rest at the rate of 1/ratio²
    const ratio = 1 << 14;
    const decimator = sincDecimator({ order: N, ratio, modulatorRateHz: ratio });
    expectRelative(noiseBandwidth(decimator).hz, enbwTimesT, N === 1 ? 1e-12 : 1e-8);
  });

  test("a moving average is N = 1", () => {
    expectRelative(noiseBandwidth(movingAverage({ seconds: 0.02 })).hz, 25, 1e-13);
  });
});

test("a brick wall of the noise bandwidth passes the same white power as the filter", () => {
  const white = powerLaws([{ coefficient: 3e-17, exponent: 0 }]);
  const filter = butterworthLowPass({ order: 3, cutoffHz: 700 });
  const through = bandNoise(white, { fromHz: 0, toHz: Number.POSITIVE_INFINITY, weighting: filter });
  const wall = bandNoise(white, { fromHz: 0, toHz: noiseBandwidth(filter).hz });
  expectRelative(through.rms, wall.rms, 1e-14);
});
