import { requireBand } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import type { PowerLawTerm } from "../numerics/power-law.js";
import { powerLawIntegral } from "../numerics/power-law-integral.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";
import { bandNoiseTolerance, requireReached } from "./band-noise.js";
import { bandPower } from "./band-power.js";
import { requireConvergent } from "./convergence.js";
import { type FoldedPanels, foldIntoPanels, panelCountFor, panelExponentLimit } from "./folded-panels.js";
import { meanGainAt } from "./lobed-factor.js";

/** One weighting over one band, prepared for many spectra. */
export interface PreparedBand {
  readonly fromHz: number;
  readonly toHz: number;
  /** Evaluations a smooth spectrum costs. */
  readonly nodeCount: number;
  /** ∫ S·|H|² df, unit². */
  powerOf(spectrum: Spectrum): number;
  /** Its root, in the spectrum's unit. */
  rmsOf(spectrum: Spectrum): number;
}

/**
 * Prepares a weighting over a band once, so that each further spectrum costs a short fixed sum, for sweeps over many models
 * through one filter.
 *
 * The gain is integrated against polynomials in ln f on a few equal panels and becomes the weights of a fixed rule
 * Σ w_i·S(f_i), however many lobes or poles it has. A sum of power laws with exponents from −4 to
 * +4 over the whole band costs about one multiplication a node and is right to 1e-13; any other
 * spectrum goes the way of `bandNoise`, with its bound.
 *
 * @param weighting - any weighting; undefined for a brick wall.
 * @param band - edges in Hz; 0 and Infinity where the weighting leaves the spectra a finite power.
 * @throws OutOfDomainError for crossed edges; DivergentIntegralError from `powerOf` for spectra that diverge.
 *
 * @example
 * ```ts
 * import { butterworthLowPass, prepareBand, whiteFlicker } from "@quietband/core";
 * const band = prepareBand(butterworthLowPass({ order: 2, cutoffHz: 5 }), { fromHz: 0.1, toHz: 1000 });
 * band.rmsOf(whiteFlicker({ floor: 70e-9, cornerHz: 60 })); // → 1.08483e-6
 * band.rmsOf(whiteFlicker({ floor: 70e-9, cornerHz: 0 })); // → 163.47e-9
 * ```
 */
export function prepareBand(
  weighting: Weighting | undefined,
  { fromHz, toHz }: { readonly fromHz: number; readonly toHz: number },
): PreparedBand {
  requireBand(fromHz, toHz);
  const open = fromHz === 0 || toHz === Number.POSITIVE_INFINITY;
  if (open && weighting === undefined)
    throw new OutOfDomainError(
      `A band without a weighting must have finite edges above 0 Hz to be prepared; got ${fromHz} Hz to ${toHz} Hz; it integrates exactly with bandNoise.`,
    );
  const [low, high] = open ? innerBand(weighting as Weighting, fromHz, toHz) : [fromHz, toHz];
  const folded = foldIntoPanels(weighting, [low, high], panelCountFor(low, high));
  const ends = {
    low: fromHz === 0 ? endOf(weighting, low, "low") : undefined,
    high: toHz > high ? endOf(weighting, high, "high") : undefined,
  };
  const powerOf = (spectrum: Spectrum): number => {
    requireConvergent(spectrum, weighting, fromHz, toHz);
    const terms = termsOverBand(spectrum, fromHz, toHz);
    if (terms === undefined)
      return requireReached(bandPower(spectrum, weighting, [fromHz, toHz], bandNoiseTolerance), spectrum.unit).power;
    let power = 0;
    for (const term of terms) power += termPower(folded, ends, term);
    return power;
  };
  return Object.freeze({
    fromHz,
    toHz,
    nodeCount: folded.weights.length,
    powerOf,
    rmsOf: (spectrum: Spectrum): number => Math.sqrt(powerOf(spectrum)),
  });
}

/** The terms of a spectrum that is one sum of moderate power laws all over the band. */
function termsOverBand(spectrum: Spectrum, fromHz: number, toHz: number): readonly PowerLawTerm[] | undefined {
  const piece = spectrum.pieces?.find(({ from, to }) => from <= fromHz && to >= toHz);
  if (piece === undefined) return undefined;
  return piece.terms.every(({ exponent }) => Math.abs(exponent) <= panelExponentLimit) ? piece.terms : undefined;
}

interface OpenEnd {
  readonly edge: number;
  readonly gain: number;
  readonly exponent: number;
}

function termPower(
  folded: FoldedPanels,
  ends: { readonly low: OpenEnd | undefined; readonly high: OpenEnd | undefined },
  term: PowerLawTerm,
): number {
  let power = folded.powerOf(term);
  if (ends.low !== undefined) power += endPower(term, ends.low, 0, ends.low.edge);
  if (ends.high !== undefined) power += endPower(term, ends.high, ends.high.edge, Number.POSITIVE_INFINITY);
  return power;
}

/** Beyond the panels the gain is its end's power law. */
function endPower({ at, level, exponent }: PowerLawTerm, end: OpenEnd, from: number, to: number): number {
  const atEdge = level * (end.edge / at) ** -exponent * end.gain;
  return powerLawIntegral({ at: end.edge, level: atEdge, exponent: exponent + end.exponent }, from, to);
}

function endOf(weighting: Weighting | undefined, edge: number, side: "low" | "high"): OpenEnd {
  if (weighting === undefined) return { edge, gain: 1, exponent: 0 };
  if (side === "low") return { edge, gain: weighting.powerGainAt(edge), exponent: weighting.lowExponent };
  const gain = weighting.lobes === undefined ? weighting.powerGainAt(edge) : meanGainAt(weighting.lobes, edge);
  return { edge, gain, exponent: weighting.highExponent };
}

/** Where an open band is cut: so far beyond the outermost knot that the gain is its end's power law to an ulp. */
function innerBand(weighting: Weighting, fromHz: number, toHz: number): readonly [number, number] {
  const finite = [...weighting.knots, fromHz, toHz].filter((hz) => hz > 0 && hz < Number.POSITIVE_INFINITY);
  const [lowest, highest] = finite.length === 0 ? [1, 1] : [Math.min(...finite), Math.max(...finite)];
  return [fromHz === 0 ? lowest * 1e-9 : fromHz, toHz === Number.POSITIVE_INFINITY ? highest * 1e9 : toHz];
}
