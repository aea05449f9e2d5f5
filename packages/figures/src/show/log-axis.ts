import { scaleLinear, scaleLog } from "d3-scale";
import { type Axis, type AxisRequest, type AxisTick, decimal, labelledTicks, thinnedTicks } from "./axis.js";

/**
 * A logarithmic axis. Of several ladders of round values (decades, every third, sixth ... decade; 1-3 and 1-2-5; every
 * digit; even steps below one decade) it labels the one that shows the most labels without crowding.
 *
 * d3's own log ticks are not used: they come out empty on narrow domains, and as powers made by multiplication they
 * miss the decimal (1e-9 becomes 1.0000000000000001e-9).
 */
export function logAxis(request: AxisRequest): Axis {
  const [low, high] = request.domain;
  const scale = scaleLog()
    .domain([low, high])
    .range([...request.range]);
  const at = (value: number): number => scale(value);
  const decades = Math.log10(high / low);
  const pixelsPerDecade = Math.abs(request.range[1] - request.range[0]) / decades;
  let best: { ticks: readonly AxisTick[]; minor: readonly number[] } = { ticks: [], minor: [] };
  const all = ladders(low, high, pixelsPerDecade);
  for (const ladder of all) {
    const ticks = labelledTicks(ladder.values, request, at);
    if (ticks !== undefined && ticks.length > best.ticks.length) best = { ticks, minor: ladder.minor };
  }
  // On a short axis no ladder may fit as a whole: then the finest is labelled where it leaves room.
  const finest = all.at(-1);
  if (best.ticks.length < 2 && finest !== undefined)
    best = { ticks: thinnedTicks(finest.values, request, at), minor: finest.minor };
  const labelled = new Set(best.ticks.map((tick) => tick.value));
  const minor = best.minor.filter((value) => !labelled.has(value)).map(at);
  return { domain: request.domain, range: request.range, ticks: best.ticks, minor, at };
}

interface Ladder {
  readonly values: readonly number[];
  /** Values of the unlabelled lines that go with it. */
  readonly minor: readonly number[];
}

const everyDigit = [1, 2, 3, 4, 5, 6, 7, 8, 9] as const;

/** Roundest first: of two ladders with as many labels the first is taken. */
function ladders(low: number, high: number, pixelsPerDecade: number): readonly Ladder[] {
  const within = (digits: readonly number[], stride = 1): readonly number[] => multiples(low, high, digits, stride);
  const fine = fineGrid(pixelsPerDecade);
  const list: Ladder[] = [1, 3, 6, 12, 24, 48].map((stride) => ({
    values: within([1], stride),
    minor: within(stride === 1 ? fine : [1]),
  }));
  if (high < 300 * low) list.push({ values: within([1, 3]), minor: within(fine) });
  list.push({ values: within([1, 2, 5]), minor: within(fine) });
  list.push({ values: within(everyDigit), minor: within(fine) });
  if (high < 10 * low) for (const count of [2, 3, 4, 5, 6, 8]) list.push(evenSteps(low, high, count));
  return list;
}

/** Which multiples of a decade get a line of their own, so that lines stay at least three pixels apart. */
function fineGrid(pixelsPerDecade: number): readonly number[] {
  if (pixelsPerDecade * Math.log10(10 / 9) >= 3) return everyDigit;
  if (pixelsPerDecade * Math.log10(2) >= 6) return [1, 2, 5];
  return [1];
}

/** digit · 10^n inside [low, high], read as decimals so that each is the double nearest to what its label says. */
function multiples(low: number, high: number, digits: readonly number[], stride: number): readonly number[] {
  const first = Math.floor(Math.log10(low) / stride) * stride;
  const values: number[] = [];
  for (let exponent = first; exponent <= Math.ceil(Math.log10(high)); exponent += stride)
    for (const digit of digits) {
      const value = Number(`${digit}e${exponent}`);
      if (value >= low && value <= high) values.push(value);
    }
  return values;
}

function evenSteps(low: number, high: number, count: number): Ladder {
  const steps = scaleLinear().domain([low, high]);
  return { values: steps.ticks(count).map(decimal), minor: steps.ticks(4 * count).map(decimal) };
}
