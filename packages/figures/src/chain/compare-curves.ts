import { type BandNoise, bandNoise, OutOfDomainError, type Weighting, writeQuantity } from "@quietband/core";
import { refuseUnknownKeys, requireNotNegative, requirePositive, shown } from "../convert/domain.js";
import type { Candidate } from "./candidate.js";
import { candidateSpectrum } from "./candidate-spectrum.js";
import type { NamedSpectrum } from "./named-spectrum.js";
import { resolveTemperature, type Temperature } from "./temperature.js";

/** The path that all candidates are compared through. */
export interface ComparisonPath extends Temperature {
  readonly fromHz: number;
  readonly toHz: number;
  readonly weighting?: Weighting | undefined;
}

/** What {@link compareCurves} takes besides the candidates. */
export interface CompareCurvesOptions extends ComparisonPath {
  /** Resistance of the source, Ω; its thermal noise and the current noise across it count where it is not 0, the default. */
  readonly sourceOhms?: number | undefined;
  /** Frequencies at which densities are listed, Hz. */
  readonly spotsHz?: readonly number[] | undefined;
}

/** One candidate in a ranking. */
export interface CandidateRow {
  /** 1 for the quietest. */
  readonly rank: number;
  readonly name: string;
  /** RMS through the path, in the candidates' unit. */
  readonly rms: number;
  /** Its rms over that of the quietest. */
  readonly overBest: number;
  /** Relative standard uncertainty of rms (k = 1), where its spectrum carries one. */
  readonly standardUncertainty?: number;
  /** Whether its distance from the quietest is within twice the standard uncertainty of their ratio. */
  readonly tiedWithBest: boolean;
  /** Shares of the power that rest on assumption below and above its points. */
  readonly outsidePoints: BandNoise["outsidePoints"];
  /** Densities at `spotsHz`, unit/√Hz. */
  readonly densities: readonly number[];
  readonly notes: readonly string[];
}

/** Candidates ranked through one path: plain data for a table. */
export interface CurveComparison {
  readonly unit: string;
  readonly fromHz: number;
  /** Hz; "Infinity" as a text, since JSON has no such number. */
  readonly toHz: number | "Infinity";
  readonly spotsHz: readonly number[];
  readonly rows: readonly CandidateRow[];
  readonly notes: readonly string[];
}

/**
 * Several parts through the same path, quietest first; equal ones stay in the order given. With a source resistance R the
 * total is e² + (i·R)² + 4kTR.
 *
 * @param candidates - at least one, all in one unit behind their gains.
 * @param options - band and weighting as in `bandNoise`, `sourceOhms` and its temperature, `spotsHz`.
 * @throws OutOfDomainError for no candidates, names that do not differ, units that do not meet; the errors of `bandNoise`.
 *
 * @example
 * ```ts
 * import { whiteFlicker } from "@quietband/core";
 * import { compareCurves } from "@quietband/figures";
 * const parts = [
 *   { name: "low floor", spectrum: whiteFlicker({ floor: 3e-9, cornerHz: 100 }) },
 *   { name: "low corner", spectrum: whiteFlicker({ floor: 7e-9, cornerHz: 0.02 }) },
 * ];
 * compareCurves(parts, { fromHz: 0.1, toHz: 10 }).rows[0]?.name; // → low corner
 * compareCurves(parts, { fromHz: 10, toHz: 10e3 }).rows[0]?.name; // → low floor
 * compareCurves(parts, { fromHz: 0.1, toHz: 10 }).rows[1]?.overBest; // → 2.9406
 * ```
 */
export function compareCurves(candidates: readonly Candidate[], options: CompareCurvesOptions): CurveComparison {
  refuseUnknownKeys(
    "compareCurves",
    ["fromHz", "toHz", "weighting", "kelvin", "celsius", "sourceOhms", "spotsHz"],
    options,
  );
  const { fromHz, toHz, weighting, sourceOhms = 0, spotsHz = [] } = options;
  requireNotNegative("sourceOhms", sourceOhms, "Ω");
  for (const hz of spotsHz) requirePositive("Each of spotsHz", hz, "Hz");
  const named = namedCandidates(candidates);
  const measured = named.map(({ name, candidate }) => {
    const spectrum = candidateSpectrum(candidate, options);
    const found = bandNoise(spectrum, { fromHz, toHz, weighting });
    const assumptions = (candidate.spectrum as Partial<NamedSpectrum>).assumptions ?? [];
    return { name, spectrum, found, notes: Object.freeze([...assumptions, ...found.notes]) };
  });
  const ranked = measured.toSorted((one, other) => one.found.rms - other.found.rms);
  const best = (ranked[0] as (typeof ranked)[0]).found;
  return Object.freeze({
    unit: best.unit,
    fromHz,
    toHz: toHz === Number.POSITIVE_INFINITY ? "Infinity" : toHz,
    spotsHz: Object.freeze([...spotsHz]),
    rows: Object.freeze(
      ranked.map(
        ({ name, spectrum, found, notes }, index): CandidateRow =>
          Object.freeze({
            rank: index + 1,
            name,
            rms: found.rms,
            overBest: found.rms / best.rms,
            ...(found.standardUncertainty !== undefined && { standardUncertainty: found.standardUncertainty }),
            tiedWithBest: tied(found, best),
            outsidePoints: found.outsidePoints,
            densities: Object.freeze(spotsHz.map((hz) => Math.sqrt(spectrum.powerDensityAt(hz)))),
            notes,
          }),
      ),
    ),
    notes: Object.freeze(
      sourceOhms === 0
        ? []
        : [
            `Source of ${writeQuantity(sourceOhms, "Ω")} at ${resolveTemperature(options).words}, its thermal noise included.`,
          ],
    ),
  });
}

/** Candidates with names that differ and one unit. */
export function namedCandidates(
  candidates: readonly Candidate[],
): readonly { readonly name: string; readonly candidate: Candidate }[] {
  const [first] = candidates;
  if (first === undefined) throw new OutOfDomainError("A comparison needs at least one candidate; got none.");
  const seen = new Set<string>();
  return candidates.map((candidate, index) => {
    refuseUnknownKeys(`Candidate ${index + 1}`, ["name", "spectrum", "currentNoise", "gain"], candidate);
    const name = candidate.name ?? (candidate.spectrum as Partial<NamedSpectrum>).name ?? `candidate ${index + 1}`;
    if (seen.has(name)) throw new OutOfDomainError(`Candidates need different names; got ${shown(name)} twice.`);
    seen.add(name);
    if (candidate.spectrum.unit !== first.spectrum.unit)
      throw new OutOfDomainError(
        `Candidates are compared in one unit; got ${first.spectrum.unit} and ${candidate.spectrum.unit}.`,
      );
    if (candidate.currentNoise !== undefined && candidate.currentNoise.unit !== "A")
      throw new OutOfDomainError(
        `The current noise of ${name} must be in A/√Hz; got one in ${candidate.currentNoise.unit}/√Hz.`,
      );
    return { name, candidate };
  });
}

function tied(one: BandNoise, best: BandNoise): boolean {
  if (one === best) return true;
  const uncertainty = Math.hypot(one.standardUncertainty ?? 0, best.standardUncertainty ?? 0);
  return Math.abs(Math.log(one.rms / best.rms)) <= 2 * uncertainty;
}
