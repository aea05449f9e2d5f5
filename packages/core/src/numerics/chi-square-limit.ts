/** Normal quantile of 0.95. */
const oneSided = 1.6448536269514722;

/**
 * What χ² stays below in 95 % of cases, by the cube-root rule of Wilson and Hilferty (Proc. Nat. Acad. Sci. 17, 1931): 2.5 % low
 * at one degree, within 1 % from two on; good enough to tell scatter from contradiction.
 */
export function chiSquareLimit(degrees: number): number {
  const spread = 2 / (9 * degrees);
  return degrees * (1 - spread + oneSided * Math.sqrt(spread)) ** 3;
}
