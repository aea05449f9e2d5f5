export { type AmplifierStage, amplifierStage } from "./chain/amplifier-stage.js";
export {
  type AveragedNoise,
  type AveragingLimit,
  type AveragingLimitOptions,
  averagingLimit,
} from "./chain/averaging-limit.js";
export type {
  BudgetCorrelation,
  BudgetSource,
  BudgetStage,
  BudgetTarget,
  NoiseBudgetOptions,
} from "./chain/budget-options.js";
export type { BudgetPeakToPeak, BudgetShare, BudgetTargetAnswer, NoiseBudget } from "./chain/budget-result.js";
export type { Candidate } from "./chain/candidate.js";
export { chainSchema } from "./chain/chain-schema.js";
export {
  type CandidateParts,
  type CompareAgainstResistanceOptions,
  compareAgainstResistance,
  type ResistanceComparison,
  type ResistanceRow,
} from "./chain/compare-against-resistance.js";
export {
  type CandidateRow,
  type CompareCurvesOptions,
  type ComparisonPath,
  type CurveComparison,
  compareCurves,
} from "./chain/compare-curves.js";
export { type FilterKind, type FilterNumber, filterKinds } from "./chain/filter-kinds.js";
export { type NamedSpectrum, namedSpectrum } from "./chain/named-spectrum.js";
export { type NoiseAcrossOptions, noiseAcross } from "./chain/noise-across.js";
export { noiseBudget } from "./chain/noise-budget.js";
export type { NoiseSource } from "./chain/noise-source.js";
export { type ObservationNoiseOptions, type ObservedNoise, observationNoise } from "./chain/observation-noise.js";
export { parallelParts } from "./chain/parallel-parts.js";
export { type QuantizationNoise, type QuantizationOptions, quantization } from "./chain/quantization.js";
export { type RatiometricPaths, ratiometricRemainder } from "./chain/ratiometric-remainder.js";
export { type Chain, type ReadChainOptions, readChain } from "./chain/read-chain.js";
export type { ReferenceInput } from "./chain/reference-input.js";
export { type ReferenceUseOptions, type ReferenceUseRow, referenceNoiseByUse } from "./chain/reference-noise-by-use.js";
export { type ReferencePathNoise, referencePathNoise } from "./chain/reference-path-noise.js";
export type { ReferenceConverter, ReferencePathOptions } from "./chain/reference-path-options.js";
export { referenceSpectrum } from "./chain/reference-spectrum.js";
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
export { amplitudeRatioDb, amplitudeRatioFromDb } from "./convert/amplitude-ratio-db.js";
export { type ConverterFigures, type ConverterFiguresOptions, converterFigures } from "./convert/converter-figures.js";
export { crestFactor, crestFactorFor } from "./convert/crest-factor.js";
export {
  type ExpectedPeakToPeak,
  type ExpectedPeakToPeakOptions,
  expectedPeakToPeak,
} from "./convert/expected-peak-to-peak.js";
export {
  type ConverterScale,
  idealConverterSnrDb,
  leastSignificantBit,
  quantizationNoiseRms,
} from "./convert/ideal-converter.js";
export {
  densityDbfsPerHz,
  type FullScale,
  levelDbFullScaleAmplitude,
  levelDbfs,
  rmsFromDbfs,
} from "./convert/level-dbfs.js";
export { type LevelLoad, levelDbm, rmsFromDbm } from "./convert/level-dbm.js";
export { levelDbu, rmsFromDbu } from "./convert/level-dbu.js";
export { levelDbv, rmsFromDbv } from "./convert/level-dbv.js";
export { type PeakToPeak, type PeakToPeakConvention, peakToPeak } from "./convert/peak-to-peak.js";
export { type GaussianShare, peakToPeakFactorFor } from "./convert/peak-to-peak-factor-for.js";
export { powerRatioDb, powerRatioFromDb } from "./convert/power-ratio-db.js";
export { type RangeOfNormals, rangeOfNormals } from "./convert/range-of-normals.js";
export type { RecordCoupling } from "./convert/record-band.js";
export { type ReferenceLimit, referenceLimitedSnrDb } from "./convert/reference-limited-snr-db.js";
export type { Rms } from "./convert/rms.js";
export {
  type RmsForBitsOptions,
  rmsForEffectiveBits,
  rmsForEffectiveResolution,
  rmsForNoiseFreeBits,
} from "./convert/rms-for-bits.js";
export { rmsFromPeakToPeak } from "./convert/rms-from-peak-to-peak.js";
export { shareOutside } from "./convert/share-outside.js";
export type { BasisVerdict, FigureTolerance } from "./judge/basis-verdict.js";
export type { CheckOptions, FigureBasis } from "./judge/check-options.js";
export { checkStatedFigure, type StatedFigureCheck } from "./judge/check-stated-figure.js";
export type { FigureView } from "./judge/figure-views.js";
export { readStatedFigure, type StatedFigure } from "./judge/read-stated-figure.js";
export type { Reconciler } from "./judge/reconcile.js";
export { picksSchema } from "./pick/picks-schema.js";
export { type PickedPlot, readPicks } from "./pick/read-picks.js";
export { type NoiseReportOptions, noiseReport } from "./report/noise-report.js";
export type {
  NoiseReport,
  ReportColumn,
  ReportEntry,
  ReportPlot,
  ReportSection,
  ReportTable,
} from "./report/report.js";
export { reportCsv } from "./report/report-csv.js";
export { type ReportMarkdownOptions, reportMarkdown } from "./report/report-markdown.js";
export type { ReportedNoise } from "./report/report-of-noise.js";
export type { ReportedReference } from "./report/report-of-reference.js";
export { reportText } from "./report/report-text.js";
export { type CandidatesPlotOptions, candidatesPlot } from "./show/candidates-plot.js";
export { csvTable } from "./show/csv-table.js";
export type { DensityInterval, DensityModel, DensityPlotOptions } from "./show/density-options.js";
export { densityPlot } from "./show/density-plot.js";
export type { LinePlotAxis, LinePlotOptions, PlotMark, PlotSeries } from "./show/line-options.js";
export { linePlot } from "./show/line-plot.js";
export { markdownTable } from "./show/markdown-table.js";
export { type ReferenceByUse, type ReferenceUsePlotOptions, referenceUsePlot } from "./show/reference-use-plot.js";
export { type ResidualRow, residualBars } from "./show/residual-bars.js";
export { type RunningNoiseCurve, type RunningNoisePlotOptions, runningNoisePlot } from "./show/running-noise-plot.js";
export { type ShareBarsOptions, type ShareRow, shareBars } from "./show/share-bars.js";
export { type SkirtPlotOptions, type SkirtReference, skirtPlot } from "./show/skirt-plot.js";
export type { Table, TableCell, TableColumn } from "./show/table.js";
export { textTable } from "./show/text-table.js";
