import { expect, test } from "vitest";
import { normalFrom, uniformFrom } from "../../../../test/support/random.js";
import { bandNoise } from "../../src/band/band-noise.js";
import { type AxesDescription, calibrateAxes } from "../../src/curve/calibrate-axes.js";
import { pointsFromPicks } from "../../src/curve/points-from-picks.js";
import { type FittedCurve, fitCurve } from "../../src/fit/fit-curve.js";
import type { Sensitivity } from "../../src/spectrum/spectrum.js";
import { whiteFlicker } from "../../src/spectrum/white-flicker.js";

/** Half a pixel on every tick, reference point and pick: what the errors stated must account for. */
const sigma = 0.5;

test("floor, corner and rms of 500 plots, drawn, turned and picked with half a pixel of noise, scatter as stated", () => {
  const uniform = uniformFrom(314);
  const normal = normalFrom(uniform);
  const scores: Record<"floor" | "corner" | "rms", number[]> = { floor: [], corner: [], rms: [] };
  for (let run = 0; run < 500; run += 1) {
    const truth = { floor: 10 ** (-9 + 2 * uniform()), cornerHz: 10 ** (1 + uniform()) };
    const size = 300 * 10 ** uniform();
    const turned = run % 3 === 2;
    const turn = turned ? ((2 * uniform() - 1) * 3 * Math.PI) / 180 : 0;
    const shear = turned ? 0.05 * (2 * uniform() - 1) : 0;
    const kind = run % 3 === 1 ? ("dB" as const) : ("log" as const);
    // own coordinates: decades from 0.1 Hz to 100 kHz and of density over three decades; y goes down
    const placed = (decade: number, level: number): { x: number; y: number } => {
      const [x, y] = [(decade * size) / 6 + shear * level * size, size - (level * size) / 3];
      return { x: Math.cos(turn) * x - Math.sin(turn) * y, y: Math.sin(turn) * x + Math.cos(turn) * y };
    };
    const noisy = ({ x, y }: { x: number; y: number }): { x: number; y: number } => ({
      x: x + sigma * normal(),
      y: y + sigma * normal(),
    });
    const lowest = Math.log10(truth.floor) - 0.3;
    const written = (level: number): number => (kind === "dB" ? 20 * (lowest + level) : 10 ** (lowest + level));
    const common = { unit: "V", tickErrorPixels: sigma };
    const axes: AxesDescription = turned
      ? {
          ...common,
          frequency: { kind: "log" },
          density: { kind },
          referencePoints: [0, 3, 6].flatMap((decade) =>
            [0, 3].map((level) => ({
              ...noisy(placed(decade, level)),
              frequency: 0.1 * 10 ** decade,
              density: written(level),
            })),
          ),
        }
      : {
          ...common,
          frequency: {
            kind: "log",
            ticks: [0, 2, 4, 6].map((decade) => ({ pixel: noisy(placed(decade, 0)).x, value: 0.1 * 10 ** decade })),
          },
          density: {
            kind,
            ticks: [0, 1, 2, 3].map((level) => ({ pixel: noisy(placed(0, level)).y, value: written(level) })),
          },
        };
    const spectrum = whiteFlicker(truth);
    const picks = Array.from({ length: 25 }, (_, k) => {
      const decade = (6 * k) / 24;
      const level = 0.5 * Math.log10(spectrum.powerDensityAt(0.1 * 10 ** decade)) - lowest;
      return noisy(placed(decade, level));
    });
    const plot = calibrateAxes({ ...axes, allowFarExtrapolation: true });
    const curve = pointsFromPicks(plot, picks, { pickErrorPixels: sigma });
    const fit = fitCurve(curve, { model: "floorAndFlicker", exponent: 1, beyond: "segments" });
    // the fit carries the calibration's errors too
    const band = { fromHz: 0.1, toHz: 10 };
    // floor and corner with everything that moves them: the picks through the fit, the calibration through all points
    const moved = uncertaintyOf(fit);
    scores.floor.push(Math.log((fit.floor ?? 0) / truth.floor) / moved.floor);
    scores.corner.push(Math.log((fit.cornerHz ?? 0) / truth.cornerHz) / moved.corner);
    const noise = bandNoise(fit, band);
    scores.rms.push(Math.log(noise.rms / bandNoise(spectrum, band).rms) / (noise.standardUncertainty ?? 0));
  }
  const spread = (values: readonly number[]): number =>
    Math.sqrt(values.reduce((sum, z) => sum + z * z, 0) / values.length);
  console.log(
    `errors over stated uncertainty: ${Object.entries(scores)
      .map(([name, values]) => `${name} ${spread(values).toFixed(3)}`)
      .join(", ")}`,
  );
  for (const values of Object.values(scores)) {
    expect(spread(values)).toBeGreaterThan(0.9);
    expect(spread(values)).toBeLessThan(1.1);
  }
});

/** Standard uncertainty of ln floor and ln corner from every group of a fit's sensitivities, by the slopes at the two ends. */
function uncertaintyOf(fit: FittedCurve): { readonly floor: number; readonly corner: number } {
  const corner = fit.cornerHz ?? 1;
  let [floorSquare, cornerSquare] = [0, 0];
  for (const group of fit.sensitivities ?? []) {
    // far above the corner S is the floor's power, far below it is floor² · corner / f
    const slopesAt = (hz: number): Float64Array => {
      const slopes = new Float64Array(group.count);
      group.gradientAt(hz, (parameter, slope) => {
        slopes[parameter] = (slopes[parameter] ?? 0) + slope;
      });
      return slopes;
    };
    const [low, high] = [slopesAt(corner * 1e-3), slopesAt(corner * 1e3)];
    floorSquare += quadratic(
      group.covariance,
      high.map((slope) => 0.5 * slope),
    );
    cornerSquare += quadratic(
      group.covariance,
      low.map((slope, index) => slope - (high[index] ?? 0)),
    );
  }
  return { floor: Math.sqrt(floorSquare), corner: Math.sqrt(cornerSquare) };
}

function quadratic(covariance: Sensitivity["covariance"], slopes: Float64Array): number {
  const entry = (row: number, column: number): number =>
    "variances" in covariance
      ? row === column
        ? (covariance.variances[row] ?? 0)
        : 0
      : (covariance.matrix[row]?.[column] ?? 0);
  return slopes.reduce(
    (sum, one, row) => sum + one * slopes.reduce((inner, other, column) => inner + other * entry(row, column), 0),
    0,
  );
}
