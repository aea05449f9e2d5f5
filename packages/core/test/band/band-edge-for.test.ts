import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { expectRelative, relativeError } from "../../../../test/support/relative.js";
import { bandEdgeFor } from "../../src/band/band-edge-for.js";
import { bandNoise } from "../../src/band/band-noise.js";
import { whiteFlicker } from "../../src/spectrum/white-flicker.js";
import { butterworthLowPass } from "../../src/weighting/butterworth-low-pass.js";

const spectrum = whiteFlicker({ floor: 5e-9, cornerHz: 30 });

describe("the edge it finds gives the rms asked for", () => {
  test("upper and lower edges of random bands come back", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-3, max: 1e3, noNaN: true }),
        fc.double({ min: 1.5, max: 1e4, noNaN: true }),
        (fromHz, ratio) => {
          const toHz = fromHz * ratio;
          const { rms } = bandNoise(spectrum, { fromHz, toHz });
          const upper = bandEdgeFor(spectrum, { rms, fromHz });
          const lower = bandEdgeFor(spectrum, { rms, toHz });
          const back = [
            bandNoise(spectrum, { fromHz, toHz: upper.hz }).rms,
            bandNoise(spectrum, { fromHz: lower.hz, toHz }).rms,
          ];
          return back.every((found) => relativeError(found, rms) < 1e-13) && relativeError(upper.hz, toHz) < 1e-11;
        },
      ),
      { seed: 5, numRuns: 100 },
    );
  });

  test("the cutoff of a family of filters", () => {
    const found = bandEdgeFor(spectrum, {
      rms: 1e-6,
      fromHz: 0.1,
      toHz: Number.POSITIVE_INFINITY,
      family: (cutoffHz) => butterworthLowPass({ order: 2, cutoffHz }),
    });
    const weighting = butterworthLowPass({ order: 2, cutoffHz: found.hz });
    expect(found.found).toBe("cutoffHz");
    expectRelative(bandNoise(spectrum, { fromHz: 0.1, toHz: Number.POSITIVE_INFINITY, weighting }).rms, 1e-6, 1e-12);
  });
});

test("an rms that no edge gives is refused with what the ends give", () => {
  expect(() =>
    bandEdgeFor(spectrum, {
      rms: 1,
      toHz: 10,
      fromHz: 1,
      family: (cutoffHz) => butterworthLowPass({ order: 1, cutoffHz }),
    }),
  ).toThrow(/No cutoffHz gives 1 V RMS/);
  expect(() => bandEdgeFor(spectrum, { rms: 0, fromHz: 1 })).toThrow(/rms must be a positive finite number of V/);
  expect(() => bandEdgeFor(spectrum, { rms: 1 })).toThrow(/one fixed edge/);
});
