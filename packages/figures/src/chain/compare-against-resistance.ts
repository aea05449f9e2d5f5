import { bandNoise, OutOfDomainError, powerLaws } from "@quietband/core";
import { refuseUnknownKeys, requireNotNegative } from "../convert/domain.js";
import type { Candidate } from "./candidate.js";
import { type ComparisonPath, namedCandidates } from "./compare-curves.js";
import { boltzmannConstant } from "./physical-constants.js";
import { resolveTemperature } from "./temperature.js";

/** What {@link compareAgainstResistance} takes besides the candidates. */
export interface CompareAgainstResistanceOptions extends ComparisonPath {
  /** Source resistances, Ω, not negative; 1 Ω to 10 MΩ in half decades unless given. */
  readonly ohms?: readonly number[] | undefined;
}

/** One candidate's noises in the band, apart. */
export interface CandidateParts {
  readonly name: string;
  /** V RMS. */
  readonly voltageRms: number;
  /** A RMS; 0 where no current noise is given. */
  readonly currentRms: number;
  /** Source resistance at which current noise equals voltage noise, e/i, Ω; missing without current noise. */
  readonly crossoverOhms?: number;
}

/** All candidates at one source resistance. */
export interface ResistanceRow {
  readonly ohms: number;
  /** V RMS of the source alone. */
  readonly thermalRms: number;
  /** Name of the quietest candidate here. */
  readonly best: string;
  /** V RMS of each candidate with the source, in the order given. */
  readonly totals: readonly number[];
}

/** Candidates against source resistance: plain data for a table or a plot. */
export interface ResistanceComparison {
  readonly parts: readonly CandidateParts[];
  readonly rows: readonly ResistanceRow[];
  /** Where two candidates change places, Ω. */
  readonly changes: readonly { readonly ohms: number; readonly below: string; readonly above: string }[];
  readonly notes: readonly string[];
}

const halfDecades: readonly number[] = Object.freeze(Array.from({ length: 15 }, (_, k) => 10 ** (k / 2)));

/**
 * Noise against source resistance: e² + (i·R)² + 4kTR for each candidate through one path, with band RMS values for e and i.
 * Below e/i voltage noise rules, above it current noise; two candidates change places at √((e₁² − e₂²)/(i₂² − i₁²)).
 *
 * @param candidates - voltage noise as `spectrum`, current noise as `currentNoise`.
 * @param options - band, weighting, temperature of the source (25 °C is assumed, and said to be, unless given), `ohms`.
 * @throws OutOfDomainError for candidates that are no voltages, negative resistances; the errors of `bandNoise`.
 *
 * @example
 * ```ts
 * import { powerLaws, whiteFlicker } from "@quietband/core";
 * import { compareAgainstResistance } from "@quietband/figures";
 * const current = (density: number) => powerLaws([{ coefficient: density ** 2, exponent: 0 }], { unit: "A" });
 * const bipolar = { name: "bipolar", spectrum: whiteFlicker({ floor: 1e-9, cornerHz: 0 }), currentNoise: current(2e-12) };
 * const fet = { name: "FET", spectrum: whiteFlicker({ floor: 5e-9, cornerHz: 0 }), currentNoise: current(1e-15) };
 * const found = compareAgainstResistance([bipolar, fet], { fromHz: 1, toHz: 1000, celsius: 25 });
 * found.parts[0]?.crossoverOhms; // → 500.0
 * found.changes[0]?.ohms; // → 2449.5
 * ```
 */
export function compareAgainstResistance(
  candidates: readonly Candidate[],
  options: CompareAgainstResistanceOptions,
): ResistanceComparison {
  refuseUnknownKeys("compareAgainstResistance", ["fromHz", "toHz", "weighting", "kelvin", "celsius", "ohms"], options);
  const { fromHz, toHz, weighting, ohms = halfDecades } = options;
  for (const each of ohms) requireNotNegative("Each of ohms", each, "Ω");
  const band = { fromHz, toHz, weighting };
  const parts = namedCandidates(candidates).map(({ name, candidate }): CandidateParts => {
    if (candidate.spectrum.unit !== "V")
      throw new OutOfDomainError(
        `${name} must have a voltage noise, in V/√Hz, to stand at a source resistance; got one in ${candidate.spectrum.unit}/√Hz.`,
      );
    const voltageRms = Math.abs(candidate.gain ?? 1) * bandNoise(candidate.spectrum, band).rms;
    const currentRms = candidate.currentNoise === undefined ? 0 : bandNoise(candidate.currentNoise, band).rms;
    return Object.freeze({
      name,
      voltageRms,
      currentRms,
      ...(currentRms > 0 && { crossoverOhms: voltageRms / currentRms }),
    });
  });
  const { kelvin, words } = resolveTemperature(options);
  const white = bandNoise(powerLaws([{ coefficient: 4 * boltzmannConstant * kelvin, exponent: 0 }]), band);
  const rows = ohms.map((each): ResistanceRow => {
    const totals = parts.map(({ voltageRms, currentRms }) =>
      Math.hypot(voltageRms, currentRms * each, white.rms * Math.sqrt(each)),
    );
    const best = parts[totals.indexOf(Math.min(...totals))] as CandidateParts;
    return Object.freeze({
      ohms: each,
      thermalRms: white.rms * Math.sqrt(each),
      best: best.name,
      totals: Object.freeze(totals),
    });
  });
  return Object.freeze({
    parts: Object.freeze(parts),
    rows: Object.freeze(rows),
    changes: Object.freeze(changesAmong(parts)),
    notes: Object.freeze([`Source at ${words}; voltage and current noise of a part are taken as independent.`]),
  });
}

/** Where two straight lines e² + i²·R² meet: the thermal noise is the same for both. */
function changesAmong(parts: readonly CandidateParts[]): ResistanceComparison["changes"][number][] {
  return parts
    .flatMap((one, index) => parts.slice(index + 1).map((other) => [one, other] as const))
    .flatMap(([one, other]) => {
      const [quiet, loud] = one.voltageRms <= other.voltageRms ? [one, other] : [other, one];
      const voltage = (loud.voltageRms - quiet.voltageRms) * (loud.voltageRms + quiet.voltageRms);
      const current = (quiet.currentRms - loud.currentRms) * (quiet.currentRms + loud.currentRms);
      if (!(voltage > 0 && current > 0)) return [];
      return [Object.freeze({ ohms: Math.sqrt(voltage / current), below: quiet.name, above: loud.name })];
    })
    .toSorted((one, other) => one.ohms - other.ohms);
}
