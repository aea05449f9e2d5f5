import type { PowerLawTerm } from "../numerics/power-law.js";
import { termAt } from "../numerics/power-law.js";
import { logRatio } from "../numerics/power-law-integral.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";

/** Frequencies, and what each stands for of the power of a band. */
export interface PowerShares {
  /** Hz, ascending. */
  readonly nodes: ArrayLike<number>;
  /** unit². */
  readonly shares: ArrayLike<number>;
  readonly total: number;
}

/**
 * The power between ascending finite edges, in closed form, dealt out to the edges: ∫ S·(1 − t) df to the lower and ∫ S·t df
 * to the upper one, t being the place between them in ln f. Whatever is a straight line in ln f between the edges then has
 * the mean Σ shares·values / total, exactly. Undefined where the spectrum is no sum of power laws or something filters it.
 */
export function edgeShares(
  { pieces }: Spectrum,
  weighting: Weighting | undefined,
  edges: readonly number[],
): PowerShares | undefined {
  if (pieces === undefined || weighting !== undefined) return undefined;
  const shares = edges.map(() => 0);
  let total = 0;
  let at = 0;
  for (let index = 1; index < edges.length; index += 1) {
    const from = edges[index - 1] as number;
    const to = edges[index] as number;
    while (at < pieces.length - 1 && (pieces[at]?.to ?? to) <= from) at += 1;
    for (const term of pieces[at]?.terms ?? []) {
      const [lower, upper] = dealt(term, from, to);
      shares[index - 1] = (shares[index - 1] as number) + lower;
      shares[index] = (shares[index] as number) + upper;
      total += lower + upper;
    }
  }
  return { nodes: edges, shares, total };
}

/** With b = (1 − a)·ln(to/from), S·f is e^(bt) in t; it is anchored at the end where it is largest, so that nothing overflows. */
function dealt(term: PowerLawTerm, from: number, to: number): readonly [number, number] {
  const width = logRatio(from, to);
  const rise = (1 - term.exponent) * width;
  const far = firstMoment(-Math.abs(rise));
  const near = mean(-Math.abs(rise)) - far;
  const [end, other] = rise > 0 ? [to, from] : [from, to];
  const scale = termAt(term, end) * end * width;
  return end < other ? [scale * near, scale * far] : [scale * far, scale * near];
}

/** ∫ e^(bt) dt over 0..1. */
function mean(b: number): number {
  return b === 0 ? 1 : Math.expm1(b) / b;
}

/** ∫ t·e^(bt) dt over 0..1, b ≤ 0; the series is right to 1e-11 where the closed form would cancel. */
function firstMoment(b: number): number {
  if (b > -0.02) return 1 / 2 + b * (1 / 3 + b * (1 / 8 + b * (1 / 30 + b / 144)));
  return (Math.exp(b) - mean(b)) / b;
}
