import { cascade, type Spectrum, type Weighting, writeQuantity } from "@quietband/core";
import { refuseUnknownKeys, requirePositive } from "../convert/domain.js";
import { bandMeter } from "./band-meter.js";
import type { BudgetLine } from "./budget-lines.js";
import type { BudgetTarget } from "./budget-options.js";
import type { BudgetTargetAnswer } from "./budget-result.js";
import type { CorrelatedPair } from "./correlation-matrix.js";
import { crossPower } from "./cross-power.js";
import { crossingEdge } from "./crossing-edge.js";
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
  const noise = lines.flatMap(noiseLine);
  const fixed = lines.reduce((sum, line) => sum + (isSpectrum(line.source) ? 0 : line.power), 0);
  const left = rms * rms - fixed;
  if (left <= 0)
    return `no bandwidth meets it, since tones and stated figures alone make ${writeQuantity(Math.sqrt(fixed), unit, { digits: 4 })}`;
  if (noise.length === 0) return "tones and stated figures do not depend on the bandwidth";
  const pieces = { noise, pairs: correlatedNoise(lines, pairs) };
  const hz =
    family === undefined
      ? crossingEdge(upToEdge(pieces, fromHz), left, edgesOf(noise, fromHz))
      : crossingEdge((cutoffHz) => powerBetween(pieces, [fromHz, toHz], family(cutoffHz)), left, searchSpan);
  return hz === undefined ? undefined : { hz };
}

/** Hz: where a search that meets no end of the noise gives up. */
const searchSpan: readonly [number, number] = Object.freeze([1e-15, 1e18]);

/** Where the upper edge is sought: above the lower one, as far as all noise is defined. */
function edgesOf(noise: readonly NoiseLine[], fromHz: number): readonly [number, number] {
  let [low, high] = [Math.max(fromHz * (1 + 1e-9), searchSpan[0]), searchSpan[1]];
  for (const { line, spectrum } of noise)
    for (const { support } of line.weighting === undefined ? [spectrum] : [spectrum, line.weighting]) {
      low = Math.max(low, support[0]);
      high = Math.min(high, support[1]);
    }
  return [low, high];
}

/** Noise with a density, and its spectrum without what only uncertainty needs. */
interface NoiseLine {
  readonly line: BudgetLine;
  readonly spectrum: Spectrum;
}

function noiseLine(line: BudgetLine): readonly NoiseLine[] {
  const { source } = line;
  if (!isSpectrum(source) || line.gain === 0) return [];
  const { unit, support, knots, lowExponent, highExponent, pieces, parts, skirt } = source;
  const spectrum = {
    unit,
    support,
    knots,
    lowExponent,
    highExponent,
    ...(pieces !== undefined && { pieces }),
    ...(parts !== undefined && { parts }),
    ...(skirt !== undefined && { skirt }),
    powerDensityAt: (hz: number) => source.powerDensityAt(hz),
  };
  return [{ line, spectrum }];
}

interface PairOfLines {
  readonly lines: readonly [BudgetLine, BudgetLine];
  readonly coefficient: number;
}

function correlatedNoise(lines: readonly BudgetLine[], pairs: readonly CorrelatedPair[]): readonly PairOfLines[] {
  return pairs.flatMap(({ first, second, coefficient }): PairOfLines[] => {
    const [one, other] = [lines[first], lines[second]];
    if (one === undefined || other === undefined || !isSpectrum(one.source) || !isSpectrum(other.source)) return [];
    return [{ lines: [one, other], coefficient }];
  });
}

interface NoisePieces {
  readonly noise: readonly NoiseLine[];
  readonly pairs: readonly PairOfLines[];
}

/**
 * The power up to an edge. Each call integrates only from the nearest edge asked for before: a search among a thousand
 * sources then costs a few milliseconds a step less.
 */
function upToEdge(pieces: NoisePieces, fromHz: number): (hz: number) => number {
  const known = [{ hz: fromHz, power: 0 }];
  return (hz) => {
    let nearest = { hz: fromHz, power: 0 };
    for (const place of known) if (place.hz <= hz && place.hz >= nearest.hz) nearest = place;
    if (nearest.hz === hz) return nearest.power;
    const power = nearest.power + powerBetween(pieces, [nearest.hz, hz], undefined);
    known.push({ hz, power });
    return power;
  };
}

/** The power in a band, through one more filter for all. */
function powerBetween(
  { noise, pairs }: NoisePieces,
  band: readonly [number, number],
  filter: Weighting | undefined,
): number {
  const measure = bandMeter(...band);
  const cascades = new Map<Weighting | undefined, Weighting | undefined>();
  const through = ({ weighting }: BudgetLine): Weighting | undefined => {
    if (filter === undefined) return weighting;
    if (!cascades.has(weighting))
      cascades.set(weighting, weighting === undefined ? filter : cascade(weighting, filter));
    return cascades.get(weighting);
  };
  let power = 0;
  for (const { line, spectrum } of noise) power += line.gain * line.gain * measure(spectrum, through(line)).power;
  for (const { lines, coefficient } of pairs) {
    const [one, other] = lines.map((line) => ({
      ...line,
      weighting: through(line),
      power: line.gain * line.gain * measure(line.source as Spectrum, through(line)).power,
    })) as [BudgetLine, BudgetLine];
    power += 2 * coefficient * crossPower(one, other, band).power;
  }
  return power;
}
