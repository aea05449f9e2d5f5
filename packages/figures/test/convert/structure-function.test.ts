import { test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { recordDensity } from "../../src/convert/record-density.js";
import { recordPower, structureFunction } from "../../src/convert/structure-function.js";

const white = recordDensity(() => 2, { fromHz: 1, toHz: 100, recordSeconds: 10, fastestHz: 100, knots: [] });

test("white noise in a band: power is density times width, γ(τ) = S·(b − a − (sin 2πbτ − sin 2πaτ)/2πτ)", () => {
  expectRelative(recordPower(white), 2 * 99, 1e-12);
  const exact = (tau: number): number => {
    const w = 2 * Math.PI * tau;
    return 2 * (99 - (Math.sin(100 * w) - Math.sin(w)) / w);
  };
  const lags = [1e-4, 3e-3, 0.02, 0.7];
  const found = structureFunction(white, lags);
  for (const [index, lag] of lags.entries()) expectRelative(found[index] ?? 0, exact(lag), 2e-3);
});

test("1/f noise down to 0 Hz has a structure function although its power has no end", () => {
  const flicker = recordDensity((hz) => 1 / hz, { fromHz: 0, toHz: 10, recordSeconds: 10, fastestHz: 10, knots: [] });
  // γ(τ) = Cin(2πbτ) = γ + ln x − Ci(x); Cin(2π) = 2.4376534 (Abramowitz, Stegun 5.2.2, by series)
  expectRelative(structureFunction(flicker, [0.1])[0] ?? 0, 2.437653392946, 2e-3);
});
