import type { Pixel } from "./plot-layout.js";

/** A function to be drawn; NaN or infinite pixels (the logarithm of zero) break the line. */
export interface TraceRequest {
  /** Ascending and positive: the ends of the line and every place between where it bends. */
  readonly edges: readonly number[];
  /** Pixel of the function at x. */
  readonly pixelAt: (x: number) => Pixel;
}

const startPanels = 24;
const deepest = 7;
const tolerance = 0.1;
/** More edges than a picture has pixels say nothing: then even steps are taken. */
const mostEdges = 1500;

/** Pixels of a smooth function on a logarithmic axis: halved wherever the chord strays a tenth of a pixel from it. */
export function traceRuns({ edges, pixelAt }: TraceRequest): readonly (readonly Pixel[])[] {
  const ends = [edges[0] as number, edges.at(-1) as number] as const;
  const steps = edges.length > mostEdges ? mostEdges : startPanels;
  const ratio = Math.log(ends[1] / ends[0]);
  const even = Array.from({ length: steps - 1 }, (_, index) => ends[0] * Math.exp((ratio * (index + 1)) / steps));
  const bends = edges.length > mostEdges ? ends : edges;
  const stops = [...new Set([...bends, ...even])].toSorted((a, b) => a - b);
  const pixels: Pixel[] = [];
  for (const [index, stop] of stops.entries()) {
    const here = pixelAt(stop);
    const previous = stops[index - 1];
    if (previous !== undefined)
      refine({ pixelAt, pixels, depth: deepest }, [previous, pixels.at(-1) as Pixel], [stop, here]);
    pixels.push(here);
  }
  return splitRuns(pixels);
}

type Stop = readonly [x: number, pixel: Pixel];

function refine(
  work: { readonly pixelAt: TraceRequest["pixelAt"]; readonly pixels: Pixel[]; readonly depth: number },
  from: Stop,
  to: Stop,
): void {
  const x = Math.sqrt(from[0] * to[0]);
  const middle = work.pixelAt(x);
  const chord = (from[1][1] + to[1][1]) / 2;
  if (work.depth === 0 || Math.abs(middle[1] - chord) <= tolerance) return;
  const deeper = { ...work, depth: work.depth - 1 };
  refine(deeper, from, [x, middle]);
  work.pixels.push(middle);
  refine(deeper, [x, middle], to);
}

/** Cuts a line where a pixel is not finite. */
export function splitRuns(pixels: readonly Pixel[]): readonly (readonly Pixel[])[] {
  const runs: Pixel[][] = [];
  let run: Pixel[] = [];
  for (const pixel of pixels) {
    if (Number.isFinite(pixel[0]) && Number.isFinite(pixel[1])) {
      run.push(pixel);
      continue;
    }
    if (run.length > 0) runs.push(run);
    run = [];
  }
  if (run.length > 0) runs.push(run);
  return runs;
}

/** A run of more pixels than this is thinned: no screen shows more. */
const mostPixels = 4000;

/** Keeps of every half-pixel column the first, lowest, highest and last pixel: the same ink from a long list. */
export function thinRun(run: readonly Pixel[]): readonly Pixel[] {
  if (run.length <= mostPixels) return run;
  const kept: Pixel[] = [];
  let column: Pixel[] = [];
  for (const pixel of run) {
    if (column[0] !== undefined && Math.floor(2 * pixel[0]) !== Math.floor(2 * column[0][0])) {
      kept.push(...columnEnds(column));
      column = [];
    }
    column.push(pixel);
  }
  return [...kept, ...columnEnds(column)];
}

function columnEnds(column: readonly Pixel[]): readonly Pixel[] {
  let [top, bottom] = [0, 0];
  for (const [index, [, y]] of column.entries()) {
    if (y < (column[top] as Pixel)[1]) top = index;
    if (y > (column[bottom] as Pixel)[1]) bottom = index;
  }
  const places = [...new Set([0, top, bottom, column.length - 1])].toSorted((a, b) => a - b);
  return places.map((index) => column[index] as Pixel);
}
