import { type ComplexHz, firstOrderLowPass, polesAndZeros, secondOrderLowPass, type Weighting } from "@quietband/core";

/** The resistors and capacitors around an amplifier's inverting input, and its speed. */
export interface LoopNetwork {
  /** From the inverting input to ground, or to the signal of an inverting stage, Ω; Infinity for a follower. */
  readonly groundOhms: number;
  /** From the output to the inverting input, Ω; 0 for a follower. */
  readonly feedbackOhms: number;
  /** Not limited unless given. */
  readonly gainBandwidthHz: number | undefined;
  readonly q?: number | undefined;
  /** From the inverting input to ground, F. */
  readonly inputFarads: number;
  /** Across the feedback resistor, F. */
  readonly feedbackFarads: number;
}

/** What the closed loop does to noise over frequency; both gains are 1 at 0 Hz. */
export interface ClosedLoop {
  /** To what stands between the inputs, and to the signal of a non-inverting stage: the noise gain, which may rise. */
  readonly atInputs: Weighting;
  /** To the feedback resistor, to current at the inverting input, and to the signal of an inverting stage. */
  readonly atFeedback: Weighting;
}

/**
 * Loop with an amplifier A = f_t/(jf): noise gain N(1 + sτ_z)/(1 + sτ_f) with τ_z = (R1∥R2)(C_in + C_f), τ_f = R2·C_f;
 * closed, N(1 + sτ_z)/D and 1/D with D = 1 + sτ_f + (sN/ω_t)(1 + sτ_z). Without capacitors D is one pole at f_t/N. With
 * `q` the amplifier has a second pole such that D = 1 + s/ω_c + (q s/ω_c)², ω_c = ω_t/N.
 */
export function closedLoop(network: LoopNetwork, noiseGain: number): ClosedLoop | undefined {
  const { groundOhms, feedbackOhms, gainBandwidthHz, q, inputFarads, feedbackFarads } = network;
  if (gainBandwidthHz === undefined) return undefined;
  const cutoffHz = gainBandwidthHz / noiseGain;
  if (q !== undefined) {
    const both = secondOrderLowPass({ naturalHz: cutoffHz / q, q });
    return { atInputs: both, atFeedback: both };
  }
  const parallelOhms = groundOhms === Number.POSITIVE_INFINITY ? feedbackOhms : feedbackOhms / noiseGain;
  // In 1/Hz: s/2π is what poles and zeros are given in.
  const leadPerHz = 2 * Math.PI * parallelOhms * (inputFarads + feedbackFarads);
  const lagPerHz = 2 * Math.PI * feedbackOhms * feedbackFarads;
  if (leadPerHz === 0) {
    const both = firstOrderLowPass({ cutoffHz });
    return { atInputs: both, atFeedback: both };
  }
  const poles = quadraticRoots(leadPerHz / cutoffHz, lagPerHz + 1 / cutoffHz);
  const atHz = 1e-9 * Math.min(...poles.map(({ re, im }) => Math.hypot(re, im)), 1 / leadPerHz);
  return {
    atInputs: polesAndZeros({ poles, zeros: [{ re: -1 / leadPerHz, im: 0 }], atHz }),
    atFeedback: polesAndZeros({ poles, atHz }),
  };
}

/** Roots of 1 + b·s + a·s², a and b positive, without cancellation where one is far below the other. */
function quadraticRoots(a: number, b: number): readonly [ComplexHz, ComplexHz] {
  const discriminant = b * b - 4 * a;
  if (discriminant >= 0) {
    const sum = b + Math.sqrt(discriminant);
    return [
      { re: -2 / sum, im: 0 },
      { re: -sum / (2 * a), im: 0 },
    ];
  }
  const re = -b / (2 * a);
  const im = Math.sqrt(-discriminant) / (2 * a);
  return [
    { re, im },
    { re, im: -im },
  ];
}
