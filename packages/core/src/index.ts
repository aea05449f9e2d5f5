export { type BandEdge, type BandEdgeOptions, bandEdgeFor } from "./band/band-edge-for.js";
export { type BandNoise, type BandNoiseOptions, bandNoise } from "./band/band-noise.js";
export { type FoldedSpectrumOptions, foldedSpectrum } from "./band/folded-spectrum.js";
export { type NoiseBandwidth, noiseBandwidth } from "./band/noise-bandwidth.js";
export { type PointCost, type PointCostOptions, pointCost } from "./band/point-cost.js";
export { type PreparedBand, prepareBand } from "./band/prepare-band.js";
export { type RunningNoise, type RunningNoiseOptions, runningNoise } from "./band/running-noise.js";
export { type SpectralMoment, spectralMoment } from "./band/spectral-moment.js";
export type { UncertaintyPart } from "./band/uncertainty.js";
export { assumedPointUncertainty } from "./curve/assumed-point-uncertainty.js";
export type { Pixel } from "./curve/axis-fit.js";
export {
  type AxesCalibration,
  type AxesDescription,
  type AxisDescription,
  type CalibratedAxes,
  calibrateAxes,
  type ReferencePoint,
  type TickResidual,
} from "./curve/calibrate-axes.js";
export type { CommonEffect, Curve, CurvePoint, CurveSourceEntry } from "./curve/curve.js";
export { type CurveOptions, curveFromPoints, type GivenPoint } from "./curve/curve-from-points.js";
export type { AxisKind } from "./curve/plot-axis.js";
export { type PathOptions, pointsFromPath } from "./curve/points-from-path.js";
export { type PicksOptions, pointsFromPicks } from "./curve/points-from-picks.js";
export { type ReadCurveOptions, readCurve } from "./curve/read-curve.js";
export { thinCurve } from "./curve/thin-curve.js";
export type { AxisTick } from "./curve/tick-consistency.js";
export { writeCurve } from "./curve/write-curve.js";
export type { BandFigure, SpotDensity } from "./fit/band-figure.js";
export type { Bump } from "./fit/bump.js";
export type { FitAlternative } from "./fit/choose.js";
export type { CornerLimit } from "./fit/figure-limits.js";
export {
  type FitAgainstPoints,
  type FitAgainstPointsOptions,
  fitAgainstPoints,
  type HeavyPoint,
} from "./fit/fit-against-points.js";
export {
  type BandFiguresFit,
  type BandFiguresOptions,
  type FigureCost,
  type FigureResidual,
  fitBandFigures,
} from "./fit/fit-band-figures.js";
export { type FitResidual, type FittedCurve, fitCurve } from "./fit/fit-curve.js";
export type { ExponentPrior, FitModelName, FitOptions } from "./fit/fit-options.js";
export type { LeftOutPoint } from "./fit/fit-points.js";
export type { FitFinding } from "./fit/judge.js";
export type { FigureFinding } from "./fit/judge-figures.js";
export type { Misreading } from "./fit/misreadings.js";
export {
  DivergentIntegralError,
  MalformedDataError,
  NoConvergenceError,
  NoiseError,
  type NoiseErrorCode,
  OutOfDomainError,
} from "./ground/errors.js";
export { type BandEdges, readBand } from "./ground/read-band.js";
export { type Quantity, type ReadQuantityOptions, readQuantity } from "./ground/read-quantity.js";
export { type WriteQuantityOptions, writeQuantity } from "./ground/write-quantity.js";
export type { PowerLawPiece, PowerLawTerm } from "./numerics/power-law.js";
export type { Beyond, BeyondSide } from "./spectrum/beyond.js";
export { type DensityIntervalOptions, type DensityRange, densityInterval } from "./spectrum/density-interval.js";
export { type FunctionSpectrumOptions, functionSpectrum } from "./spectrum/function-spectrum.js";
export { polyline } from "./spectrum/polyline.js";
export { type PowerLaw, powerLaws } from "./spectrum/power-laws.js";
export { scaleSpectrum } from "./spectrum/scale-spectrum.js";
export type { Sensitivity, Spectrum, ToneSkirtForm } from "./spectrum/spectrum.js";
export { sumSpectra } from "./spectrum/sum-spectra.js";
export { type ToneSkirtOptions, toneSkirt } from "./spectrum/tone-skirt.js";
export { type WhiteFlickerOptions, whiteFlicker } from "./spectrum/white-flicker.js";
export { aWeighting } from "./weighting/a-weighting.js";
export { type AverageOfReadingsOptions, averageOfReadings } from "./weighting/average-of-readings.js";
export { type BesselLowPassOptions, besselLowPass } from "./weighting/bessel-low-pass.js";
export { type ButterworthBandPassOptions, butterworthBandPass } from "./weighting/butterworth-band-pass.js";
export { type ButterworthHighPassOptions, butterworthHighPass } from "./weighting/butterworth-high-pass.js";
export { type ButterworthLowPassOptions, butterworthLowPass } from "./weighting/butterworth-low-pass.js";
export { cWeighting } from "./weighting/c-weighting.js";
export { cascade } from "./weighting/cascade.js";
export { type ChebyshevLowPassOptions, chebyshevLowPass } from "./weighting/chebyshev-low-pass.js";
export { type FirFilterOptions, firFilter } from "./weighting/fir-filter.js";
export { type FirstOrderHighPassOptions, firstOrderHighPass } from "./weighting/first-order-high-pass.js";
export { type FirstOrderLowPassOptions, firstOrderLowPass } from "./weighting/first-order-low-pass.js";
export { type GainOptions, gain } from "./weighting/gain.js";
export { type GainTableRow, gainTable } from "./weighting/gain-table.js";
export { type IdenticalPolesOptions, identicalPoles } from "./weighting/identical-poles.js";
export { type IirFilterOptions, iirFilter } from "./weighting/iir-filter.js";
export { type MovingAverageOptions, movingAverage } from "./weighting/moving-average.js";
export { type PolesAndZerosOptions, polesAndZeros } from "./weighting/poles-and-zeros.js";
export { programmeWeighting } from "./weighting/programme-weighting.js";
export { type RecordMeanRemovedOptions, recordMeanRemoved } from "./weighting/record-mean-removed.js";
export { type RecordTrendRemovedOptions, recordTrendRemoved } from "./weighting/record-trend-removed.js";
export { type ResonatorOptions, resonator } from "./weighting/resonator.js";
export { type SampleDifferenceOptions, sampleDifference } from "./weighting/sample-difference.js";
export { type SecondOrderLowPassOptions, secondOrderLowPass } from "./weighting/second-order-low-pass.js";
export { type SincDecimatorOptions, sincDecimator } from "./weighting/sinc-decimator.js";
export { telephoneWeighting } from "./weighting/telephone-weighting.js";
export { type TwoSampleVarianceOptions, twoSampleVariance } from "./weighting/two-sample-variance.js";
export type {
  ComplexHz,
  LobedGain,
  LobedPart,
  RationalGain,
  SaturatingGain,
  Wave,
  Weighting,
} from "./weighting/weighting.js";
