import { readFileSync } from "node:fs";
import {
  aWeighting,
  besselLowPass,
  butterworthBandPass,
  butterworthHighPass,
  butterworthLowPass,
  cascade,
  chebyshevLowPass,
  curveFromPoints,
  cWeighting,
  firFilter,
  firstOrderHighPass,
  firstOrderLowPass,
  gainTable,
  identicalPoles,
  movingAverage,
  polyline,
  powerLaws,
  resonator,
  type Spectrum,
  sampleDifference,
  secondOrderLowPass,
  sincDecimator,
  twoSampleVariance,
  type Weighting,
} from "@quietband/core";

/** Spectra and weightings as fixtures/reference/README.md spells them. */
export type ReferenceSpectrum =
  | { readonly terms: readonly { readonly h: number; readonly a: number }[] }
  | { readonly loglog: readonly (readonly [number, number])[]; readonly extend: boolean };

export type ReferenceWeighting = { readonly cascade: readonly PlainWeighting[] } | PlainWeighting | null;

interface PlainWeighting {
  readonly kind: string;
  readonly [parameter: string]: unknown;
}

export interface BandCase {
  readonly id: string;
  readonly spectrum: ReferenceSpectrum;
  readonly weighting: ReferenceWeighting;
  readonly band: readonly [number, number | "inf"];
  readonly power: string;
  readonly rms: string;
  readonly condition: number;
}

/** The cases of one file of fixtures/reference. */
export function referenceCases<Case>(file: string): readonly Case[] {
  return JSON.parse(readFileSync(new URL(`../../fixtures/reference/${file}`, import.meta.url), "utf8")) as Case[];
}

export function edgeOf(edge: number | "inf"): number {
  return edge === "inf" ? Number.POSITIVE_INFINITY : edge;
}

export function spectrumOf(given: ReferenceSpectrum): Spectrum {
  if ("terms" in given) return powerLaws(given.terms.map(({ h, a }) => ({ coefficient: h, exponent: a })));
  const points = given.loglog.map(([frequency, density]) => ({ frequency, density }));
  return polyline(curveFromPoints(points, { unit: "V" }), { beyond: given.extend ? "segments" : "refuse" });
}

export function weightingOf(given: ReferenceWeighting): Weighting | undefined {
  if (given === null) return undefined;
  if ("cascade" in given && Array.isArray(given.cascade))
    return cascade(...given.cascade.map((part: PlainWeighting) => plainWeighting(part)));
  return plainWeighting(given as PlainWeighting);
}

const makers: Readonly<Record<string, (p: Readonly<Record<string, number>>) => Weighting>> = {
  firstOrderLow: (p) => firstOrderLowPass({ cutoffHz: need(p, "f3") }),
  firstOrderHigh: (p) => firstOrderHighPass({ cutoffHz: need(p, "f3") }),
  identicalPoles: (p) => identicalPoles({ order: need(p, "n"), cutoffHz: need(p, "f3") }),
  butterworthLow: (p) => butterworthLowPass({ order: need(p, "n"), cutoffHz: need(p, "f3") }),
  butterworthHigh: (p) => butterworthHighPass({ order: need(p, "n"), cutoffHz: need(p, "f3") }),
  butterworthBand: (p) =>
    butterworthBandPass({ order: need(p, "n"), lowCutoffHz: need(p, "f1"), highCutoffHz: need(p, "f2") }),
  besselLow: (p) => besselLowPass({ order: need(p, "n"), cutoffHz: need(p, "f3") }),
  chebyshevLow: (p) =>
    chebyshevLowPass({ order: need(p, "n"), rippleDb: need(p, "rippleDb"), edgeHz: need(p, "fEdge") }),
  secondOrderLow: (p) => secondOrderLowPass({ naturalHz: need(p, "f0"), q: need(p, "q") }),
  secondOrderBand: (p) => resonator({ centreHz: need(p, "f0"), q: need(p, "q") }),
  movingAverage: (p) => movingAverage({ seconds: need(p, "T") }),
  differencing: (p) => sampleDifference({ seconds: need(p, "tau") }),
  twoSampleVariance: (p) => twoSampleVariance({ seconds: need(p, "tau") }),
  sincDecimator: (p) =>
    sincDecimator({ order: need(p, "order"), ratio: need(p, "ratio"), modulatorRateHz: need(p, "modulatorRate") }),
  aWeighting: () => aWeighting(),
  cWeighting: () => cWeighting(),
};

function plainWeighting(given: PlainWeighting): Weighting {
  if (given.kind === "firTaps")
    return firFilter({ taps: given["taps"] as number[], sampleRateHz: given["fs"] as number });
  if (given.kind === "tableGain")
    return gainTable((given["points"] as [number, number][]).map(([frequencyHz, gainDb]) => ({ frequencyHz, gainDb })));
  const maker = makers[given.kind];
  if (maker === undefined) throw new Error(`no maker for the reference weighting ${given.kind}`);
  return maker(given as unknown as Record<string, number>);
}

function need(parameters: Readonly<Record<string, number>>, name: string): number {
  const value = parameters[name];
  if (value === undefined) throw new Error(`the reference weighting lacks ${name}`);
  return value;
}
