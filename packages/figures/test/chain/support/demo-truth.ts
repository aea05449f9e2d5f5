import { readFileSync } from "node:fs";
import { functionSpectrum, type Spectrum } from "@quietband/core";

/** The invented parts as their truth models say (fixtures/demo/true-answers.json, truthModels). */
export const demoTruth: Readonly<Record<"R1" | "A1" | "J1" | "X1", Spectrum>> = Object.freeze({
  R1: functionSpectrum(
    (f) => (74e-9 ** 2 * (1 + (48 / f) ** 1.06)) / ((1 - (f / 14e3) ** 2) ** 2 + (f / 14e3 / 1.5) ** 2),
    { knots: [48, 14e3], lowExponent: 1.06, highExponent: 4 },
  ),
  A1: functionSpectrum(
    (f) => 7.2e-9 ** 2 * (1 + 0.02 / f) + 12e-9 ** 2 * Math.exp(-((Math.log(f / 40e3) / 0.35) ** 2)),
    {
      knots: [0.02, 40e3],
      lowExponent: 1,
      highExponent: 0,
    },
  ),
  J1: functionSpectrum((f) => 4.8e-9 ** 2 * (1 + 60 / f + (f / 300e3) ** 2) + 4e-9 ** 2 / (1 + (f / 150) ** 2), {
    knots: [60, 150, 300e3],
    lowExponent: 1,
    highExponent: -2,
  }),
  X1: functionSpectrum((f) => (380e-9 ** 2 * (1 + 22 / f + (0.9 / f) ** 2)) / (1 + (f / 20e3) ** 4), {
    knots: [0.9, 22, 20e3],
    lowExponent: 2,
    highExponent: 4,
  }),
});

/** What the demonstration's paths really give, V RMS, to six digits (fixtures/demo/true-answers.json, paths). */
export const demoPaths = (
  JSON.parse(readFileSync(new URL("../../../../../fixtures/demo/true-answers.json", import.meta.url), "utf8")) as {
    readonly paths: {
      readonly R1_full: number;
      readonly R1_half: number;
      readonly bridge_channel_rti: Readonly<Record<string, number>>;
    };
  }
).paths;
