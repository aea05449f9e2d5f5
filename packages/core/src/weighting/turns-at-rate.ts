/** f/rate less its nearest whole number; the remainder is exact, so phases keep their digits through many periods. */
export function turnsAtRate(hz: number, rate: number): number {
  const rest = hz % rate;
  return (rest > 0.5 * rate ? rest - rate : rest) / rate;
}
