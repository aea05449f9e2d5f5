import { requirePositive } from "../ground/domain.js";
import { MalformedDataError, OutOfDomainError } from "../ground/errors.js";
import { refuseUnknownKeys } from "../ground/options.js";
import { type AxisCoordinates, type AxisFit, fitAxes, fitReferencePoints, type Pixel } from "./axis-fit.js";
import { type AxisKind, type PlotAxis, plotAxis } from "./plot-axis.js";
import { type AxisTick, requireConsistentTicks } from "./tick-consistency.js";

/** One axis of a plot. */
export interface AxisDescription {
  readonly kind: AxisKind;
  /** Two or more; needed unless reference points are given. */
  readonly ticks?: readonly AxisTick[] | undefined;
}

/** A place on the plot whose frequency and density are known, for scans that are rotated or sheared. */
export interface ReferencePoint {
  readonly x: number;
  readonly y: number;
  /** Hz, or as the axis is written. */
  readonly frequency: number;
  /** As the axis is written: unit/√Hz, or dB re unit/√Hz. */
  readonly density: number;
}

/** What {@link calibrateAxes} takes. Pixels count from any corner; y may go down, as in images. */
export interface AxesDescription {
  readonly frequency: AxisDescription;
  readonly density: AxisDescription;
  /** Three or more that are not on one line, instead of ticks. */
  readonly referencePoints?: readonly ReferencePoint[] | undefined;
  /** Unit of the signal: "V" for a plot in V/√Hz. */
  readonly unit: string;
  /** Standard uncertainty of a tick's or reference point's place, pixels; 0.5 unless given. */
  readonly tickErrorPixels?: number | undefined;
  /** Allow points more than a decade beyond the outer ticks. */
  readonly allowFarExtrapolation?: boolean | undefined;
}

/** How pixels of one plot become frequencies and densities, and how well. */
export interface AxesCalibration {
  readonly unit: string;
  /** Distance of each tick or reference point from the fit, pixels, and the worst of them. */
  readonly residuals: readonly TickResidual[];
  readonly worst: TickResidual;
  /** Standard uncertainty of a tick used, pixels: as given, widened where the residuals scatter more. */
  readonly tickErrorPixels: number;
  /** Frequency in Hz and density in unit/√Hz at a place on the plot. */
  pointAt(x: number, y: number): { readonly frequency: number; readonly density: number };
  /** Own coordinates at a place; for the modules that read points. */
  readonly axes: CalibratedAxes;
}

/** @internal What reading points needs. */
export interface CalibratedAxes {
  readonly frequency: PlotAxis;
  readonly density: PlotAxis;
  readonly fit: AxisFit;
}

/** How far a tick or reference point lies from the fit. */
export interface TickResidual {
  /** "frequency tick 2", "reference point 1"; counted from 1 in the order given. */
  readonly name: string;
  readonly pixels: number;
}

const decade = Math.LN10;

/**
 * Calibrates the axes of a plot from ticks, or from reference points where the scan is rotated or sheared, so that picked
 * pixels become points of a curve with an uncertainty.
 *
 * Each axis is straight in its own coordinate (ln for a logarithmic axis, dB for a dB axis); ticks are fitted by least
 * squares in pixels. Reference points fit an affine map, rotation and shear included. A tick that the others contradict is
 * refused by name.
 *
 * @param description - the two axes, their ticks or the reference points, the unit.
 * @returns the map both ways that `pointsFromPicks` and `pointsFromPath` use, with its residuals in pixels.
 * @throws OutOfDomainError for fewer than two distinct ticks, values that are not positive on a logarithmic axis, reference
 *   points on one line; MalformedDataError for a tick that the others contradict.
 *
 * @example
 * ```ts
 * import { calibrateAxes } from "@quietband/core";
 * const plot = calibrateAxes({
 *   unit: "V",
 *   frequency: { kind: "log", ticks: [{ pixel: 100, value: 1 }, { pixel: 700, value: 1000 }] },
 *   density: { kind: "log", ticks: [{ pixel: 400, value: 1e-9 }, { pixel: 50, value: 1e-7 }] },
 * });
 * plot.pointAt(300, 225).frequency; // → 10.000
 * plot.pointAt(300, 225).density; // → 1.0000e-8
 * ```
 */
export function calibrateAxes(description: AxesDescription): AxesCalibration {
  refuseUnknownKeys(
    "calibrateAxes",
    ["frequency", "density", "referencePoints", "unit", "tickErrorPixels", "allowFarExtrapolation"],
    description,
  );
  const { referencePoints, unit, tickErrorPixels = 0.5, allowFarExtrapolation = false } = description;
  requirePositive("tickErrorPixels", tickErrorPixels, "pixels");
  if (description.frequency.kind === "dB")
    throw new OutOfDomainError("The frequency axis must be 'log' or 'linear'; got 'dB'.");
  const frequency = plotAxis("frequency", description.frequency.kind);
  const density = plotAxis("density", description.density.kind);
  const fit =
    referencePoints === undefined
      ? fitFromTicks(description, frequency, density, tickErrorPixels)
      : fitFromReferencePoints(referencePoints, frequency, density, tickErrorPixels);
  const worst = fit.residuals.reduce((one, other) => (other.pixels > one.pixels ? other : one));
  const axes = Object.freeze({ frequency, density, fit });
  return Object.freeze({
    unit,
    residuals: fit.residuals,
    worst,
    tickErrorPixels: fit.sigma,
    axes,
    pointAt(x: number, y: number) {
      const at = fit.coordinatesAt({ x, y });
      if (!allowFarExtrapolation) requireNear(at, axes);
      return Object.freeze({ frequency: Math.exp(frequency.logAt(at.u)), density: Math.exp(density.logAt(at.v)) });
    },
  });
}

function fitFromTicks(description: AxesDescription, frequency: PlotAxis, density: PlotAxis, sigma: number): AxisFit {
  const ticksOf = (name: "frequency" | "density", axis: PlotAxis): readonly { pixel: number; coordinate: number }[] => {
    const ticks = description[name].ticks ?? [];
    const placed = ticks.map(({ pixel, value }) => ({ pixel, coordinate: axis.coordinateOf(value) }));
    requireConsistentTicks(name, ticks, placed, sigma);
    return placed;
  };
  return fitAxes(ticksOf("frequency", frequency), ticksOf("density", density), sigma);
}

function fitFromReferencePoints(
  points: readonly ReferencePoint[],
  frequency: PlotAxis,
  density: PlotAxis,
  sigma: number,
): AxisFit {
  const placed = points.map((point): Pixel & AxisCoordinates => ({
    x: point.x,
    y: point.y,
    u: frequency.coordinateOf(point.frequency),
    v: density.coordinateOf(point.density),
  }));
  const fit = fitReferencePoints(placed, sigma);
  const worst = fit.residuals.reduce((one, other) => (other.pixels > one.pixels ? other : one));
  if (points.length > 3 && worst.pixels > Math.max(8 * sigma, 4))
    throw new MalformedDataError(
      `The reference points do not fit one plot: ${worst.name} lies ${worst.pixels.toFixed(1)} pixels from where the others put it; check its frequency and density.`,
      { index: fit.residuals.indexOf(worst) },
    );
  return fit;
}

/** Further than a decade (or, on a linear axis, than its own length) beyond the outer ticks nothing holds the axis. */
function requireNear({ u, v }: AxisCoordinates, { frequency, density, fit }: CalibratedAxes): void {
  for (const [name, axis, at, span] of [
    ["frequency", frequency, u, fit.spanU],
    ["density", density, v, fit.spanV],
  ] as const) {
    const allowed = axis.kind === "linear" ? span[1] - span[0] : decade;
    if (at < span[0] - allowed || at > span[1] + allowed)
      throw new OutOfDomainError(
        `A point lies more than ${axis.kind === "linear" ? "the length of the axis" : "a decade"} beyond the outer ticks of the ${name} axis; add a tick near it or set allowFarExtrapolation.`,
      );
  }
}
