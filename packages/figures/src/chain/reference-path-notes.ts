import { writeQuantity } from "@quietband/core";
import type { ReferencePathOptions } from "./reference-path-options.js";

/** What a result through the reference path assumes, in sentences; `exact` where the input's lines are known. */
export function referencePathNotes(
  { input, converter = "deltaSigma", sampleRateHz = 0, biasVolts = 0, spectrum }: ReferencePathOptions,
  { exact, beyond }: { readonly exact: boolean; readonly beyond: readonly string[] },
): string[] {
  const folded = `0 to ${writeQuantity(0.5 * sampleRateHz, "Hz")}`;
  const standing = writeQuantity(biasVolts, spectrum.unit);
  const samples = input.kind === "samples";
  const harmonic = input.kind === "square" || input.kind === "triangle";
  const sampler = converter === "sampler";
  const sentences: readonly (readonly [boolean, string])[] = [
    [
      !sampler,
      "Delta-sigma converter: the division goes on at a high rate, so the digital filter limits the reference's noise too.",
    ],
    [
      sampler,
      `Sampler: the reference is used at one moment a sample; all its noise behind its own filter folds into ${folded}, and a digital filter acts after that.`,
    ],
    [
      biasVolts !== 0,
      `With its input shorted the converter still measures ${standing} against the reference, and sees its noise.`,
    ],
    [samples && exact, "The record of samples is taken to repeat."],
    [
      !exact,
      "Only the RMS of the samples is known: the rule takes every line of the input, and the noise around it, to pass the filter.",
    ],
    [
      exact && input.kind !== "dc",
      "Exact: the noise around every line is integrated, whether the line itself passes the filter or not.",
    ],
    [harmonic, "Harmonics above the 32nd odd one stand together in groups."],
    [
      sampler && input.kind !== "dc" && !samples,
      "Lines are taken at their aliases; lines that fall on each other are added in power.",
    ],
  ];
  return [...sentences.filter(([holds]) => holds).map(([, sentence]) => sentence), ...beyond];
}
