/** A labelled tick. */
export interface AxisTick {
  readonly value: number;
  /** Pixels along the axis. */
  readonly at: number;
  readonly label: string;
}

/** One axis laid out: where values go, which ticks are labelled, where fainter grid lines run. */
export interface Axis {
  readonly domain: readonly [number, number];
  /** Pixels at the two ends of the domain. */
  readonly range: readonly [number, number];
  readonly ticks: readonly AxisTick[];
  /** Pixels of grid lines without label. */
  readonly minor: readonly number[];
  /** Pixel position of a value. */
  at(value: number): number;
}

/** What both kinds of axis are made from. */
export interface AxisRequest {
  readonly domain: readonly [number, number];
  readonly range: readonly [number, number];
  /** Text of a tick; `largest` is the tick farthest from zero, for axes that keep one prefix throughout. */
  label(value: number, largest: number): string;
  /** Pixels a label takes along the axis, its breathing space included. */
  room(label: string): number;
}

/** No axis carries more labels than this: beyond it they are noise. */
const maxTickLabels = 9;

/** Labels the values; undefined when two labels would come closer than their room or there are too many. */
export function labelledTicks(
  values: readonly number[],
  request: AxisRequest,
  at: (value: number) => number,
): readonly AxisTick[] | undefined {
  if (values.length === 0 || values.length > maxTickLabels) return undefined;
  const ticks = thinnedTicks(values, request, at);
  return ticks.length === values.length ? ticks : undefined;
}

/** Labels the first value and of the following ones those that leave room. */
export function thinnedTicks(
  values: readonly number[],
  request: AxisRequest,
  at: (value: number) => number,
): readonly AxisTick[] {
  const largest = Math.max(...values.map(Math.abs));
  const kept: AxisTick[] = [];
  for (const value of values) {
    const tick = { value, at: at(value), label: request.label(value, largest) };
    const last = kept.at(-1);
    const needed = last === undefined ? 0 : (request.room(last.label) + request.room(tick.label)) / 2;
    if (last === undefined || (Math.abs(tick.at - last.at) >= needed && tick.label !== last.label)) kept.push(tick);
  }
  return kept;
}

/** The decimal a tick stands for: steps add up with errors in their last bits. */
export function decimal(value: number): number {
  return Number(value.toPrecision(12));
}
