import { adaptiveRule, type QuadratureRule } from "../numerics/adaptive.js";
import { applyLobedRule, fewestLobes, lobedRule } from "../numerics/lobed-rule.js";
import type { LobedGain, Weighting } from "../weighting/weighting.js";
import { lobedFactor, panelShares, withLobesAsKnots } from "./lobed-factor.js";

/** A rule with the gain folded in: ∫ g·|H|² df ≈ Σ weights·g(nodes), for g smooth over the band, 0 < fromHz, toHz finite. */
export function weightingRule(
  weighting: Weighting | undefined,
  [fromHz, toHz]: readonly [number, number],
  relativeTolerance: number,
): QuadratureRule {
  const lobes = weighting?.lobes;
  if (weighting === undefined || lobes === undefined) return smoothRule(weighting, [fromHz, toHz], relativeTolerance);
  if (toHz - fromHz > fewestLobes * lobes.lobeHz)
    return countedRule(weighting, lobes, [fromHz, toHz], relativeTolerance);
  return smoothRule(withLobesAsKnots(weighting, lobes, fromHz, toHz), [fromHz, toHz], relativeTolerance);
}

function smoothRule(
  weighting: Weighting | undefined,
  [fromHz, toHz]: readonly [number, number],
  relativeTolerance: number,
): QuadratureRule {
  const knots = (weighting?.knots ?? []).filter((hz) => hz > fromHz && hz < toHz).toSorted((one, other) => one - other);
  const gainAt = (hz: number): number => weighting?.powerGainAt(hz) ?? 1;
  const { nodes, weights } = adaptiveRule(
    (at, values) => {
      for (let k = 0; k < at.length; k += 1) values[k] = gainAt(at[k] as number);
    },
    [fromHz, ...knots, toHz],
    { relativeTolerance },
  );
  return { nodes, weights: weights.map((weight, k) => weight * gainAt(nodes[k] as number)) };
}

/** The widest panels that resolve the smooth filters beside the lobes. */
function countedRule(
  weighting: Weighting,
  lobes: LobedGain,
  band: readonly [number, number],
  relativeTolerance: number,
): QuadratureRule {
  const factor = lobedFactor(lobes);
  let rule = lobedRule(factor, band, weighting.knots);
  for (const share of panelShares) {
    rule = lobedRule(factor, band, weighting.knots, share);
    const { value, error } = applyLobedRule(
      rule,
      rule.nodes.map((hz) => lobes.smoothAt(hz)),
    );
    if (error <= 100 * relativeTolerance * value) break;
  }
  const { nodes, weights } = rule;
  return { nodes, weights: weights.map((weight, k) => weight * lobes.smoothAt(nodes[k] as number)) };
}
