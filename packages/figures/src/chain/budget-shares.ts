import type { BudgetLine } from "./budget-lines.js";
import type { BudgetShare, NoiseBudget } from "./budget-result.js";
import type { BudgetTotals } from "./budget-totals.js";
import { isSpectrum } from "./noise-source.js";

/** Shares by size; equal ones stay in the order given. */
export function rankedShares(lines: readonly BudgetLine[], totals: BudgetTotals): readonly BudgetShare[] {
  const order = lines
    .map((_, index) => ({ index, share: shareOf(index, lines, totals) }))
    .toSorted((one, other) => other.share - one.share);
  let cumulativeShare = 0;
  return Object.freeze(
    order.map(({ index, share }, place): BudgetShare => {
      const line = lines[index] as BudgetLine;
      const uncertainty = lineUncertainty(line);
      cumulativeShare += share;
      const halved = totals.power - 0.75 * line.power - (totals.crossPowers[index] as number);
      return Object.freeze({
        rank: place + 1,
        name: line.name,
        rms: Math.sqrt(line.power),
        share,
        cumulativeShare,
        totalIfHalved: Math.sqrt(Math.max(halved, 0)),
        ...(uncertainty !== undefined && { standardUncertainty: uncertainty }),
        ...(line.partFactor !== undefined && { partFactor: line.partFactor }),
        ...(line.outsidePoints !== undefined && { outsidePoints: line.outsidePoints }),
        notes: Object.freeze([...line.notes]),
      });
    }),
  );
}

type Uncertainty = Pick<NoiseBudget, "standardUncertainty" | "uncertaintyCovers" | "expandedUncertainty">;

/**
 * u² = Σ (share_i·u_i)². What lines take from one set of points adds before it is squared; everything stated here is taken
 * as independent.
 */
export function budgetUncertainty(lines: readonly BudgetLine[], totals: BudgetTotals): Uncertainty {
  const groups = new Map<unknown, number>();
  let added = 0;
  let covered = 0;
  for (const [index, line] of lines.entries()) {
    const share = shareOf(index, lines, totals);
    if (lineUncertainty(line) !== undefined) covered += share;
    if (line.ownUncertainty !== undefined) {
      const group = (isSpectrum(line.source) ? line.source.sensitivities : undefined) ?? line;
      groups.set(group, (groups.get(group) ?? 0) + share * line.ownUncertainty);
    }
    added += (share * (line.addedUncertainty ?? 0)) ** 2;
  }
  if (lines.every((line) => lineUncertainty(line) === undefined)) return { uncertaintyCovers: 0 };
  let own = 0;
  for (const part of groups.values()) own += part * part;
  const standardUncertainty = Math.sqrt(own + added);
  return {
    standardUncertainty,
    uncertaintyCovers: covered,
    expandedUncertainty: Object.freeze({ relative: 2 * standardUncertainty, coverageFactor: 2, coverage: 0.95 }),
  };
}

/** Share of the total; where sources cancel to nothing there is none to share. */
function shareOf(index: number, lines: readonly BudgetLine[], { power, crossPowers }: BudgetTotals): number {
  if (power === 0) return 0;
  return ((lines[index] as BudgetLine).power + (crossPowers[index] as number)) / power;
}

function lineUncertainty({ ownUncertainty, addedUncertainty }: BudgetLine): number | undefined {
  if (ownUncertainty === undefined) return addedUncertainty;
  return addedUncertainty === undefined ? ownUncertainty : Math.hypot(ownUncertainty, addedUncertainty);
}
