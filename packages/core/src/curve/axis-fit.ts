import { OutOfDomainError } from "../ground/errors.js";
import { chiSquareLimit } from "../numerics/chi-square-limit.js";

/** A place on the plot, pixels. */
export interface Pixel {
  readonly x: number;
  readonly y: number;
}

/** A place in the axes' own coordinates: u along the frequency axis, v along the density axis. */
export interface AxisCoordinates {
  readonly u: number;
  readonly v: number;
}

/** An affine map from the axes' coordinates to pixels, fitted by least squares, and its inverse. */
export interface AxisFit {
  readonly residuals: readonly { readonly name: string; readonly pixels: number }[];
  /** Standard uncertainty of a tick's place, pixels. */
  readonly sigma: number;
  /** Outer ticks in their own coordinates. */
  readonly spanU: readonly [number, number];
  readonly spanV: readonly [number, number];
  coordinatesAt(pixel: Pixel): AxisCoordinates;
  /** What a shift in pixels does to the coordinates read there. */
  shiftOf(pixel: Pixel): AxisCoordinates;
  /** Independent errors of the fit, one standard deviation each: how each shifts what is read at some coordinates. */
  readonly components: readonly {
    readonly name: string;
    readonly shiftAt: (at: AxisCoordinates) => AxisCoordinates;
  }[];
}

interface PlacedTick {
  readonly pixel: number;
  readonly coordinate: number;
}

/** One pixel coordinate as a linear function of u and v, with orthonormal functions that carry its uncertainty. */
interface LinearFit {
  readonly offset: number;
  readonly byU: number;
  readonly byV: number;
  readonly residuals: readonly number[];
  readonly freedom: number;
  /** Functions of (u, v) whose coefficients are independent with the variance of one tick. */
  readonly basis: readonly ((at: AxisCoordinates) => number)[];
}

/** Axes along the pixels: x from the frequency ticks, y from the density ticks. */
export function fitAxes(frequency: readonly PlacedTick[], density: readonly PlacedTick[], sigma: number): AxisFit {
  const alongX = fitLinear(
    frequency.map(({ pixel }) => pixel),
    frequency.map(({ coordinate }) => ({ u: coordinate, v: 0 })),
    "u",
  );
  const alongY = fitLinear(
    density.map(({ pixel }) => pixel),
    density.map(({ coordinate }) => ({ u: 0, v: coordinate })),
    "v",
  );
  const named = (name: string, fit: LinearFit) =>
    fit.residuals.map((pixels, index) => ({ name: `${name} tick ${index + 1}`, pixels: Math.abs(pixels) }));
  return assemble(alongX, alongY, {
    residuals: [...named("frequency", alongX), ...named("density", alongY)],
    sigma,
    spanU: spanOf(frequency.map(({ coordinate }) => coordinate)),
    spanV: spanOf(density.map(({ coordinate }) => coordinate)),
  });
}

/** Axes that are rotated or sheared: both pixel coordinates over both plot coordinates, from three or more places. */
export function fitReferencePoints(points: readonly (Pixel & AxisCoordinates)[], sigma: number): AxisFit {
  if (points.length < 3)
    throw new OutOfDomainError(`An affine calibration needs at least three reference points; got ${points.length}.`);
  const alongX = fitLinear(
    points.map(({ x }) => x),
    points,
    "uv",
  );
  const alongY = fitLinear(
    points.map(({ y }) => y),
    points,
    "uv",
  );
  return assemble(alongX, alongY, {
    residuals: points.map((_, index) => ({
      name: `reference point ${index + 1}`,
      pixels: Math.hypot(alongX.residuals[index] ?? 0, alongY.residuals[index] ?? 0),
    })),
    sigma,
    spanU: spanOf(points.map(({ u }) => u)),
    spanV: spanOf(points.map(({ v }) => v)),
  });
}

function assemble(
  alongX: LinearFit,
  alongY: LinearFit,
  given: Pick<AxisFit, "residuals" | "sigma" | "spanU" | "spanV">,
): AxisFit {
  const determinant = alongX.byU * alongY.byV - alongX.byV * alongY.byU;
  const size = Math.hypot(alongX.byU, alongY.byU) * Math.hypot(alongX.byV, alongY.byV);
  if (!(Math.abs(determinant) > 1e-6 * size))
    throw new OutOfDomainError("The two axes run in one direction on the plot; check the pixels of the calibration.");
  const shiftOf = ({ x, y }: Pixel): AxisCoordinates => ({
    u: (alongY.byV * x - alongX.byV * y) / determinant,
    v: (alongX.byU * y - alongY.byU * x) / determinant,
  });
  const sigma = widened(given.sigma, [alongX, alongY]);
  // A pixel coordinate predicted too high makes what is read there too low.
  const components = [
    ...alongX.basis.map((basis) => ({
      name: "frequency axis",
      shiftAt: (at: AxisCoordinates) => shiftOf({ x: -sigma * basis(at), y: 0 }),
    })),
    ...alongY.basis.map((basis) => ({
      name: "density axis",
      shiftAt: (at: AxisCoordinates) => shiftOf({ x: 0, y: -sigma * basis(at) }),
    })),
  ];
  return Object.freeze({
    ...given,
    residuals: Object.freeze(given.residuals),
    sigma,
    shiftOf,
    components: Object.freeze(components),
    coordinatesAt: ({ x, y }: Pixel) => shiftOf({ x: x - alongX.offset, y: y - alongY.offset }),
  });
}

/** The given uncertainty, or the scatter of the residuals where that is larger and rests on two degrees of freedom or more. */
function widened(sigma: number, fits: readonly LinearFit[]): number {
  const freedom = fits.reduce((sum, fit) => sum + fit.freedom, 0);
  const square = fits.reduce((sum, fit) => sum + fit.residuals.reduce((part, residual) => part + residual ** 2, 0), 0);
  // two or three degrees of freedom scatter by themselves: only what contradicts the stated error replaces it
  return freedom >= 2 && square > chiSquareLimit(freedom) * sigma * sigma ? Math.sqrt(square / freedom) : sigma;
}

/** Least squares on functions made orthonormal over the places (Gram–Schmidt), so that coefficients are independent. */
function fitLinear(pixels: readonly number[], places: readonly AxisCoordinates[], over: "u" | "v" | "uv"): LinearFit {
  const mean = {
    u: places.reduce((sum, { u }) => sum + u, 0) / places.length,
    v: places.reduce((sum, { v }) => sum + v, 0) / places.length,
  };
  const plain: ((at: AxisCoordinates) => number)[] = [() => 1];
  if (over.includes("u")) plain.push(({ u }) => u - mean.u);
  if (over.includes("v")) plain.push(({ v }) => v - mean.v);
  const basis: ((at: AxisCoordinates) => number)[] = [];
  for (const candidate of plain) {
    const made = [...basis];
    const shares = made.map((earlier) => places.reduce((sum, at) => sum + earlier(at) * candidate(at), 0));
    const rest = (at: AxisCoordinates): number =>
      made.reduce((value, earlier, index) => value - (shares[index] ?? 0) * earlier(at), candidate(at));
    const before = Math.sqrt(places.reduce((sum, at) => sum + candidate(at) ** 2, 0));
    const norm = Math.sqrt(places.reduce((sum, at) => sum + rest(at) ** 2, 0));
    if (!(norm > 1e-6 * before))
      throw new OutOfDomainError("The reference points lie on one line of the plot; add one off that line.");
    basis.push((at) => rest(at) / norm);
  }
  const coefficients = basis.map((made) => places.reduce((sum, at, index) => sum + made(at) * (pixels[index] ?? 0), 0));
  const valueAt = (at: AxisCoordinates): number =>
    basis.reduce((sum, made, index) => sum + (coefficients[index] ?? 0) * made(at), 0);
  const offset = valueAt({ u: 0, v: 0 });
  return {
    offset,
    byU: over === "v" ? 0 : valueAt({ u: 1, v: 0 }) - offset,
    byV: over === "u" ? 0 : valueAt({ u: 0, v: 1 }) - offset,
    residuals: places.map((at, index) => (pixels[index] ?? 0) - valueAt(at)),
    freedom: places.length - basis.length,
    basis,
  };
}

function spanOf(values: readonly number[]): readonly [number, number] {
  return Object.freeze([Math.min(...values), Math.max(...values)] as const);
}
