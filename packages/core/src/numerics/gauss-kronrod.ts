/**
 * The 21-point Kronrod extension of the 10-point Gauss rule on [−1, 1] (Kronrod 1965; nodes and weights as tabulated by
 * Piessens, de Doncker-Kapenga, Überhuber, Kahaner: QUADPACK, 1983, and checked here against all monomials to degree 31).
 * Nodes ascend; odd indices are the Gauss nodes.
 */
const positiveNodes: readonly number[] = Object.freeze([
  0, 0.14887433898163122, 0.2943928627014602, 0.4333953941292472, 0.5627571346686047, 0.6794095682990244,
  0.7808177265864169, 0.8650633666889845, 0.9301574913557082, 0.9739065285171717, 0.9956571630258081,
]);
const positiveKronrod: readonly number[] = Object.freeze([
  0.1494455540029169, 0.14773910490133849, 0.14277593857706009, 0.13470921731147334, 0.12349197626206584,
  0.10938715880229764, 0.0931254545836976, 0.07503967481091996, 0.054755896574352, 0.032558162307964725,
  0.011694638867371874,
]);
const positiveGauss: readonly number[] = Object.freeze([
  0, 0.29552422471475287, 0, 0.26926671930999635, 0, 0.21908636251598204, 0, 0.14945134915058059, 0,
  0.06667134430868814, 0,
]);

/** Number of nodes of the rule. */
export const kronrodCount = 21;
export const kronrodNodes: readonly number[] = Object.freeze(mirrored(positiveNodes, -1));
export const kronrodWeights: readonly number[] = Object.freeze(mirrored(positiveKronrod, 1));
/** Weights of the embedded Gauss rule, zero at the nodes that only the Kronrod rule has. */
export const gaussWeights: readonly number[] = Object.freeze(mirrored(positiveGauss, 1));

function mirrored(fromCentre: readonly number[], sign: 1 | -1): number[] {
  const lower = fromCentre
    .slice(1)
    .toReversed()
    .map((value) => sign * value);
  return [...lower, ...fromCentre];
}
