// Ratio of speed of floor, corner and exponent with covariance from 24 to 60 points: ours against scipy.optimize.curve_fit
// (where Python has it) and ml-levenberg-marquardt, on the same curves in this one run. `fitCurve` also looks for misreadings,
// judges residuals and makes a spectrum; `refine` is the least squares alone, which is what the others do.
import { spawnSync } from "node:child_process";
import { curveFromPoints, fitCurve } from "@quietband/core";
import { levenbergMarquardt } from "ml-levenberg-marquardt";
import { fitModel } from "../../packages/core/dist/fit/fit-model.js";
import { choosePoints } from "../../packages/core/dist/fit/fit-points.js";
import { refine } from "../../packages/core/dist/fit/refine.js";
import { secondsACall } from "./seconds-a-call.mjs";

let state = 2026;
const uniform = () => {
  state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
  return (state + 0.5) / 4294967296;
};
const normal = () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());

const scatter = 0.03;
const curves = Array.from({ length: 64 }, () => {
  const count = 24 + Math.floor(37 * uniform());
  const [floor, corner, exponent] = [1e-9 * 10 ** (2 * uniform()), 10 ** (0.5 + 3 * uniform()), 0.8 + 0.5 * uniform()];
  return Array.from({ length: count }, (_, k) => {
    const frequency = 0.1 * 10 ** ((6 * k) / (count - 1));
    const density = floor * Math.sqrt(1 + (corner / frequency) ** exponent) * Math.exp(scatter * normal());
    return { frequency, density };
  });
});

const ours = curves.map((points) => curveFromPoints(points, { unit: "V", pointUncertainty: scatter }));
const model = fitModel("floorAndFlicker", { kind: "free" });
const chosen = ours.map((curve) => choosePoints(curve, 0, Number.POSITIVE_INFINITY));
const logs = curves.map((points) => ({
  x: points.map(({ frequency }) => Math.log(frequency)),
  y: points.map(({ density }) => Math.log(density)),
}));
const law =
  ([level, corner, exponent]) =>
  (x) =>
    level + 0.5 * Math.log1p(Math.exp(exponent * (corner - x)));
const options = { damping: 0.01, maxIterations: 50, errorTolerance: 1e-30, gradientDifference: 1e-6 };
const startOf = ({ y }) => [y.at(-1), Math.log(100), 1];

const ownEngine = secondsACall((k) => refine(model, chosen[k & 63]));
const ownFit = secondsACall((k) => fitCurve(ours[k & 63], { model: "floorAndFlicker", exponent: "free" }));
const ownChoice = secondsACall((k) => fitCurve(ours[k & 63]));
const npm = secondsACall((k) =>
  levenbergMarquardt(logs[k & 63], law, { ...options, initialValues: startOf(logs[k & 63]) }),
);
const made = spawnSync("python3", [new URL("fit.py", import.meta.url).pathname], {
  input: JSON.stringify({ curves: logs, scatter }),
  encoding: "utf8",
});
const scipy = made.status === 0 ? JSON.parse(made.stdout) : undefined;

const times = (seconds, own) => `${(seconds / own).toPrecision(3)}x`;
console.log("floor, corner, exponent and covariance; 64 curves of 24 to 60 points");
for (const [name, own] of [
  ["least squares alone", ownEngine],
  ["fitCurve, one model", ownFit],
  ["fitCurve, choice of models", ownChoice],
])
  console.log(
    `${name}: ${scipy === undefined ? "scipy is not here" : `${times(scipy.seconds, own)} over scipy.optimize.curve_fit ${scipy.version}`}, ${times(npm, own)} over ml-levenberg-marquardt 5.1.0`,
  );
