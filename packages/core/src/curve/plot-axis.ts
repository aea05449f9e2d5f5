import { scaleLinear, scaleLog } from "d3-scale";
import { OutOfDomainError } from "../ground/errors.js";

/** How an axis of a plot is divided. On a dB axis the value is a level of density, dB re unit/√Hz. */
export type AxisKind = "log" | "linear" | "dB";

/**
 * An axis in its own coordinate, in which it is straight: ln of the value on a logarithmic axis, the value on a linear one,
 * dB as a natural logarithm of density on a dB axis.
 */
export interface PlotAxis {
  readonly kind: AxisKind;
  /** Own coordinate of a value as it is written at a tick. */
  coordinateOf(value: number): number;
  /** ln of the quantity (Hz, or density) at an own coordinate. */
  logAt(coordinate: number): number;
  /** d ln(quantity)/d coordinate there. */
  logSlopeAt(coordinate: number): number;
}

const nepersPerDb = Math.LN10 / 20;

export function plotAxis(name: string, kind: AxisKind): PlotAxis {
  switch (kind) {
    case "log": {
      const scale = scaleLog().base(Math.E).domain([1, Math.E]).range([0, 1]);
      return {
        kind,
        coordinateOf: (value) => scale(requireAboveZero(name, value)),
        logAt: (coordinate) => coordinate,
        logSlopeAt: () => 1,
      };
    }
    case "dB": {
      const scale = scaleLinear()
        .domain([0, 1 / nepersPerDb])
        .range([0, 1]);
      return {
        kind,
        coordinateOf: (value) => scale(requireNumber(name, value)),
        logAt: (coordinate) => coordinate,
        logSlopeAt: () => 1,
      };
    }
    case "linear":
      return {
        kind,
        coordinateOf: (value) => requireNumber(name, value),
        logAt: (coordinate) => Math.log(requireAboveZero(name, coordinate)),
        logSlopeAt: (coordinate) => 1 / requireAboveZero(name, coordinate),
      };
    default:
      throw new OutOfDomainError(`The kind of the ${name} axis must be 'log', 'linear' or 'dB'; got ${String(kind)}.`);
  }
}

function requireNumber(name: string, value: number): number {
  if (Number.isFinite(value)) return value;
  throw new OutOfDomainError(`A value on the ${name} axis must be a finite number; got ${value}.`);
}

function requireAboveZero(name: string, value: number): number {
  if (value > 0 && value < Number.POSITIVE_INFINITY) return value;
  throw new OutOfDomainError(`A value on the ${name} axis must be above zero and finite; got ${value}.`);
}
