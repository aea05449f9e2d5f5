export { type BandEdge, type BandEdgeOptions, bandEdgeFor } from "./band/band-edge-for.js";
export { type BandNoise, type BandNoiseOptions, bandNoise } from "./band/band-noise.js";
export { type FoldedSpectrumOptions, foldedSpectrum } from "./band/folded-spectrum.js";
export { type NoiseBandwidth, noiseBandwidth } from "./band/noise-bandwidth.js";
export { type RunningNoise, type RunningNoiseOptions, runningNoise } from "./band/running-noise.js";
export { type SpectralMoment, spectralMoment } from "./band/spectral-moment.js";
export type { UncertaintyPart } from "./band/uncertainty.js";
export type { CommonEffect, Curve, CurvePoint, CurveSourceEntry } from "./curve/curve.js";
export {
  DivergentIntegralError,
  MalformedDataError,
  NoConvergenceError,
  NoiseError,
  type NoiseErrorCode,
  OutOfDomainError,
} from "./ground/errors.js";
export type { PowerLawPiece, PowerLawTerm } from "./numerics/power-law.js";
export type { Beyond, BeyondSide } from "./spectrum/beyond.js";
export { type FunctionSpectrumOptions, functionSpectrum } from "./spectrum/function-spectrum.js";
export { polyline } from "./spectrum/polyline.js";
export { type PowerLaw, powerLaws } from "./spectrum/power-laws.js";
export { scaleSpectrum } from "./spectrum/scale-spectrum.js";
export type { Sensitivity, Spectrum, ToneSkirtForm } from "./spectrum/spectrum.js";
export { sumSpectra } from "./spectrum/sum-spectra.js";
export { type ToneSkirtOptions, toneSkirt } from "./spectrum/tone-skirt.js";
export { type WhiteFlickerOptions, whiteFlicker } from "./spectrum/white-flicker.js";
export type {
  ComplexHz,
  LobedGain,
  LobedPart,
  RationalGain,
  SaturatingGain,
  Weighting,
} from "./weighting/weighting.js";
