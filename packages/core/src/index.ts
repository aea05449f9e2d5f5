export type { Curve, CurvePoint, CurveSourceEntry } from "./curve/curve.js";
export {
  DivergentIntegralError,
  MalformedDataError,
  NoConvergenceError,
  NoiseError,
  type NoiseErrorCode,
  OutOfDomainError,
} from "./ground/errors.js";
export type { PowerLawPiece, PowerLawTerm } from "./numerics/power-law.js";
export { type PowerLaw, powerLaws } from "./spectrum/power-laws.js";
export type { Sensitivity, Spectrum } from "./spectrum/spectrum.js";
export { type WhiteFlickerOptions, whiteFlicker } from "./spectrum/white-flicker.js";
export type {
  ComplexHz,
  LobedGain,
  LobedPart,
  RationalGain,
  SaturatingGain,
  Weighting,
} from "./weighting/weighting.js";
