import { applyLobedRule, lobedRule } from "../numerics/lobed-rule.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import type { LobedGain, Weighting } from "../weighting/weighting.js";
import { adaptivePower } from "./adaptive-route.js";
import { lobedFactor, meanGainAt, panelShares, withLobesAsKnots } from "./lobed-factor.js";
import { periodicPower } from "./periodic-lobes.js";
import type { RoutedPower } from "./routed-power.js";

/** Where lobes without end are replaced by their mean: what waves do beyond is bounded and below 1e-16 of the whole. */
const farBeyond = 1e8;
/** Periods of a digital filter that are taken one by one before they are folded. */
const periodsOneByOne = 24;
/** Lobes that the adaptive route can still take one by one where waves cancel (the stop band of a long filter). */
const mostLobesOneByOne = 20_000;

/** ∫ S·|H|² over a band of many lobes, 0 < fromHz. */
export function countedPower(
  spectrum: Spectrum,
  weighting: Weighting,
  lobes: LobedGain,
  [fromHz, toHz]: readonly [number, number],
  relativeTolerance: number,
): RoutedPower {
  const { repeatsHz } = lobes;
  if (repeatsHz !== undefined && toHz > periodsOneByOne * repeatsHz) {
    const { repeatsHz: _, ...unfolded } = lobes;
    const split = periodicPower(spectrum, weighting, lobes, repeatsHz, [fromHz, toHz]);
    const over = (low: number, high: number): RoutedPower[] =>
      high > low ? [countedPower(spectrum, weighting, unfolded, [low, high], relativeTolerance)] : [];
    return [...over(fromHz, split.fromHz), split.power, ...over(split.toHz, toHz)].reduce(added);
  }
  if (toHz === Number.POSITIVE_INFINITY) return endlessPower(spectrum, weighting, lobes, fromHz, relativeTolerance);
  const counted = ruledPower(spectrum, weighting, lobes, [fromHz, toHz], relativeTolerance);
  const many = (toHz - fromHz) / lobes.lobeHz > mostLobesOneByOne;
  if (counted.error <= relativeTolerance * counted.power || many) return counted;
  const resolved = adaptivePower(
    spectrum,
    withLobesAsKnots(weighting, lobes, fromHz, toHz),
    [fromHz, toHz],
    relativeTolerance,
  );
  return resolved.error < counted.error ? resolved : counted;
}

export function added(one: RoutedPower, other: RoutedPower): RoutedPower {
  return {
    power: one.power + other.power,
    error: one.error + other.error,
    status: one.status === "limit" ? "limit" : other.status,
    evaluations: one.evaluations + other.evaluations,
  };
}

function ruledPower(
  spectrum: Spectrum,
  weighting: Weighting,
  lobes: LobedGain,
  [fromHz, toHz]: readonly [number, number],
  relativeTolerance: number,
): RoutedPower {
  const factor = lobedFactor(lobes);
  const knots = [...spectrum.knots, ...weighting.knots];
  let best: RoutedPower | undefined;
  let evaluations = 0;
  for (const share of panelShares) {
    const rule = lobedRule(factor, [fromHz, toHz], knots, share);
    const values = rule.nodes.map((hz) => spectrum.powerDensityAt(hz) * lobes.smoothAt(hz));
    const { value, error } = applyLobedRule(rule, values);
    evaluations += values.length;
    if (best === undefined || error < best.error) best = { power: value, error, status: "converged", evaluations };
    if (best.error <= 0.1 * relativeTolerance * best.power) break;
  }
  return { ...(best as RoutedPower), evaluations };
}

/** To ∞: counted to far beyond every knot, then the mean gain, which is a smooth weighting, with the waves bounded. */
function endlessPower(
  spectrum: Spectrum,
  weighting: Weighting,
  lobes: LobedGain,
  fromHz: number,
  relativeTolerance: number,
): RoutedPower {
  const edge = farBeyond * Math.max(fromHz, lobes.lobeHz, ...spectrum.knots, ...weighting.knots);
  const below = countedPower(spectrum, weighting, lobes, [fromHz, edge], relativeTolerance);
  const mean = { ...weighting, knots: [], powerGainAt: (hz: number) => meanGainAt(lobes, hz) };
  const above = adaptivePower(spectrum, mean, [edge, Number.POSITIVE_INFINITY], relativeTolerance);
  const waves = lobes.parts.reduce(
    (sum, part) =>
      sum +
      Math.abs(part.envelopeAt(edge)) *
        part.waves.reduce(
          (size, { seconds, cosine, sine }) => size + (seconds === 0 ? 0 : Math.hypot(cosine, sine) / seconds),
          0,
        ),
    0,
  );
  const swing = (spectrum.powerDensityAt(edge) * lobes.smoothAt(edge) * waves) / Math.PI;
  return added(below, { ...above, error: above.error + swing });
}
