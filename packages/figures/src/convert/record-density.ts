/**
 * The power density a record is made of, as straight lines between nodes, with what lies beyond the first and last node
 * gathered. Ranges answer to it with a third or less of its relative error, so 0.2 % a panel is plenty.
 */
export interface RecordDensity {
  /** Hz, ascending. */
  readonly hz: Float64Array;
  /** unit²/Hz at the nodes. */
  readonly density: Float64Array;
  /** Power at the first node that ramps through the record as all that is slower does, unit². */
  readonly slowPower: number;
  /** Power beyond the last node: noise without memory at every lag used, unit². */
  readonly fastPower: number;
}

/** What {@link recordDensity} takes. */
export interface RecordDensityOptions {
  readonly fromHz: number;
  readonly toHz: number;
  readonly recordSeconds: number;
  /** Hz, what the shortest lag asks to be resolved. */
  readonly fastestHz: number;
  /** Hz, in any order. */
  readonly knots: readonly number[];
}

const panelsADecade = 40;
const mostNodes = 6000;

/** Lays nodes 40 a decade and at every knot, and halves panels on which the density bends. */
export function recordDensity(
  densityAt: (hz: number) => number,
  { fromHz, toHz, recordSeconds, fastestHz, knots }: RecordDensityOptions,
): RecordDensity {
  const low = Math.max(fromHz, Math.min(1e-3 / recordSeconds, toHz / 1e3));
  const reach = 100 * Math.max(fastestHz, ...knots.filter((knot) => knot < toHz), 1 / recordSeconds);
  const high = Math.min(toHz, reach);
  const corners = [low, ...knots.filter((knot) => knot > low && knot < high).toSorted((a, b) => a - b), high];
  const hz: number[] = [low];
  for (const [index, to] of corners.entries()) {
    const from = corners[index - 1];
    if (from === undefined || to <= from) continue;
    const panels = Math.max(1, Math.ceil(panelsADecade * Math.log10(to / from)));
    for (let panel = 1; panel < panels; panel += 1) hz.push(from * Math.exp((Math.log(to / from) * panel) / panels));
    hz.push(to);
  }
  const nodes = refine(densityAt, hz, fastestHz);
  return {
    ...nodes,
    slowPower: fromHz < low ? slowRest(densityAt, fromHz, low) : 0,
    fastPower: toHz > high ? fastRest(densityAt, high, toHz) : 0,
  };
}

/** Halves panels until what the straight line misses is small against the power, and against the power of differences. */
function refine(
  densityAt: (hz: number) => number,
  start: readonly number[],
  fastestHz: number,
): { hz: Float64Array; density: Float64Array } {
  const steep = (hz: number): number => Math.min(1, (hz / fastestHz) ** 2);
  const values = start.map(densityAt);
  let power = 0;
  let differences = 0;
  for (let index = 1; index < start.length; index += 1) {
    const [from, to] = [start[index - 1] as number, start[index] as number];
    const panel = ((to - from) * ((values[index - 1] as number) + (values[index] as number))) / 2;
    power += panel;
    differences += panel * steep(to);
  }
  const hz: number[] = [start[0] as number];
  const density: number[] = [values[0] as number];
  const pending: [number, number, number][] = [];
  for (let index = 1; index < start.length; index += 1) {
    pending.push([start[index] as number, values[index] as number, 0]);
    for (let panel = pending.pop(); panel !== undefined; panel = pending.pop()) {
      const [to, valueTo, depth] = panel;
      const from = hz.at(-1) as number;
      const middle = (from + to) / 2;
      const value = densityAt(middle);
      const missed = Math.abs(value - ((density.at(-1) as number) + valueTo) / 2);
      const matters = (to - from) * missed > 2e-5 * power || (to - from) * missed * steep(to) > 2e-5 * differences;
      if (depth < 20 && missed > 2e-3 * value && matters && hz.length < mostNodes)
        pending.push([to, valueTo, depth + 1], [middle, value, depth + 1]);
      else {
        hz.push(to);
        density.push(valueTo);
      }
    }
  }
  return { hz: Float64Array.from(hz), density: Float64Array.from(density) };
}

/** ∫ f²·S df below the first node over its f²: components this slow are ramps, and a ramp's variance is all f². */
function slowRest(densityAt: (hz: number) => number, fromHz: number, low: number): number {
  const next = Math.max(fromHz, low / 4);
  const level = densityAt(low);
  if (level === 0) return 0;
  const exponent = next < low ? Math.log(densityAt(next) / level) / Math.log(low / next) : 0;
  const power = 3 - exponent;
  if (fromHz === 0) return (level * low) / Math.max(power, 1e-3);
  const span = Math.log(low / fromHz);
  return level * low * (Math.abs(power * span) < 1e-6 ? span : -Math.expm1(-power * span) / power);
}

/** Power above the last node, by the power law through its last octave. */
function fastRest(densityAt: (hz: number) => number, high: number, toHz: number): number {
  const level = densityAt(high);
  const before = densityAt(high / 2);
  if (level === 0 || before === 0) return 0;
  const fall = Math.log2(before / level) - 1;
  const span = Math.log(toHz / high);
  if (fall <= 1e-3) return Number.isFinite(span) ? level * high * span : 0;
  return (level * high * -Math.expm1(-fall * span)) / fall;
}
