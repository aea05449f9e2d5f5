import { OutOfDomainError, type Spectrum } from "@quietband/core";
import { type NamedSpectrum, namedSpectrum } from "./named-spectrum.js";
import { inputParts, type ReferenceInput } from "./reference-input.js";
import { referencePathNotes } from "./reference-path-notes.js";
import { checkReferencePath, type ReferencePathOptions, referenceAsUsed } from "./reference-path-options.js";
import { aliasOf, oneSpectrum, type SeenPart, seenParts } from "./seen-parts.js";

/** A reference as a converter sees it at its input. */
export interface SeenReference {
  /** Noise of the reference as the division uses it. */
  readonly base: Spectrum;
  /** Mean of the input, bias included. */
  readonly mean: number;
  /** RMS of the input about its mean. */
  readonly alternatingRms: number;
  /** What each part of the input brings in; undefined where only the RMS of the input is known. */
  readonly seen: readonly SeenPart[] | undefined;
  /** Rate of a sampler. */
  readonly rate: number | undefined;
}

export function seeReference(options: ReferencePathOptions): SeenReference {
  const rate = checkReferencePath(options);
  const { referenceVolts, fromHz, biasVolts = 0, leaveOutHz } = options;
  const input = inputParts(sampledAt(options.input, rate));
  const base = referenceAsUsed(options, rate);
  const mean = input.mean + biasVolts;
  const seen =
    input.lines === undefined
      ? undefined
      : seenParts(base, {
          mean,
          lines: rate === undefined ? input.lines : input.lines.map((line) => aliasOf(line, rate)),
          referenceVolts,
          leaveOutHz: (lineHz) => leaveOutHz ?? Math.min(fromHz, 0.5 * lineHz),
        });
  return { base, mean, alternatingRms: input.alternatingRms, seen, rate };
}

/**
 * The noise that a reference brings in at a given input, before any digital filter, as a source for `noiseBudget`: what
 * `referencePathNoise` integrates, for budgets whose path has the filter.
 *
 * @param options - as for `referencePathNoise`, without its upper edge and weighting; `fromHz` is the lowest frequency at which
 *   noise around a tone counts.
 * @returns the spectrum in volts at the converter's input; undefined where nothing is seen, at an input of 0 V.
 * @throws OutOfDomainError as `referencePathNoise`, and for samples without a rate.
 *
 * @example
 * ```ts
 * import { butterworthLowPass, whiteFlicker } from "@quietband/core";
 * import { noiseBudget, referenceSpectrum } from "@quietband/figures";
 * const source = referenceSpectrum({
 *   spectrum: whiteFlicker({ floor: 70e-9, cornerHz: 60 }),
 *   referenceVolts: 4.096,
 *   input: { kind: "dc", volts: 2.048 },
 *   fromHz: 0.1,
 * });
 * const weighting = butterworthLowPass({ order: 2, cutoffHz: 5 });
 * const sources = source === undefined ? [] : [{ source }];
 * noiseBudget({ sources, fromHz: 0.1, toHz: Infinity, weighting }).rms; // → 542.4e-9
 * ```
 */
export function referenceSpectrum(
  options: Omit<ReferencePathOptions, "toHz" | "weighting">,
): NamedSpectrum | undefined {
  const whole = { ...options, toHz: options.fromHz };
  const { base, seen } = seeReference(whole);
  if (seen === undefined)
    throw new OutOfDomainError("An input of samples needs sampleRateHz, in Hz, for the spectrum of what it brings in.");
  if (seen.length === 0) return undefined;
  return namedSpectrum(oneSpectrum(seen, base), "reference", referencePathNotes(whole, { exact: true, beyond: [] }));
}

/** Samples without a rate of their own are the sampler's. */
function sampledAt(input: ReferenceInput, rate: number | undefined): ReferenceInput {
  if (input.kind !== "samples" || input.sampleRateHz !== undefined || rate === undefined) return input;
  return { ...input, sampleRateHz: rate };
}
