import {
  aWeighting,
  bandNoise,
  besselLowPass,
  butterworthLowPass,
  type ComplexHz,
  chebyshevLowPass,
  cWeighting,
  powerLaws,
  programmeWeighting,
  telephoneWeighting,
  type Weighting,
} from "@quietband/core";
import { describe, expect, test } from "vitest";
import { published } from "../support/published.js";
import { expectRelative } from "../support/relative.js";

interface CoefficientRow {
  readonly filter: "bessel" | "butterworth" | "chebyshev";
  readonly rippleDb: number | null;
  readonly order: number;
  readonly section: number;
  readonly coefficient: "a" | "b";
  readonly published: number;
  readonly exact: number;
}

/** 1/(1 + a s + b s²) of every section, s in units of the frequency 3 dB below the gain at 0 Hz. */
function sectionsOf(filter: Weighting, cutoffHz: number): { readonly a: number; readonly b: number }[] {
  const upper = (filter.rational?.poles ?? []).filter(({ im }) => im >= 0);
  return upper.map(({ re, im }: ComplexHz) => {
    const size = (re * re + im * im) / cutoffHz ** 2;
    return im === 0 ? { a: -cutoffHz / re, b: 0 } : { a: (-2 * re) / cutoffHz / size, b: 1 / size };
  });
}

function filterOf({ filter, rippleDb, order }: CoefficientRow): {
  readonly made: Weighting;
  readonly cutoffHz: number;
} {
  if (filter === "bessel") return { made: besselLowPass({ order, cutoffHz: 1 }), cutoffHz: 1 };
  if (filter === "butterworth") return { made: butterworthLowPass({ order, cutoffHz: 1 }), cutoffHz: 1 };
  const made = chebyshevLowPass({ order, rippleDb: rippleDb ?? Number.NaN, edgeHz: 1 });
  // the book's third normalisation: 3.01 dB below the gain at 0 Hz, T_n = √(2 + 1/ε²) for even orders, 1/ε for odd ones
  const ripplePower = 10 ** ((rippleDb ?? Number.NaN) / 10) - 1;
  const inverse = 1 / ripplePower;
  const polynomial = Math.sqrt(order % 2 === 0 ? 2 + inverse : inverse);
  return { made, cutoffHz: Math.cosh(Math.acosh(polynomial) / order) };
}

describe("section coefficients (Tietze and Schenk, as transcribed in a public repository; four decimals)", () => {
  test.each(published<CoefficientRow>("filter_coefficients_a_b").values)(
    "$filter $rippleDb dB, order $order, section $section, $coefficient",
    (row) => {
      const { made, cutoffHz } = filterOf(row);
      const found = sectionsOf(made, cutoffHz).map((section) => section[row.coefficient]);
      const nearest = found.toSorted((one, other) => Math.abs(one - row.exact) - Math.abs(other - row.exact))[0] ?? 9;
      if (row.exact !== 0) expectRelative(nearest, row.exact, 1e-13);
      expect(Math.abs(nearest - row.published)).toBeLessThanOrEqual(5.1e-5);
    },
  );
});

interface SoundRow {
  readonly nominalHz: number;
  readonly exactHz: number;
  readonly aDb: number;
  readonly cDb: number;
}

test.each(published<SoundRow>("iec61672_1_weighting_a_c").values)(
  "A and C at $nominalHz Hz are those of IEC 61672-1:2013, table 3, at its exact base-10 frequency",
  ({ exactHz, aDb, cDb }) => {
    expect(Math.abs(decibels(aWeighting(), exactHz) - aDb)).toBeLessThanOrEqual(0.05);
    expect(Math.abs(decibels(cWeighting(), exactHz) - cDb)).toBeLessThanOrEqual(0.05);
  },
);

test("A and C are exactly 0 dB at 1 kHz, and 2.000 and 0.062 dB below what their poles alone give", () => {
  expect(aWeighting().powerGainAt(1000)).toBe(1);
  expect(cWeighting().powerGainAt(1000)).toBe(1);
  const constants = new Map(
    published<{ readonly name: string; readonly exact: number }>("iec61672_1_poles").values.map((row) => [
      row.name,
      row.exact,
    ]),
  );
  for (const [made, name] of [[aWeighting(), "A1000dB"] as const, [cWeighting(), "C1000dB"] as const]) {
    const f4 = constants.get("f4") ?? Number.NaN;
    const gain = made.rational?.gain ?? Number.NaN;
    expectRelative(10 * Math.log10(f4 ** 4 / gain), constants.get(name) ?? Number.NaN, 1e-11);
  }
});

test.each(
  published<{ readonly hz: number; readonly db: number; readonly networkDb: number }>("itu_r_bs468_4_weighting").values,
)("programme weighting at $hz Hz is that of ITU-R BS.468-4, table 1", ({ hz, db, networkDb }) => {
  // its 100 Hz row stands 0.0002 dB beyond its own rounding
  expect(Math.abs(decibels(programmeWeighting(), hz) - db)).toBeLessThanOrEqual(0.0505);
  expect(Math.abs(decibels(programmeWeighting(), hz) - networkDb)).toBeLessThanOrEqual(1e-12);
});

test.each(published<{ readonly hz: number; readonly db: number }>("itu_t_o41_psophometric").values)(
  "telephone weighting at $hz Hz is $db dB (ITU-T O.41, table 1)",
  ({ hz, db }) => {
    expect(Math.abs(decibels(telephoneWeighting(), hz) - db)).toBeLessThanOrEqual(1e-12);
  },
);

test("white noise of the 3.1 kHz band reads 2.5 dB lower through the telephone weighting, 3.6 dB of a 4 kHz channel (ITU-T G.223, from memory)", () => {
  const white = powerLaws([{ coefficient: 1, exponent: 0 }]);
  const weighted = bandNoise(white, { fromHz: 300, toHz: 3400, weighting: telephoneWeighting() }).power;
  const rows = published<{ readonly reference: string; readonly publishedDb: number; readonly computedDb: number }>(
    "psophometric_white_noise_factor",
  ).values;
  for (const { reference, publishedDb, computedDb } of rows) {
    const found = 10 * Math.log10(weighted / (reference.startsWith("300") ? 3100 : 4000));
    expect(Math.abs(found - computedDb)).toBeLessThanOrEqual(1e-12);
    expect(Math.abs(found - publishedDb)).toBeLessThanOrEqual(0.05);
  }
});

function decibels(weighting: Weighting, hz: number): number {
  return 10 * Math.log10(weighting.powerGainAt(hz));
}
