import { bandNoise, firstOrderLowPass, noiseBandwidth, powerLaws, whiteFlicker } from "@quietband/core";
import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { type AmplifierStage, amplifierStage } from "../../src/chain/amplifier-stage.js";
import { noiseBudget } from "../../src/chain/noise-budget.js";
import type { AmplifierStageOptions } from "../../src/chain/stage-network.js";

const voltageNoise = whiteFlicker({ floor: 10e-9, cornerHz: 0 });
const currentNoise = powerLaws([{ coefficient: 1e-24, exponent: 0 }], { unit: "A" });
const network = { voltageNoise, currentNoise, groundOhms: 2e3, feedbackOhms: 8e3, sourceOhms: 500, kelvin: 300 };
const gainOf = (stage: AmplifierStage, what: string): number => {
  const part = stage.parts.find(({ name }) => name.includes(what));
  if (part === undefined) throw new Error(`no part ${what}`);
  return part.gain;
};

describe("gains at low frequency", () => {
  test("signal and noise gain agree in a non-inverting stage and differ in an inverting one", () => {
    const straight = amplifierStage({ connection: "nonInverting", ...network });
    const turned = amplifierStage({ connection: "inverting", ...network });
    expect([straight.signalGain, straight.noiseGain]).toEqual([5, 5]);
    expect([turned.signalGain, turned.noiseGain]).toEqual([-4, 5]);
  });

  test("every noise gets its own", () => {
    const stage = amplifierStage({ connection: "nonInverting", ...network });
    expect(gainOf(stage, "voltage noise")).toBe(5);
    expect(gainOf(stage, "at the non-inverting input")).toBe(2500);
    expect(gainOf(stage, "at the inverting input")).toBe(8000);
    expect(gainOf(stage, "source")).toBe(5);
    expect(gainOf(stage, "ground resistor")).toBe(-4);
    expect(gainOf(stage, "feedback resistor")).toBe(1);
  });

  test("in all they are N²(e² + i²(R3² + R∥²) + 4kT(R3 + R∥))", () => {
    const stage = amplifierStage({ connection: "nonInverting", ...network });
    const parallel = 1600;
    const expected = 25 * (1e-16 + 1e-24 * (500 ** 2 + parallel ** 2) + 4 * 1.380649e-23 * 300 * (500 + parallel));
    expectRelative(stage.outputNoise.powerDensityAt(123), expected, 1e-14);
    expectRelative(stage.inputNoise.powerDensityAt(123), expected / 25, 1e-14);
  });

  test("a follower has a gain of one and no resistors but its source", () => {
    const stage = amplifierStage({ connection: "nonInverting", voltageNoise, sourceOhms: 500, gainBandwidthHz: 1e6 });
    expect([stage.signalGain, stage.noiseGain, stage.closedLoopHz]).toEqual([1, 1, 1e6]);
    expect(stage.parts).toHaveLength(2);
  });

  test("the currents of the two inputs may differ", () => {
    const stage = amplifierStage({
      connection: "nonInverting",
      ...network,
      invertingCurrentNoise: powerLaws([{ coefficient: 9e-24, exponent: 0 }], { unit: "A" }),
    });
    const inverting = stage.parts.find(({ name }) => name.includes("at the inverting input"));
    expectRelative(inverting?.source.powerDensityAt(1) ?? 0, 9e-24, 1e-15);
  });
});

describe("bandwidth", () => {
  test("one pole at gain-bandwidth over noise gain, also when inverting", () => {
    const stage = amplifierStage({ connection: "inverting", ...network, gainBandwidthHz: 1e6 });
    expect(stage.closedLoopHz).toBe(2e5);
    for (const hz of [1e3, 2e5, 3e7])
      expectRelative(
        stage.signalWeighting?.powerGainAt(hz) ?? 0,
        firstOrderLowPass({ cutoffHz: 2e5 }).powerGainAt(hz),
        1e-15,
      );
  });

  test("a second pole of the amplifier peaks and leaves the white noise bandwidth as it is", () => {
    for (const q of [0.3, 1 / Math.SQRT2, 2, 10]) {
      const stage = amplifierStage({ connection: "nonInverting", ...network, gainBandwidthHz: 1e6, q });
      const weighting = stage.signalWeighting;
      if (weighting === undefined) throw new Error("no weighting");
      expectRelative(noiseBandwidth(weighting).hz, (Math.PI / 2) * 2e5, 1e-11);
      expectRelative(weighting.powerGainAt(2e5 / q), q * q, 1e-12);
    }
  });
});

// The circuit again, by its node equations in complex numbers: the amplifier is f_t/(jf), nothing else is assumed.
interface Complex {
  readonly re: number;
  readonly im: number;
}
const add = (a: Complex, b: Complex): Complex => ({ re: a.re + b.re, im: a.im + b.im });
const times = (a: Complex, b: Complex): Complex => ({ re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re });
const over = (a: Complex, b: Complex): Complex => {
  const size = b.re * b.re + b.im * b.im;
  return { re: (a.re * b.re + a.im * b.im) / size, im: (a.im * b.re - a.re * b.im) / size };
};
const power = ({ re, im }: Complex): number => re * re + im * im;

function nodalGains(hz: number, gainBandwidthHz: number, inputFarads: number, feedbackFarads: number) {
  const s = 2 * Math.PI * hz;
  const open: Complex = { re: 0, im: -gainBandwidthHz / hz };
  const toGround: Complex = { re: 1 / network.groundOhms, im: s * inputFarads };
  const feedback: Complex = { re: 1 / network.feedbackOhms, im: s * feedbackFarads };
  const node = add(toGround, feedback);
  // v− · node = v_out · feedback + injected; v_out = open · (v+ − v−)
  const beta = over(feedback, node);
  const closing = add({ re: 1, im: 0 }, times(open, beta));
  const fromInputs = over(open, closing);
  const fromCurrent = times(over(open, closing), over({ re: 1, im: 0 }, node));
  return { voltage: power(fromInputs), current: power(fromCurrent) };
}

describe("capacitance at the inverting input makes the noise gain rise", () => {
  test.each([
    [20e-12, 0],
    [20e-12, 3e-12],
    [1e-9, 1e-12],
    [0, 30e-12],
  ])("%d F to ground, %d F across the feedback: as the node equations say", (inputFarads, feedbackFarads) => {
    const gainBandwidthHz = 5e6;
    const stage = amplifierStage({
      connection: "inverting",
      ...network,
      gainBandwidthHz,
      inputFarads,
      feedbackFarads,
    });
    const at = (what: string, hz: number): number => {
      const part = stage.parts.find(({ name }) => name.includes(what));
      return (part?.gain ?? 0) ** 2 * (part?.weighting?.powerGainAt(hz) ?? Number.NaN);
    };
    for (const hz of [10, 1e4, 3e5, 1e6, 4e6, 1e8]) {
      const { voltage, current } = nodalGains(hz, gainBandwidthHz, inputFarads, feedbackFarads);
      expectRelative(at("voltage noise", hz), voltage, 1e-12);
      expectRelative(at("at the inverting input", hz), current, 1e-12);
      expectRelative(at("feedback resistor", hz), current / network.feedbackOhms ** 2, 1e-12);
      expectRelative(at("input resistor", hz), current / network.groundOhms ** 2, 1e-12);
    }
  });
});

test("a stage's parts go into a budget as they are, and a budget names the worst", () => {
  const stage = amplifierStage({ connection: "nonInverting", ...network, gainBandwidthHz: 1e6, name: "input stage" });
  const budget = noiseBudget({ sources: stage.parts, fromHz: 1, toHz: Number.POSITIVE_INFINITY });
  const whole = bandNoise(stage.outputNoise, { fromHz: 1, toHz: Number.POSITIVE_INFINITY });
  expectRelative(budget.rms, whole.rms, 1e-12);
  expect(budget.shares[0]?.name).toBe("input stage, voltage noise");
});

describe("refusals", () => {
  const base: AmplifierStageOptions = { connection: "nonInverting", ...network };
  test.each([
    ["an inverting stage without R1", { connection: "inverting", voltageNoise, feedbackOhms: 1e3 }, /groundOhms/],
    ["a follower turned round", { connection: "inverting", voltageNoise, groundOhms: 1e3 }, /feedbackOhms/],
    ["q without a speed", { ...base, q: 2 }, /gainBandwidthHz/],
    ["capacitance without a speed", { ...base, inputFarads: 1e-12 }, /gainBandwidthHz/],
    ["two causes of a peak", { ...base, q: 2, inputFarads: 1e-12, gainBandwidthHz: 1e6 }, /not both/],
    ["a current where a voltage belongs", { ...base, voltageNoise: currentNoise }, /V\/√Hz/],
    ["another connection", { ...base, connection: "upside down" as "inverting" }, /nonInverting/],
    ["a negative resistance", { ...base, sourceOhms: -1 }, /sourceOhms/],
  ] as const)("%s", (_, options, message) => {
    expect(() => amplifierStage(options as AmplifierStageOptions)).toThrow(message);
  });
});
