import { scaleLinear } from "d3-scale";
import { type Axis, type AxisRequest, decimal, labelledTicks, thinnedTicks } from "./axis.js";

/** A linear axis with round steps: as many labels as fit without crowding, and lines between them. */
export function linearAxis(request: AxisRequest): Axis {
  const scale = scaleLinear()
    .domain([...request.domain])
    .range([...request.range]);
  const at = (value: number): number => scale(value);
  for (const count of [8, 6, 5, 4, 3, 2, 1]) {
    const values = scale.ticks(count).map(decimal);
    const ticks = labelledTicks(values, request, at);
    if (ticks === undefined) continue;
    const labelled = new Set(values);
    const minor = scale
      .ticks(count * 4)
      .map(decimal)
      .filter((value) => !labelled.has(value))
      .map(at);
    return { domain: request.domain, range: request.range, ticks, minor, at };
  }
  const ticks = thinnedTicks(scale.ticks(2).map(decimal), request, at);
  return { domain: request.domain, range: request.range, ticks, minor: [], at };
}
