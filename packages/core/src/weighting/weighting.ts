import type { PowerLawPiece } from "../numerics/power-law.js";

/**
 * A power gain |H(f)|²: a filter, a digital filter, a tabulated gain, a standard curve, or a cascade of them.
 * Besides its value it carries what integrators need to know beforehand, and whatever makes an exact route possible.
 */
export interface Weighting {
  /** What it is in words, for reports: "Butterworth low-pass, order 2, 5 Hz". */
  readonly name: string;
  /** Hz, where the gain is defined. */
  readonly support: readonly [number, number];
  /** Hz, ascending, inside the support: corners, resonances, table points. */
  readonly knots: readonly number[];
  /** |H|² ~ f^−lowExponent towards 0 Hz: 0 for a low-pass, −2n for a high-pass of order n. */
  readonly lowExponent: number;
  /** |H|² ~ f^−highExponent towards ∞: 2n for a low-pass of order n; 0 where it goes on oscillating. */
  readonly highExponent: number;
  /** Power gain at a frequency inside the support, 0 Hz included. */
  powerGainAt(hz: number): number;
  /** Where the gain IS power laws on intervals (a table in dB over log f): exact products with power-law spectra. */
  readonly pieces?: readonly PowerLawPiece[];
  /** |H|² as poles and zeros: closed routes by partial fractions. */
  readonly rational?: RationalGain;
  /** |H|² = u^(2·numeratorOrder) / (1 + u^(2·order)), u = f/cutoffHz: first order and Butterworth, one closed integral. */
  readonly saturating?: SaturatingGain;
  /** What a cascade is made of, cascades in it taken apart: their gains multiply. */
  readonly factors?: readonly Weighting[];
  /** Hz after which the whole gain repeats exactly: the rate of a digital filter. */
  readonly repeatsHz?: number;
  /** Lobes: how an integrator crosses any number of them with bounded work. */
  readonly lobes?: LobedGain;
}

/** A complex number in Hz (s/2π). */
export interface ComplexHz {
  readonly re: number;
  readonly im: number;
}

/** |H(f)|² = gain · f^(2·zerosAtOrigin) · Π|jf − zero|² / Π|jf − pole|²; complex ones are listed with their conjugates. */
export interface RationalGain {
  readonly gain: number;
  readonly zerosAtOrigin: number;
  readonly zeros: readonly ComplexHz[];
  readonly poles: readonly ComplexHz[];
}

/** See {@link Weighting.saturating}. */
export interface SaturatingGain {
  readonly cutoffHz: number;
  readonly order: number;
  readonly numeratorOrder: number;
}

/**
 * |H(f)|² = smoothAt(f) · Σ over parts of envelopeAt(f) · Σ_j (cosine_j cos(2π f seconds_j) + sine_j sin(2π f seconds_j)). A
 * moving average over T is one part, envelope (πfT)⁻² and waves ½ − ½ cos(2πfT). The form is closed under products, so a
 * cascade of lobed gains is one. Integrators use it where a panel holds many lobes; where it holds few, or near 0 Hz, they
 * take the gain itself, which does not cancel.
 */
export interface LobedGain {
  /** Hz, the distance between neighbouring zeros or dips: the width that a panel must resolve or count. */
  readonly lobeHz: number;
  readonly parts: readonly LobedPart[];
  /** Hz: envelopes peak at multiples of each of these (the rates of digital filters). */
  readonly peaksEveryHz: readonly number[];
  /** Hz after which the lobed factor repeats exactly: the rate of a digital filter. */
  readonly repeatsHz?: number;
  /** The lobed factor alone, without the smooth one. */
  coreAt(hz: number): number;
  /** The smooth filters of a cascade; 1 where there are none. */
  smoothAt(hz: number): number;
}

/** One part of a {@link LobedGain}. */
export interface LobedPart {
  /** Smooth between multiples of `peaksEveryHz`, of either sign. */
  envelopeAt(hz: number): number;
  readonly waves: readonly Wave[];
}

/** cosine · cos(2π f seconds) + sine · sin(2π f seconds), seconds ≥ 0. */
export interface Wave {
  readonly seconds: number;
  readonly cosine: number;
  readonly sine: number;
}
