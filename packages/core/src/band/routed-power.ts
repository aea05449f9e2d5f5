/** A band integral with a bound on its absolute error, and how it was made. */
export interface RoutedPower {
  readonly power: number;
  readonly error: number;
  readonly status: "exact" | "converged" | "limit";
  readonly evaluations: number;
}

/** Half the relative error of the power, and an ulp for the root. */
export function relativeErrorOfRms({ power, error }: RoutedPower): number {
  return power === 0 ? 0 : (0.5 * error) / power + Number.EPSILON;
}
