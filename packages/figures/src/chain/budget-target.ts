import {
  bandEdgeFor,
  functionSpectrum,
  OutOfDomainError,
  type Spectrum,
  scaleSpectrum,
  sumSpectra,
  type Weighting,
  writeQuantity,
} from "@quietband/core";
import { refuseUnknownKeys, requirePositive } from "../convert/domain.js";
import type { BudgetLine } from "./budget-lines.js";
import type { BudgetTarget } from "./budget-options.js";
import type { BudgetTargetAnswer } from "./budget-result.js";
import type { CorrelatedPair } from "./correlation-matrix.js";
import { filteredSpectrum } from "./filtered-spectrum.js";
import { isSpectrum } from "./noise-source.js";

/** The budget a target is compared with; for a family of filters, `lines` without the last weighting. */
export interface TargetContext {
  readonly lines: readonly BudgetLine[];
  readonly pairs: readonly CorrelatedPair[];
  readonly rms: number;
  readonly unit: string;
  readonly fromHz: number;
  readonly toHz: number;
}

/** Whether the total meets the target, and the band edge or cutoff at which it would be just met. */
export function answerTarget(target: BudgetTarget, context: TargetContext): BudgetTargetAnswer {
  refuseUnknownKeys("target", ["rms", "family"], target);
  const { rms, family } = target;
  const { unit } = context;
  requirePositive("The rms of a target", rms, unit);
  const met = context.rms <= rms;
  const verdict = `${writeQuantity(context.rms, unit, { digits: 4 })} RMS ${met ? "meets" : "misses"} the target of ${writeQuantity(rms, unit)}`;
  const edge = edgeMeeting(rms, family, context);
  if (edge === undefined) {
    const moved = family === undefined ? "upper band edge" : "cutoff";
    return Object.freeze({ rms, met, text: `${verdict}; ${met ? `so does every ${moved}` : `no ${moved} does`}.` });
  }
  if (typeof edge === "string") return Object.freeze({ rms, met, text: `${verdict}; ${edge}.` });
  const at = writeQuantity(edge.hz, "Hz", { digits: 4 });
  const place = family === undefined ? `an upper band edge of ${at}` : `a cutoff of ${at}`;
  return Object.freeze({
    rms,
    met,
    ...(family === undefined ? { toHz: edge.hz } : { cutoffHz: edge.hz }),
    text: `${verdict}; ${place} would meet it exactly.`,
  });
}

/** The edge; why there is none; undefined where the search for it meets no end. */
function edgeMeeting(
  rms: number,
  family: BudgetTarget["family"],
  { lines, pairs, fromHz, toHz, unit }: TargetContext,
): { readonly hz: number } | string | undefined {
  const noise = lines.filter((line) => isSpectrum(line.source) && line.gain !== 0);
  const fixed = lines.reduce((sum, line) => sum + (isSpectrum(line.source) ? 0 : line.power), 0);
  const left = rms * rms - fixed;
  if (left <= 0)
    return `no bandwidth meets it, since tones and stated figures alone make ${writeQuantity(Math.sqrt(fixed), unit, { digits: 4 })}`;
  if (noise.length === 0) return "tones and stated figures do not depend on the bandwidth";
  const { spectrum, weighting } = totalNoise(
    noise,
    pairs.map((pair) => ({ ...pair, lines: [lines[pair.first], lines[pair.second]] as const })),
  );
  const wanted = { rms: Math.sqrt(left), fromHz, weighting };
  try {
    return family === undefined
      ? bandEdgeFor(spectrum, wanted)
      : bandEdgeFor(filteredSpectrum(spectrum, weighting), { rms: wanted.rms, fromHz, toHz, family });
  } catch (error) {
    if (error instanceof OutOfDomainError) return undefined;
    throw error;
  }
}

interface PairOfLines extends CorrelatedPair {
  readonly lines: readonly [BudgetLine | undefined, BudgetLine | undefined];
}

/** All noise at the place as one spectrum; where one weighting acts on all of it, that is kept apart for exact routes. */
function totalNoise(
  lines: readonly BudgetLine[],
  pairs: readonly PairOfLines[],
): { readonly spectrum: Spectrum; readonly weighting?: Weighting | undefined } {
  const groups = new Map<Weighting | undefined, Spectrum[]>();
  for (const { source, gain, weighting } of lines) {
    const group = groups.get(weighting) ?? [];
    group.push(scaleSpectrum(source as Spectrum, gain, { unit: "1" }));
    groups.set(weighting, group);
  }
  const sums = [...groups].map(([weighting, spectra]) => ({ weighting, spectrum: sumSpectra(...spectra) }));
  const [only, ...others] = sums;
  const correlated = pairs.filter((pair) => pair.lines.every((line) => line !== undefined && lines.includes(line)));
  if (only !== undefined && others.length === 0 && correlated.length === 0) return only;
  const sum = sumSpectra(...sums.map(({ spectrum, weighting }) => filteredSpectrum(spectrum, weighting)));
  return { spectrum: correlated.length === 0 ? sum : withCrossTerms(sum, correlated) };
}

function withCrossTerms(sum: Spectrum, pairs: readonly PairOfLines[]): Spectrum {
  return functionSpectrum(
    (hz) => {
      let power = sum.powerDensityAt(hz);
      for (const { lines, coefficient } of pairs) {
        const [one, other] = lines.map((line) => amplitudeAt(line as BudgetLine, hz)) as [number, number];
        power += 2 * coefficient * one * other;
      }
      return Math.max(power, 0);
    },
    {
      unit: sum.unit,
      support: sum.support,
      knots: sum.knots,
      lowExponent: sum.lowExponent,
      highExponent: Math.min(sum.highExponent, 100),
    },
  );
}

function amplitudeAt({ source, gain, weighting }: BudgetLine, hz: number): number {
  const density = (source as Spectrum).powerDensityAt(hz) * (weighting?.powerGainAt(hz) ?? 1);
  return gain * Math.sqrt(density);
}
