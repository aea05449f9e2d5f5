import { type CrossingHazard, levelStep, lowestLevel } from "./crossing-hazard.js";
import { normalTail } from "./normal-tail.js";

const from = -1;
const step = 0.1;
const count = 81;

/**
 * Covariance of a record's maximum and minus its minimum, in units of the variance, for noise that oscillates: a clump
 * above a level brings the next trough along, at −q times the height.
 *
 * Joint chance F(a)·F(b)·exp(rate of clumps that reach both), with Φ((q·peak − lower)/√(1 − q²)) of the clumps above the
 * higher level reaching the lower one on the other side, on either flank; by Hoeffding's formula the covariance is the
 * integral of joint minus product. For a narrow band minima follow maxima and the spread of the range grows by √2.
 */
export function extremesCovariance({ table, start, anticorrelation }: CrossingHazard): number {
  if (anticorrelation < 0.1) return 0;
  const q = Math.min(anticorrelation, 0.9999);
  const spread = Math.sqrt(1 - q * q);
  const levels = Array.from({ length: count }, (_, index) => from + index * step);
  const at = (level: number): number => Math.round((level - lowestLevel) / levelStep);
  const hazards = levels.map((level) => table[at(level)] as number);
  const whole = levels.map((level, index) => (hazards[index] as number) + (start[at(level)] as number));
  let sum = 0;
  for (let high = 0; high < count; high += 1)
    for (let low = 0; low <= high; low += 1) {
      const [upper, lower] = [levels[high] as number, levels[low] as number];
      const peak = upper + 1 / Math.max(upper, 1);
      const follows = Math.max(0, normalTail((lower - q * peak) / spread) - normalTail(lower));
      const shared = (hazards[high] as number) * (1 - (1 - follows) ** 2);
      // Not product times expm1(shared): with 1e5 crossings a record that is 0 times infinity.
      const apart = (whole[high] as number) + (whole[low] as number);
      const joint = Math.exp(shared - apart) - Math.exp(-apart);
      sum += high === low ? joint : 2 * joint;
    }
  return sum * step * step;
}
