import { sinPi } from "./sin-pi.js";

/** (sin(π·turns)/(π·turns))², the turns given whole and less their nearest whole number. */
export function sincSquared(turns: number, rest: number): number {
  if (turns === 0) return 1;
  const ratio = sinPi(rest) / (Math.PI * turns);
  return ratio * ratio;
}
