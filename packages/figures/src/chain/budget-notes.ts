import { type Spectrum, writeQuantity } from "@quietband/core";
import type { BudgetLine } from "./budget-lines.js";
import type { NoiseBudget } from "./budget-result.js";
import type { BudgetTotals } from "./budget-totals.js";
import type { CorrelatedPair } from "./correlation-matrix.js";
import type { NoiseSource } from "./noise-source.js";
import { ditherWarning, type QuantizationNoise } from "./quantization.js";
import { bandWords } from "./stated-noise.js";

/** Sentences about the total; those about a source stand with it. */
export function budgetNotes(
  lines: readonly BudgetLine[],
  pairs: readonly CorrelatedPair[],
  totals: BudgetTotals,
  budget: Pick<NoiseBudget, "unit" | "referredTo" | "uncertaintyCovers"> & { readonly band: readonly [number, number] },
): readonly string[] {
  const { unit, referredTo, uncertaintyCovers, band } = budget;
  const place = referredTo === "input" || referredTo === "output" ? `the ${referredTo}` : `the input of ${referredTo}`;
  const notes = [`Total in ${bandWords(band)}, referred to ${place}, in ${unit}.`];
  if (totals.power === 0) notes.push("The sources cancel: nothing is left to share.");
  if (uncertaintyCovers > 0 && uncertaintyCovers < 1)
    notes.push(
      `${percent(uncertaintyCovers)} of the power comes from sources that state an uncertainty; the others count as exact.`,
    );
  if (lines.some(({ swing }) => swing > 0))
    notes.push("Tones add in power to the RMS and in amplitude to the peak-to-peak value.");
  if (pairs.some(({ first, second }) => lines[first]?.weighting !== lines[second]?.weighting))
    notes.push("Correlated sources pass different filters; phase differences between these are left out.");
  return [...notes, ...lines.flatMap((line) => ditherNotes(line, totals))];
}

/** What a stated spread from part to part does to the total. */
export function partSpreadOf(
  lines: readonly BudgetLine[],
  totals: BudgetTotals,
  unit: string,
): NoiseBudget["partSpread"] {
  const stated = lines.filter(({ partFactor }) => partFactor !== undefined);
  if (stated.length === 0) return Object.freeze({ text: "not included" });
  const rms = Math.sqrt(totals.powerWith((index) => lines[index]?.partFactor ?? 1));
  const factors = stated.map(({ name, partFactor }) => `${name} × ${partFactor}`).join(", ");
  const others = stated.length === lines.length ? "" : "; of the others not included";
  return Object.freeze({
    text: `${writeQuantity(rms, unit, { digits: 4 })} RMS with ${factors} as stated${others}`,
    rms,
  });
}

/** Rounding is white only where other noise covers half a step. Other noise in the band is what the budget can compare. */
function ditherNotes({ name, source, gain, power }: BudgetLine, totals: BudgetTotals): string[] {
  const lsb = stepOf(source);
  if (lsb === undefined || gain === 0) return [];
  const others = Math.sqrt(Math.max(totals.randomPower - power, 0)) / Math.abs(gain);
  const warning = ditherWarning(name, others / lsb);
  return warning === undefined ? [] : [`${warning} (Other noise counted in the budget's band only.)`];
}

function stepOf(source: NoiseSource): number | undefined {
  return (source as Partial<QuantizationNoise> & Partial<Spectrum>).lsb;
}

function percent(share: number): string {
  return `${Number((100 * share).toPrecision(3))} %`;
}
