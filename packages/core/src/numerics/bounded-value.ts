/** A value with a bound on its absolute error: never below the true error. */
export interface BoundedValue {
  readonly value: number;
  readonly error: number;
}
