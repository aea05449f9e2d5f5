import { type BandNoise, NoiseError, OutOfDomainError, type Spectrum, type Weighting } from "@quietband/core";
import { refuseUnknownKeys, requireFinite, requireNotNegative, shown } from "../convert/domain.js";
import { type BandMeter, bandMeter, type MeasuredBand } from "./band-meter.js";
import type { BudgetSource } from "./budget-options.js";
import type { NamedSpectrum } from "./named-spectrum.js";
import { isSpectrum, type NoiseSource } from "./noise-source.js";
import { cascadeOf, type SignalPath, type WayOut } from "./signal-path.js";
import { bandWords, type StatedNoise } from "./stated-noise.js";
import type { Tone } from "./tone.js";

/** One source as it arrives where the budget is stated. */
export interface BudgetLine {
  readonly name: string;
  readonly given: BudgetSource;
  readonly source: NoiseSource;
  /** Amplitude gain from the source to the place, sign included. */
  readonly gain: number;
  readonly weighting: Weighting | undefined;
  /** Power at the place, unit². */
  readonly power: number;
  /** Bound on its relative error. */
  readonly powerError: number;
  /** Peak-to-peak value of a tone at the place; 0 for noise. */
  readonly swing: number;
  /** Relative standard uncertainty of the rms that the spectrum or the statement carries. */
  readonly ownUncertainty: number | undefined;
  /** The same, stated in the budget: of a gain, of a temperature. */
  readonly addedUncertainty: number | undefined;
  readonly partFactor: number | undefined;
  readonly outsidePoints: BandNoise["outsidePoints"] | undefined;
  readonly notes: readonly string[];
}

export interface LinesContext {
  readonly path: SignalPath;
  readonly place: WayOut;
  readonly fromHz: number;
  readonly toHz: number;
}

const sourceKeys: readonly string[] = Object.freeze([
  "source",
  "name",
  "gain",
  "unit",
  "weighting",
  "enters",
  "standardUncertainty",
  "partFactor",
]);

/** Every source measured at the place; the unit they share. */
export function budgetLines(
  sources: readonly BudgetSource[],
  context: LinesContext,
): { readonly lines: readonly BudgetLine[]; readonly unit: string } {
  const measure = bandMeter(context.fromHz, context.toHz);
  const weightingOf = weightingFinder(context.path);
  const names = new Set<string>();
  let unit: string | undefined;
  const lines = sources.map((given, index): BudgetLine => {
    refuseUnknownKeys(`Source ${index + 1} of a budget`, sourceKeys, given);
    const name = nameOf(given, index);
    if (names.has(name))
      throw new OutOfDomainError(`Sources of a budget need different names; got ${shown(name)} twice.`);
    names.add(name);
    return inSource(name, () => {
      const own = given.unit ?? given.source.unit;
      unit ??= own;
      if (own !== unit)
        throw new OutOfDomainError(
          `its noise is in ${own} where the others are in ${unit}; give the unit behind its gain with unit.`,
        );
      return inRange(lineOf(given, name, context, { measure, weighting: weightingOf(given) }));
    });
  });
  return { lines, unit: unit ?? "V" };
}

function lineOf(
  given: BudgetSource,
  name: string,
  context: LinesContext,
  { measure, weighting }: { readonly measure: BandMeter; readonly weighting: Weighting | undefined },
): BudgetLine {
  const { source, gain: ownGain = 1, enters = "input", standardUncertainty, partFactor } = given;
  requireFinite("gain", ownGain);
  if (standardUncertainty !== undefined) requireNotNegative("standardUncertainty", standardUncertainty);
  if (partFactor !== undefined && !(partFactor >= 1 && partFactor < Number.POSITIVE_INFINITY))
    throw new OutOfDomainError(`partFactor must be a finite factor of 1 or more; got ${shown(partFactor)}.`);
  const gain = (ownGain * context.path.wayFrom(enters).gain) / context.place.gain;
  const found = isSpectrum(source)
    ? withDensity(source, gain, measure(source, weighting))
    : withoutDensity(source, { given, gain, weighting }, context);
  // Written out: a thousand lines made by spreading records cost 20 ms.
  return {
    name,
    given,
    source,
    gain,
    weighting,
    power: found.power,
    powerError: found.powerError,
    swing: found.swing,
    ownUncertainty: found.ownUncertainty,
    addedUncertainty: standardUncertainty,
    partFactor,
    outsidePoints: found.outsidePoints,
    notes: found.notes,
  };
}

/** A power that is no number, or nothing where there should be something, comes from a gain beyond all reason. */
function inRange(line: BudgetLine): BudgetLine {
  const { gain, power } = line;
  const lost = power === 0 && gain !== 0 && gain * gain < Number.MIN_VALUE;
  if (Number.isFinite(power) && !lost) return line;
  throw new OutOfDomainError(
    `its gain of ${gain} takes its power out of the range of numbers; check the gains on its way.`,
  );
}

type Measured = Pick<BudgetLine, "power" | "powerError" | "swing" | "ownUncertainty" | "outsidePoints" | "notes">;

/** Noise with a density as it arrives. */
function withDensity(source: Spectrum, gain: number, found: MeasuredBand): Measured {
  const assumptions = (source as Partial<NamedSpectrum>).assumptions ?? [];
  return {
    power: gain * gain * found.power,
    powerError: 2 * found.numericalError,
    swing: 0,
    ownUncertainty: found.standardUncertainty,
    outsidePoints: found.outsidePoints,
    notes: restsOnAssumption(found) ? [...assumptions, ...found.notes] : assumptions,
  };
}

/** A tone or a stated figure as it arrives. */
function withoutDensity(
  source: StatedNoise | Tone,
  { given, gain, weighting }: Pick<BudgetLine, "given" | "gain" | "weighting">,
  context: LinesContext,
): Measured {
  const shared = { powerError: 4 * Number.EPSILON, outsidePoints: undefined };
  if (source.kind === "tone") {
    const passed = gain * gain * toneGain(source, weighting, context);
    return {
      ...shared,
      power: passed * source.rms * source.rms,
      swing: Math.sqrt(passed) * source.peakToPeak,
      ownUncertainty: undefined,
      notes: source.assumptions,
    };
  }
  if (given.weighting !== undefined)
    throw new OutOfDomainError(
      "a stated figure has no density that a weighting could act on; leave the weighting out.",
    );
  return {
    ...shared,
    power: gain * gain * source.rms * source.rms,
    swing: 0,
    ownUncertainty: source.standardUncertainty,
    notes: [...source.assumptions, ...bandNotes(source, context)],
  };
}

/** Whether what lies outside the points is worth a sentence: a filter leaves 1e-14 of it. */
function restsOnAssumption({ outsidePoints: { below, above } }: MeasuredBand): boolean {
  return below + above > 1e-6;
}

/** Power gain to a tone: what the weighting does at its frequency, nothing where the band leaves it out. */
function toneGain({ frequencyHz }: Tone, weighting: Weighting | undefined, { fromHz, toHz }: LinesContext): number {
  if (frequencyHz < fromHz || frequencyHz > toHz) return 0;
  return weighting?.powerGainAt(frequencyHz) ?? 1;
}

function bandNotes({ band }: StatedNoise, { fromHz, toHz }: LinesContext): string[] {
  if (band === undefined) return ["No band is stated for it; it is taken to be the budget's."];
  if (band[0] === fromHz && band[1] === toHz) return [];
  return [`It is stated for ${bandWords(band)}; the budget's band is ${bandWords([fromHz, toHz])}.`];
}

/** Own filter, then the stages on the way out. Sources that enter at one place without a filter of their own share one. */
export function weightingFinder(path: SignalPath): (given: BudgetSource) => Weighting | undefined {
  const shared = new Map<string, Weighting | undefined>();
  return ({ enters = "input", weighting }) => {
    const { weightings } = path.wayFrom(enters);
    if (weighting !== undefined) return cascadeOf([weighting, ...weightings]);
    if (!shared.has(enters)) shared.set(enters, cascadeOf(weightings));
    return shared.get(enters);
  };
}

function nameOf({ name, source }: BudgetSource, index: number): string {
  const found = name ?? (source as Partial<NamedSpectrum>).name ?? `source ${index + 1}`;
  if (typeof found === "string" && found !== "") return found;
  throw new OutOfDomainError(`The name of source ${index + 1} must be a text that is not empty; got ${shown(found)}.`);
}

/** An error says which source it came from. */
function inSource<Made>(name: string, make: () => Made): Made {
  try {
    return make();
  } catch (error) {
    if (error instanceof NoiseError) error.message = `Source "${name}": ${error.message}`;
    throw error;
  }
}
