export { type AmplifierStage, amplifierStage } from "./chain/amplifier-stage.js";
export type {
  BudgetCorrelation,
  BudgetSource,
  BudgetStage,
  BudgetTarget,
  NoiseBudgetOptions,
} from "./chain/budget-options.js";
export type { BudgetPeakToPeak, BudgetShare, BudgetTargetAnswer, NoiseBudget } from "./chain/budget-result.js";
export { type NamedSpectrum, namedSpectrum } from "./chain/named-spectrum.js";
export { type NoiseAcrossOptions, noiseAcross } from "./chain/noise-across.js";
export { noiseBudget } from "./chain/noise-budget.js";
export type { NoiseSource } from "./chain/noise-source.js";
export { parallelParts } from "./chain/parallel-parts.js";
export { type QuantizationNoise, type QuantizationOptions, quantization } from "./chain/quantization.js";
export { type RatiometricPaths, ratiometricRemainder } from "./chain/ratiometric-remainder.js";
export type { ReferenceInput } from "./chain/reference-input.js";
export { type ReferenceUseOptions, type ReferenceUseRow, referenceNoiseByUse } from "./chain/reference-noise-by-use.js";
export { type ReferencePathNoise, referencePathNoise } from "./chain/reference-path-noise.js";
export type { ReferenceConverter, ReferencePathOptions } from "./chain/reference-path-options.js";
export { type ResistorExcessNoiseOptions, resistorExcessNoise } from "./chain/resistor-excess-noise.js";
export type { ReferencePart } from "./chain/seen-parts.js";
export { type ShotNoiseOptions, shotNoise } from "./chain/shot-noise.js";
export { type SkirtInBin, type SkirtInBinOptions, skirtInBin } from "./chain/skirt-in-bin.js";
export type { AmplifierStageOptions } from "./chain/stage-network.js";
export type { StagePart } from "./chain/stage-parts.js";
export { type StatedNoise, type StatedNoiseOptions, statedNoise } from "./chain/stated-noise.js";
export type { Temperature } from "./chain/temperature.js";
export { type ThermalNoiseOptions, thermalNoise } from "./chain/thermal-noise.js";
export { type RippleShape, type Tone, type ToneOptions, tone } from "./chain/tone.js";
export { csvTable } from "./show/csv-table.js";
export type { DensityInterval, DensityModel, DensityPlotOptions } from "./show/density-options.js";
export { densityPlot } from "./show/density-plot.js";
export type { LinePlotAxis, LinePlotOptions, PlotMark, PlotSeries } from "./show/line-options.js";
export { linePlot } from "./show/line-plot.js";
export { markdownTable } from "./show/markdown-table.js";
export { type ResidualRow, residualBars } from "./show/residual-bars.js";
export { type RunningNoiseCurve, type RunningNoisePlotOptions, runningNoisePlot } from "./show/running-noise-plot.js";
export { type ShareBarsOptions, type ShareRow, shareBars } from "./show/share-bars.js";
export type { Table, TableCell, TableColumn } from "./show/table.js";
export { textTable } from "./show/text-table.js";
