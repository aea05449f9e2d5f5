import { adaptiveRule, type QuadratureRule } from "../numerics/adaptive.js";
import type { Weighting } from "../weighting/weighting.js";

/** A rule with the gain folded in: ∫ g·|H|² df ≈ Σ weights·g(nodes), for g smooth over the band. */
export function weightingRule(
  weighting: Weighting | undefined,
  [fromHz, toHz]: readonly [number, number],
  relativeTolerance: number,
): QuadratureRule {
  const gainAt = (hz: number): number => weighting?.powerGainAt(hz) ?? 1;
  const knots = (weighting?.knots ?? []).filter((hz) => hz > fromHz && hz < toHz);
  const { nodes, weights } = adaptiveRule(
    (at, values) => {
      for (let k = 0; k < at.length; k += 1) values[k] = gainAt(at[k] as number);
    },
    [fromHz, ...knots, toHz],
    { relativeTolerance },
  );
  for (let k = 0; k < nodes.length; k += 1) weights[k] = (weights[k] as number) * gainAt(nodes[k] as number);
  return { nodes, weights };
}
