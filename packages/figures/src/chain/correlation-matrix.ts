import { OutOfDomainError } from "@quietband/core";
import { shown } from "../convert/domain.js";
import type { BudgetCorrelation } from "./budget-options.js";

/** A pair of sources by their place in the list, and their correlation. */
export interface CorrelatedPair {
  readonly first: number;
  readonly second: number;
  readonly coefficient: number;
}

/** What rounding alone may leave of a pivot that should be zero. */
const rounding = 1e-12;

/**
 * Checks correlations and finds their places: names that exist, no pair twice, coefficients in −1..1, and a matrix that is
 * positive semidefinite, without which some sum would have a negative power.
 */
export function correlatedPairs(
  correlations: readonly BudgetCorrelation[],
  names: readonly string[],
): readonly CorrelatedPair[] {
  const places = new Map(names.map((name, index) => [name, index]));
  const seen = new Set<string>();
  const pairs = correlations.flatMap(({ between, coefficient }): CorrelatedPair[] => {
    const [one, other, ...more] = between as readonly (string | undefined)[];
    if (more.length > 0)
      throw new OutOfDomainError(`A correlation is between two sources; got the names of ${more.length + 2}.`);
    const [first, second] = [placeOf(one, places), placeOf(other, places)];
    const pair = `${Math.min(first, second)} ${Math.max(first, second)}`;
    if (first === second || seen.has(pair))
      throw new OutOfDomainError(
        `Two different sources have one correlation; got "${between[0]}" with "${between[1]}"${first === second ? "" : " twice"}.`,
      );
    seen.add(pair);
    if (!(typeof coefficient === "number" && coefficient >= -1 && coefficient <= 1))
      throw new OutOfDomainError(
        `The correlation of "${between[0]}" with "${between[1]}" must be from −1 to 1; got ${shown(coefficient)}.`,
      );
    return coefficient === 0 ? [] : [{ first, second, coefficient }];
  });
  requireSemidefinite(pairs, names);
  return pairs;
}

function placeOf(name: string | undefined, places: ReadonlyMap<string, number>): number {
  const place = name === undefined ? undefined : places.get(name);
  if (place !== undefined) return place;
  throw new OutOfDomainError(`A correlation names ${shown(name)}, which is no source of the budget.`);
}

/** Cholesky with the largest pivot first: a pivot below zero by more than rounding proves a negative power. */
function requireSemidefinite(pairs: readonly CorrelatedPair[], names: readonly string[]): void {
  const involved = [...new Set(pairs.flatMap(({ first, second }) => [first, second]))];
  const size = involved.length;
  const at = new Map(involved.map((place, index) => [place, index]));
  const rows = Array.from({ length: size }, (_, row) => {
    const values = new Float64Array(size);
    values[row] = 1;
    return values;
  });
  for (const { first, second, coefficient } of pairs) {
    const [row, column] = [at.get(first) as number, at.get(second) as number];
    (rows[row] as Float64Array)[column] = coefficient;
    (rows[column] as Float64Array)[row] = coefficient;
  }
  let open = [...rows.keys()];
  while (open.length > 0) {
    const pivot = open.reduce((best, row) => (entry(rows, row, row) > entry(rows, best, best) ? row : best));
    if (entry(rows, pivot, pivot) <= rounding) break;
    open = open.filter((row) => row !== pivot);
    for (const row of open) {
      const factor = entry(rows, pivot, row) / entry(rows, pivot, pivot);
      const target = rows[row] as Float64Array;
      if (factor !== 0)
        for (const column of open) target[column] = entry(rows, row, column) - factor * entry(rows, pivot, column);
    }
  }
  // What is left must be zero: beside a diagonal of zeros anything else makes some sum negative.
  const wrong = open.find((row) => open.some((column) => Math.abs(entry(rows, row, column)) > rounding));
  if (wrong === undefined) return;
  throw new OutOfDomainError(
    `The correlations contradict each other: with them some sum of sources, "${names[involved[wrong] as number]}" among them, would have a negative power; make the matrix of coefficients positive semidefinite.`,
  );
}

function entry(rows: readonly Float64Array[], row: number, column: number): number {
  return rows[row]?.[column] ?? 0;
}
