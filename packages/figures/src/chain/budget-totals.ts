import type { BudgetLine } from "./budget-lines.js";
import type { CorrelatedPair } from "./correlation-matrix.js";
import { type CrossPower, crossPower } from "./cross-power.js";

/** Powers of a budget's lines and of what correlates; all unit². */
export interface BudgetTotals {
  readonly power: number;
  /** Without tones. */
  readonly randomPower: number;
  /** Bound on the absolute error of the power. */
  readonly error: number;
  /** Of each line: twice half of what it makes with each other line by correlation. */
  readonly crossPowers: readonly number[];
  /** The total with every line scaled by a factor on its amplitude. */
  powerWith(factorOf: (index: number) => number): number;
}

export function budgetTotals(
  lines: readonly BudgetLine[],
  pairs: readonly CorrelatedPair[],
  band: readonly [number, number],
): BudgetTotals {
  const crosses = pairs.map((pair) => ({ ...pair, ...scaled(crossOf(lines, pair, band), 2 * pair.coefficient) }));
  const crossPowers = lines.map(() => 0);
  let power = 0;
  let tones = 0;
  let error = 0;
  for (const line of lines) {
    power += line.power;
    error += line.power * (line.powerError + lines.length * Number.EPSILON);
    if (line.swing > 0) tones += line.power;
  }
  for (const cross of crosses) {
    power += cross.power;
    error += Math.abs(cross.power) * cross.powerError;
    crossPowers[cross.first] = (crossPowers[cross.first] ?? 0) + 0.5 * cross.power;
    crossPowers[cross.second] = (crossPowers[cross.second] ?? 0) + 0.5 * cross.power;
  }
  // Sources that cancel leave rounding of either sign: below its own bound a power is zero.
  const total = power <= error && crosses.length > 0 ? 0 : power;
  return {
    power: total,
    randomPower: Math.max(total - tones, 0),
    error,
    crossPowers,
    powerWith(factorOf) {
      let sum = 0;
      for (const [index, line] of lines.entries()) sum += line.power * factorOf(index) ** 2;
      for (const { first, second, power: shared } of crosses) sum += shared * factorOf(first) * factorOf(second);
      return Math.max(sum, 0);
    },
  };
}

function crossOf(
  lines: readonly BudgetLine[],
  { first, second }: CorrelatedPair,
  band: readonly [number, number],
): CrossPower {
  return crossPower(lines[first] as BudgetLine, lines[second] as BudgetLine, band);
}

function scaled({ power, powerError }: CrossPower, factor: number): CrossPower {
  return { power: power * factor, powerError: powerError + Number.EPSILON };
}
