import {
  type Beyond,
  type Curve,
  type FitOptions,
  fitCurve,
  MalformedDataError,
  NoiseError,
  polyline,
  type Spectrum,
  whiteFlicker,
} from "@quietband/core";
import { malformedAt } from "../file/check-against-schema.js";
import {
  bandAt,
  type FilePlace,
  madeAt,
  numberAt,
  placeAt,
  quantityAt,
  shareAt,
  textAt,
  valueAt,
  wordsAt,
} from "../file/file-place.js";
import { amplifierStage } from "./amplifier-stage.js";
import type { BudgetSource } from "./budget-options.js";
import { filterAt, gainAt } from "./chain-place.js";
import { namedSpectrum } from "./named-spectrum.js";
import { noiseAcross } from "./noise-across.js";
import type { NoiseSource } from "./noise-source.js";
import { parallelParts } from "./parallel-parts.js";
import { quantization } from "./quantization.js";
import type { ReferenceInput } from "./reference-input.js";
import type { ReferenceConverter } from "./reference-path-options.js";
import { referenceSpectrum } from "./reference-spectrum.js";
import { resistorExcessNoise } from "./resistor-excess-noise.js";
import { shotNoise } from "./shot-noise.js";
import { statedNoise } from "./stated-noise.js";
import type { Temperature } from "./temperature.js";
import { thermalNoise } from "./thermal-noise.js";
import { type RippleShape, tone } from "./tone.js";

/** What sources need from the rest of the file and from the caller. */
export interface ChainContext {
  /** Undefined where the file states none. */
  readonly temperature: Temperature | undefined;
  readonly fromHz: number;
  readonly loadCurve: ((file: string) => Curve) | undefined;
}

/** The sources that one record of the file stands for: one, or the parts of a stage. */
export function readChainSource(place: FilePlace, context: ChainContext): BudgetSource[] {
  const { pointer, fields } = place;
  const name = textAt(place, "name");
  const [enters, partFactor] = [wordsAt(place, "enters"), numberAt(place, "partFactor")];
  const { gain, change } = gainAt(place, "gain");
  const shared = {
    ...(enters !== undefined && { enters }),
    ...(partFactor !== undefined && { partFactor }),
  };
  const weighting = filterAt(place, "filter");
  if (fields["kind"] === "stage") {
    const { parts } = madeAt(pointer, () => readStage(place, context));
    if (weighting !== undefined || change !== undefined)
      throw malformedAt(pointer, "a stage has the filter of its own loop and a plain gain; put others into the path.");
    return parts.map((part) => ({ ...part, ...shared, gain: part.gain * gain }));
  }
  const { source, seen = true } = madeAt(pointer, () => readOne(place, context));
  if (change !== undefined && source.unit !== change.from)
    throw malformedAt(`${pointer}/gain`, `expected a gain per ${source.unit}; got one per ${change.from}.`);
  const uncertainty = shareAt(place, "uncertainty");
  return [
    {
      source,
      name,
      gain: seen ? gain : 0,
      ...(change !== undefined && { unit: change.to }),
      ...(weighting !== undefined && { weighting }),
      ...(uncertainty !== undefined && { standardUncertainty: uncertainty }),
      ...shared,
    },
  ];
}

/** One source; a reference at an input of 0 V is not seen. */
interface OneSource {
  readonly source: NoiseSource;
  readonly seen?: boolean;
}

type Reader = (place: FilePlace, context: ChainContext) => OneSource;

const readers: Readonly<Record<string, Reader>> = Object.freeze({
  curve: (place, context) => ({ source: several(place, readNoise(place, context)) }),
  model: (place, context) => ({ source: several(place, readNoise(place, context)) }),
  resistor: (place, context) => ({
    source: several(
      place,
      thermalNoise({ ohms: quantityAt(place, "resistance", "Ω").value, ...temperatureOf(place, context) }),
    ),
  }),
  "resistor excess": (place) => ({
    source: resistorExcessNoise({
      volts: quantityAt(place, "voltage", "V").value,
      noiseIndexDb: quantityAt(place, "noiseIndex", "dB").value,
    }),
  }),
  shot: (place) => ({
    source: noiseAcross(shotNoise({ amperes: quantityAt(place, "current", "A").value }), {
      ohms: quantityAt(place, "across", "Ω").value,
    }),
  }),
  current: (place, context) => ({
    source: several(
      place,
      noiseAcross(innerNoise(place, "noise", context), { ohms: quantityAt(place, "across", "Ω").value }),
    ),
  }),
  quantization: (place) => {
    const { value: lsb, unit } = quantityAt(place, "step");
    return { source: quantization({ lsb, unit, sampleRateHz: quantityAt(place, "sampleRate", "Hz").value }) };
  },
  tone: (place) => {
    const { value: amplitude, unit } = quantityAt(place, "amplitude");
    return { source: tone({ amplitude, unit, frequencyHz: quantityAt(place, "frequency", "Hz").value }) };
  },
  ripple: (place) => {
    const { value: peakToPeak, unit } = quantityAt(place, "peakToPeak");
    const shape = place.fields["shape"] as RippleShape;
    return { source: tone({ peakToPeak, unit, shape, frequencyHz: quantityAt(place, "frequency", "Hz").value }) };
  },
  "stated rms": (place) => {
    const { value: rms, unit } = quantityAt(place, "rms");
    return { source: statedNoise({ rms, unit, ...bandAt(place, "band") }) };
  },
  "stated peak-to-peak": (place) => {
    const { value: peakToPeak, unit } = quantityAt(place, "peakToPeak");
    const convention = { factor: numberAt(place, "factor") };
    return { source: statedNoise({ peakToPeak, unit, convention, ...bandAt(place, "band") }) };
  },
  reference: readReference,
});

function readOne(place: FilePlace, context: ChainContext): OneSource {
  return (readers[textAt(place, "kind")] as Reader)(place, context);
}

/** A noise typed from a plot or as a model, at a place of its own. */
function readNoise(place: FilePlace, context: ChainContext): Spectrum {
  if (place.fields["kind"] === "curve") return readCurveNoise(place, context);
  const floor = quantityAt(place, "floor");
  const [unit = "", per] = floor.unit.split("/√");
  if (per !== "Hz")
    throw malformedAt(`${place.pointer}/floor`, `expected a density such as 70 nV/√Hz; got one in ${floor.unit}.`);
  const exponent = numberAt(place, "exponent");
  return whiteFlicker({
    floor: floor.value,
    cornerHz: quantityAt(place, "corner", "Hz").value,
    unit,
    ...(exponent !== undefined && { exponent }),
  });
}

function readCurveNoise(place: FilePlace, { loadCurve }: ChainContext): Spectrum {
  const { fields, pointer } = place;
  const file = textAt(place, "file");
  if (loadCurve === undefined)
    throw malformedAt(
      `${pointer}/file`,
      `the curve "${file}" must be loaded by the caller; give readChain a loadCurve.`,
    );
  const curve = madeAt(`${pointer}/file`, () => loaded(file, loadCurve));
  const beyond = fields["beyond"] as Beyond | undefined;
  const fit = placeAt(place, "fit");
  const spectrum = fit === undefined ? polyline(curve, { beyond }) : fitCurve(curve, { ...fitOptions(fit), beyond });
  return namedSpectrum(spectrum, curve.label === "" ? file : curve.label, [
    fit === undefined ? `Points of ${file}.` : `A model fitted to the points of ${file}.`,
  ]);
}

/** Whatever the caller's loader says of a file it cannot give becomes an error of this library. */
function loaded(file: string, loadCurve: (file: string) => Curve): Curve {
  try {
    return loadCurve(file);
  } catch (error) {
    if (error instanceof NoiseError) throw error;
    const said = error instanceof Error ? error.message : String(error);
    throw new MalformedDataError(`the curve "${file.slice(0, 80)}" cannot be loaded: ${said}`);
  }
}

function fitOptions(place: FilePlace): FitOptions {
  const { model, exponent } = place.fields as Pick<FitOptions, "model" | "exponent">;
  return { model, exponent, fromHz: valueAt(place, "from", "Hz"), toHz: valueAt(place, "to", "Hz") };
}

function innerNoise(place: FilePlace, key: string, context: ChainContext): Spectrum {
  const inner = placeAt(place, key) as FilePlace;
  return madeAt(inner.pointer, () => readNoise(inner, context));
}

function several(place: FilePlace, spectrum: Spectrum): Spectrum {
  const count = numberAt(place, "parallel");
  return count === undefined ? spectrum : parallelParts(spectrum, count);
}

function temperatureOf(place: FilePlace, { temperature }: ChainContext): Temperature {
  if (temperature !== undefined) return temperature;
  throw malformedAt(place.pointer, 'a resistance needs the chain\'s "temperature", for instance "25 °C".');
}

function readStage(place: FilePlace, context: ChainContext): ReturnType<typeof amplifierStage> {
  const noiseAt = (key: string): Spectrum | undefined =>
    place.fields[key] === undefined ? undefined : innerNoise(place, key, context);
  const { connection, q } = place.fields as { readonly connection: "inverting" | "nonInverting"; readonly q?: number };
  return amplifierStage({
    name: textAt(place, "name"),
    connection,
    q,
    ...temperatureOf(place, context),
    voltageNoise: innerNoise(place, "voltageNoise", context),
    currentNoise: noiseAt("currentNoise"),
    invertingCurrentNoise: noiseAt("invertingCurrentNoise"),
    groundOhms: valueAt(place, "ground", "Ω"),
    feedbackOhms: valueAt(place, "feedback", "Ω"),
    sourceOhms: valueAt(place, "source", "Ω"),
    gainBandwidthHz: valueAt(place, "gainBandwidth", "Hz"),
    inputFarads: valueAt(place, "inputCapacitance", "F"),
    feedbackFarads: valueAt(place, "feedbackCapacitance", "F"),
  });
}

function readReference(place: FilePlace, context: ChainContext): OneSource {
  const noise = innerNoise(place, "noise", context);
  const source = referenceSpectrum({
    spectrum: noise,
    referenceVolts: quantityAt(place, "voltage", "V").value,
    input: readInput(placeAt(place, "input") as FilePlace),
    fromHz: context.fromHz,
    converter: place.fields["converter"] as ReferenceConverter | undefined,
    sampleRateHz: valueAt(place, "sampleRate", "Hz"),
    referenceWeighting: filterAt(place, "referenceFilter"),
    biasVolts: valueAt(place, "bias", "V"),
    leaveOutHz: valueAt(place, "leaveOut", "Hz"),
  });
  return source === undefined ? { source: noise, seen: false } : { source };
}

function readInput(place: FilePlace): ReferenceInput {
  if (place.fields["kind"] === "dc") return { kind: "dc", volts: quantityAt(place, "level", "V").value };
  return {
    kind: place.fields["kind"] as "sine" | "square" | "triangle",
    amplitude: quantityAt(place, "amplitude", "V").value,
    frequencyHz: quantityAt(place, "frequency", "Hz").value,
    offset: valueAt(place, "offset", "V"),
  };
}
