// The cases of the band-integral benchmark, once for all who integrate them. Each is S(f)·|H(f)|² over a finite band, with
// the frequencies where it bends; `gain` names the weighting for the Python side.
import {
  aWeighting,
  bandNoise,
  butterworthLowPass,
  chebyshevLowPass,
  firstOrderLowPass,
  movingAverage,
  prepareBand,
  sincDecimator,
  whiteFlicker,
} from "@quietband/core";

const model = { floor: 70e-9, cornerHz: 53, exponent: 1.06 };

/** Models that differ a little from call to call, as in a sweep. */
const models = Array.from({ length: 64 }, (_, k) => whiteFlicker({ ...model, cornerHz: 40 + k }));

const rate = 1.024e6;
const ratio = 256;
const sinc3 = sincDecimator({ order: 3, ratio, modulatorRateHz: rate });
const average = movingAverage({ seconds: 0.02 });

const direct = (weighting, fromHz, toHz) => (k) => bandNoise(models[k & 63], { fromHz, toHz, weighting }).rms;
const prepared = (weighting, fromHz, toHz) => {
  const band = prepareBand(weighting, { fromHz, toHz });
  return (k) => band.rmsOf(models[k & 63]);
};

export const cases = [
  {
    name: "brick wall, one model at a time",
    aim: 200,
    gain: { kind: "none" },
    band: [0.1, 1e4],
    run: direct(undefined, 0.1, 1e4),
  },
  {
    name: "first-order low-pass, closed",
    aim: 300,
    gain: { kind: "butterworth", order: 1, cutoff: 1e3 },
    band: [0.1, 1e6],
    run: direct(firstOrderLowPass({ cutoffHz: 1e3 }), 0.1, 1e6),
  },
  {
    name: "Butterworth order 4, closed",
    aim: 300,
    gain: { kind: "butterworth", order: 4, cutoff: 1e3 },
    band: [0.1, 1e6],
    run: direct(butterworthLowPass({ order: 4, cutoffHz: 1e3 }), 0.1, 1e6),
  },
  {
    name: "Chebyshev order 5, 0.5 dB",
    aim: 8,
    gain: { kind: "chebyshev", order: 5, ripple: 0.5, edge: 1e3 },
    band: [0.1, 1e6],
    run: direct(chebyshevLowPass({ order: 5, rippleDb: 0.5, edgeHz: 1e3 }), 0.1, 1e6),
  },
  {
    name: "A weighting, prepared",
    aim: 25,
    gain: { kind: "a" },
    band: [10, 2e4],
    run: prepared(aWeighting(), 10, 2e4),
  },
  {
    name: "moving average 20 ms, prepared",
    aim: 50,
    gain: { kind: "average", seconds: 0.02 },
    band: [0.1, 1e3],
    run: prepared(average, 0.1, 1e3),
  },
  {
    name: "sinc³ to half the modulator rate, prepared",
    aim: 300,
    gain: { kind: "sinc", order: 3, ratio, rate },
    band: [0.1, rate / 2],
    run: prepared(sinc3, 0.1, rate / 2),
  },
  {
    name: "sinc³ to ten times the modulator rate, prepared",
    aim: 5000,
    gain: { kind: "sinc", order: 3, ratio, rate },
    band: [0.1, rate * 10],
    run: prepared(sinc3, 0.1, rate * 10),
  },
  {
    name: "sinc³ to half the modulator rate, unprepared",
    aim: 3,
    gain: { kind: "sinc", order: 3, ratio, rate },
    band: [0.1, rate / 2],
    run: direct(sinc3, 0.1, rate / 2),
  },
];

export { model };
