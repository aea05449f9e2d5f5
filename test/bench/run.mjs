// Ratios of speed, all taken in this one run: ours against a general-purpose adaptive quadrature from npm and, where Python
// has it, scipy.integrate.quad in ln f with break points. Nothing here gates a build; a shared machine makes seconds
// meaningless, so only ratios are printed.
import { spawnSync } from "node:child_process";
import simpson from "integrate-adaptive-simpson";
import { budget, byQuadrature } from "./budget.mjs";
import { cases, model } from "./cases.mjs";
import { secondsACall } from "./seconds-a-call.mjs";

const python = spawnSync("python3", ["-c", "import scipy; print(scipy.__version__)"], { encoding: "utf8" });
const scipy = python.status === 0 ? python.stdout.trim() : undefined;

const ours = cases.map(({ run }) => secondsACall(run));
const theirs = scipy === undefined ? undefined : runPython();

const rows = cases.map((given, index) => {
  const other = theirs?.[index];
  return [
    given.name,
    other === undefined ? "not here" : `${(other.seconds / ours[index]).toPrecision(3)}x`,
    `${given.aim}x`,
    other === undefined ? "" : difference(given, other.rms),
  ];
});
print([["case", `over scipy ${scipy ?? ""}`.trim(), "aim", "results differ by"], ...rows]);

// The npm quadrature takes one smooth integrand and an absolute tolerance, so it gets the easy case, scaled to order 1.
const brick = cases[0];
const integrand = (t) => {
  const hz = Math.exp(t);
  return (1 + (model.cornerHz / hz) ** model.exponent) * hz * 1e-4;
};
const [low, high] = brick.band.map(Math.log);
const npm = secondsACall(() => simpson(integrand, low, high, 1e-10, 30));
console.log(`\n${brick.name}: ${(npm / ours[0]).toPrecision(3)}x over integrate-adaptive-simpson at 1e-10`);

const off = Math.abs(budget() / byQuadrature() - 1).toExponential(1);
const [whole, totalOnly] = [budget, byQuadrature].map((run) => {
  const times = Array.from({ length: 15 }, () => {
    const begin = performance.now();
    run();
    return performance.now() - begin;
  });
  return times.toSorted((one, other) => one - other)[7];
});
console.log(
  `budget of 1000 curves: ${(totalOnly / whole).toPrecision(3)}x over integrate-adaptive-simpson for the total alone (results differ by ${off}); ${whole.toPrecision(2)} ms here, aim 50 ms`,
);

function difference({ run }, rms) {
  // model 13 of the sweep is the one the Python side integrates
  return Math.abs(run(13) / rms - 1).toExponential(1);
}

function runPython() {
  const input = JSON.stringify({ model, cases: cases.map(({ gain, band }) => ({ gain, band })) });
  const made = spawnSync("python3", [new URL("quad.py", import.meta.url).pathname], { input, encoding: "utf8" });
  if (made.status !== 0) throw new Error(made.stderr);
  return JSON.parse(made.stdout);
}

function print(table) {
  const widths = table[0].map((_, column) => Math.max(...table.map((row) => row[column].length)));
  for (const row of table)
    console.log(
      row
        .map((cell, column) => cell.padEnd(widths[column]))
        .join("   ")
        .trimEnd(),
    );
}
