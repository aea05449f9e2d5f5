import { bandNoise, type Curve, fitCurve, whiteFlicker } from "@quietband/core";
import { expectedPeakToPeak } from "../convert/expected-peak-to-peak.js";
import type { KnownMeasurement } from "./check-options.js";
import type { FigureView, FilteredBand } from "./figure-views.js";

/** One thing that, changed alone, would make stated and predicted agree. */
export interface Reconciler {
  readonly what: "peak-to-peak factor" | "lower edge" | "corner" | "exponent" | "record length";
  readonly unit: "" | "Hz" | "s";
  /** What the comparison took. */
  readonly taken: number;
  /** What it would have to be; undefined where no value does it. */
  readonly needed: number | undefined;
}

/** How far a quantity is moved in search of agreement, as a factor either way. */
const reach = { hz: 1e3, corner: 1e3, seconds: 1e3 };

/** What would reconcile a stated figure with a basis, each taken alone. */
export function reconcile(
  curve: Curve,
  stated: number,
  view: FigureView,
  given: { readonly filtered: FilteredBand; readonly known: KnownMeasurement; readonly target: number },
): readonly Reconciler[] {
  const { filtered, known, target } = given;
  // the RMS that would give the stated value by this basis
  const wanted = (view.noise.rms * stated) / target;
  const found: Reconciler[] = [];
  if (view.basis === "convention")
    found.push({
      what: "peak-to-peak factor",
      unit: "",
      taken: view.multipleOfRms,
      needed: (view.multipleOfRms * stated) / target,
    });
  found.push(lowerEdge(filtered, wanted), ...modelChanges(curve, filtered, wanted / view.noise.rms));
  if (view.basis === "record") found.push(recordLength(filtered, known, (view.predicted * stated) / target));
  return Object.freeze(found.map((one) => Object.freeze(one)));
}

function lowerEdge({ spectrum, band }: FilteredBand, wanted: number): Reconciler {
  const taken = band.fromHz === 0 ? (band.weighting?.knots[0] ?? 0) : band.fromHz;
  const least = Math.max(spectrum.support[0], band.fromHz / reach.hz);
  const most = Math.min(band.toHz, spectrum.support[1], taken * reach.hz) * (1 - 1e-6);
  const rmsFrom = (logHz: number): number => bandNoise(spectrum, { ...band, fromHz: Math.exp(logHz) }).rms;
  return {
    what: "lower edge",
    unit: "Hz",
    taken: band.fromHz,
    needed: least > 0 ? solved((x) => Math.log(rmsFrom(x) / wanted), Math.log(least), Math.log(most)) : undefined,
  };
}

/** Corner and exponent of the fitted model, the floor kept: by which the band's RMS changes by the factor wanted. */
function modelChanges(curve: Curve, { band }: FilteredBand, factor: number): Reconciler[] {
  const fit = fitCurve(curve, { misreadings: "downweight" });
  const { floor, cornerHz, exponent = 1 } = fit;
  if (floor === undefined || cornerHz === undefined || cornerHz === 0) return [];
  const rms = (corner: number, a: number): number =>
    bandNoise(whiteFlicker({ floor, cornerHz: corner, exponent: a, unit: curve.unit }), band).rms;
  const before = rms(cornerHz, exponent);
  const steepest = band.fromHz === 0 ? 2.9 : 4;
  const at = Math.log(cornerHz);
  const far = Math.log(reach.corner);
  return [
    {
      what: "corner",
      unit: "Hz",
      taken: cornerHz,
      needed: solved((x) => Math.log(rms(Math.exp(x), exponent) / before / factor), at - far, at + far),
    },
    {
      what: "exponent",
      unit: "",
      taken: exponent,
      needed: solved((x) => Math.log(rms(cornerHz, Math.exp(x)) / before / factor), Math.log(0.05), Math.log(steepest)),
    },
  ];
}

function recordLength({ spectrum, band }: FilteredBand, known: KnownMeasurement, wanted: number): Reconciler {
  const { recordSeconds, records, sampleRateHz } = known;
  const meanIn = (logSeconds: number): number =>
    expectedPeakToPeak(spectrum, { ...band, recordSeconds: Math.exp(logSeconds), records, sampleRateHz }).mean;
  const fewest = sampleRateHz === undefined ? 0 : 2 / sampleRateHz;
  const at = Math.log(recordSeconds);
  const far = Math.log(reach.seconds);
  const low = Math.max(at - far, fewest > 0 ? Math.log(1.01 * fewest) : Number.NEGATIVE_INFINITY);
  return {
    what: "record length",
    unit: "s",
    taken: recordSeconds,
    needed: solved((x) => Math.log(meanIn(x) / wanted), low, at + far, 0.01),
  };
}

/** Root of a monotonic function of a logarithm by bisection and secant; undefined where its ends have one sign. */
function solved(valueAt: (x: number) => number, from: number, to: number, tolerance = 1e-6): number | undefined {
  let [low, high] = [from, to];
  let [atLow, atHigh] = [valueAt(low), valueAt(high)];
  if (!(atLow * atHigh <= 0)) return undefined;
  for (let step = 0; high - low > tolerance && step < 100; step += 1) {
    // two secants, then a bisection, so that no end stays where it is
    const secant = low - (atLow * (high - low)) / (atHigh - atLow);
    const x = step % 3 === 2 || !(secant > low && secant < high) ? 0.5 * (low + high) : secant;
    const value = valueAt(x);
    if (value === 0) return Math.exp(x);
    if (value > 0 === atHigh > 0) [high, atHigh] = [x, value];
    else [low, atLow] = [x, value];
  }
  return Math.exp(0.5 * (low + high));
}
