import { scaleSpectrum, sumSpectra, type Weighting, writeQuantity } from "@quietband/core";
import { refuseUnknownKeys } from "../convert/domain.js";
import { closedLoop } from "./closed-loop.js";
import { filteredSpectrum } from "./filtered-spectrum.js";
import { type NamedSpectrum, namedSpectrum } from "./named-spectrum.js";
import { type AmplifierStageOptions, resolveNetwork, type StageNetwork, stageOptionNames } from "./stage-network.js";
import { type StagePart, stageParts } from "./stage-parts.js";

/** An amplifier stage: its gains and its noises. */
export interface AmplifierStage {
  readonly name: string;
  /** What the signal gets: 1 + R2/R1, or −R2/R1 inverting. */
  readonly signalGain: number;
  /** What noise between the inputs gets: 1 + R2/R1 in both connections. */
  readonly noiseGain: number;
  /** Gain-bandwidth over noise gain, Hz: −3 dB of a one-pole loop. */
  readonly closedLoopHz?: number;
  /** What the closed loop does to the signal; 1 at 0 Hz. */
  readonly signalWeighting?: Weighting;
  /** Every noise with its gain to the output: sources for `noiseBudget`. */
  readonly parts: readonly StagePart[];
  /** All noise at the output, V²/Hz, bandwidth of the stage included. */
  readonly outputNoise: NamedSpectrum;
  /** The same divided by the signal gain. It is smaller at the output of the stage's own roll-off; see `outputNoise`. */
  readonly inputNoise: NamedSpectrum;
}

/**
 * The noise of an amplifier with its resistors: voltage noise and source resistor get the noise gain N = 1 + R2/R1, current
 * noise of the inverting input gets R2, of the other N·R3, R1 gets R2/R1 and R2 itself 1. In all
 * N²·(e_n² + i_n²(R3² + (R1∥R2)²) + 4kT(R3 + R1∥R2)) for equal currents. The signal gets N, or −R2/R1 when inverting: a
 * gain of −1 has a noise gain of 2.
 *
 * With `gainBandwidthHz` the loop closes at gainBandwidthHz/N: one pole, noise bandwidth π/2 of it. `q` gives it a peak by a
 * second pole of the amplifier (natural frequency f_c/q, f_c = gainBandwidthHz/N): the white noise bandwidth stays π/2·f_c,
 * since peak and earlier roll-off cancel. `inputFarads` and `feedbackFarads` give the exact peak of the noise gain that a
 * capacitance at the inverting input makes.
 *
 * @throws OutOfDomainError for negative or non-finite values, spectra of another unit, an inverting stage without R1 or R2,
 *   capacitances or q without `gainBandwidthHz`, or both.
 * @see S. Franco, Design with Operational Amplifiers and Analog Integrated Circuits, chapter 7.
 *
 * @example
 * ```ts
 * import { bandNoise, whiteFlicker } from "@quietband/core";
 * import { amplifierStage } from "@quietband/figures";
 * const stage = amplifierStage({
 *   connection: "inverting",
 *   voltageNoise: whiteFlicker({ floor: 10e-9, cornerHz: 0 }),
 *   groundOhms: 1e3,
 *   feedbackOhms: 1e3,
 *   celsius: 25,
 * });
 * stage.signalGain; // → −1
 * stage.noiseGain; // → 2
 * bandNoise(stage.outputNoise, { fromHz: 0, toHz: 1e4 }).rms; // → 2.0807e-6
 * ```
 */
export function amplifierStage(options: AmplifierStageOptions): AmplifierStage {
  refuseUnknownKeys("amplifierStage", stageOptionNames, options);
  const { connection, name = "stage" } = options;
  const network = resolveNetwork(options);
  const { groundOhms, feedbackOhms } = network;
  const ratio = feedbackOhms / groundOhms;
  const noiseGain = 1 + ratio;
  const inverting = connection === "inverting";
  const signalGain = inverting ? -ratio : noiseGain;
  const loop = closedLoop(network, noiseGain);
  const parts = stageParts(options, network).map(({ at, ...part }): StagePart => {
    const weighting = loop?.[at];
    return Object.freeze({ ...part, unit: "V", ...(weighting !== undefined && { weighting }) });
  });
  const total = sumSpectra(
    ...parts.map(({ source, gain, unit, weighting }) =>
      filteredSpectrum(scaleSpectrum(source, gain, { unit }), weighting),
    ),
  );
  const assumptions = [
    `${name}: signal gain ${rounded(signalGain)}, noise gain ${rounded(noiseGain)}${loopWords(network, noiseGain)}.`,
    ...parts.flatMap(({ source }) => source.assumptions),
  ];
  const outputNoise = namedSpectrum(total, `${name} at its output`, assumptions);
  const signalWeighting = inverting ? loop?.atFeedback : loop?.atInputs;
  return Object.freeze({
    name,
    signalGain,
    noiseGain,
    ...(network.gainBandwidthHz !== undefined && { closedLoopHz: network.gainBandwidthHz / noiseGain }),
    ...(signalWeighting !== undefined && { signalWeighting }),
    parts: Object.freeze(parts),
    outputNoise,
    inputNoise: namedSpectrum(scaleSpectrum(total, 1 / signalGain), `${name} at its input`, assumptions),
  });
}

function loopWords({ gainBandwidthHz, q, inputFarads, feedbackFarads }: StageNetwork, noiseGain: number): string {
  if (gainBandwidthHz === undefined) return ", no bandwidth of its own";
  const closes = `, closed loop at ${writeQuantity(gainBandwidthHz / noiseGain, "Hz", { digits: 4 })}`;
  if (q !== undefined) return `${closes} with q = ${rounded(q)}`;
  if (inputFarads + feedbackFarads === 0) return `${closes}, one pole`;
  return `${closes}, ${writeQuantity(inputFarads, "F")} at the inverting input, ${writeQuantity(feedbackFarads, "F")} across the feedback`;
}

function rounded(value: number): string {
  return String(Number(value.toPrecision(4))).replace("-", "−");
}
