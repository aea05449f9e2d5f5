import { OutOfDomainError, type Spectrum, type Weighting, writeQuantity } from "@quietband/core";
import type { ClosedLoop } from "./closed-loop.js";
import { type NamedSpectrum, namedSpectrum } from "./named-spectrum.js";
import type { AmplifierStageOptions, StageNetwork } from "./stage-network.js";
import { thermalNoise } from "./thermal-noise.js";

/** One noise of a stage and its way to the output. */
export interface StagePart {
  readonly name: string;
  /** As it stands in the circuit, V²/Hz or A²/Hz. */
  readonly source: NamedSpectrum;
  /** From there to the output at low frequency: V/V, or V/A for a current. */
  readonly gain: number;
  readonly unit: "V";
  /** What the closed loop does over frequency. */
  readonly weighting?: Weighting;
}

/** A part before the loop is closed: which of its two gains over frequency it gets. */
export type OpenPart = Pick<StagePart, "name" | "source" | "gain"> & { readonly at: keyof ClosedLoop };

/** Every noise of a stage with its gain to the output at low frequency; what is zero is left out. */
export function stageParts(options: AmplifierStageOptions, network: StageNetwork): OpenPart[] {
  const { voltageNoise, currentNoise, invertingCurrentNoise = currentNoise, name: stage = "stage" } = options;
  const { groundOhms, feedbackOhms, sourceOhms } = network;
  const ratio = feedbackOhms / groundOhms;
  const noiseGain = 1 + ratio;
  const parts: OpenPart[] = [];
  const add = (what: string, spectrum: Spectrum | undefined, gain: number, at: OpenPart["at"]): void => {
    if (spectrum === undefined || gain === 0) return;
    const name = `${stage}, ${what}`;
    parts.push({ name, source: namedSpectrum(spectrum, name), gain, at });
  };
  const resistor = (what: string, ohms: number, gain: number, at: OpenPart["at"]): void => {
    if (ohms === 0 || gain === 0) return;
    const { kelvin, celsius } = options;
    add(`${what} ${writeQuantity(ohms, "Ω")}`, thermalNoise({ ohms, kelvin, celsius }), gain, at);
  };
  add("voltage noise", requireUnit("voltageNoise", voltageNoise, "V"), noiseGain, "atInputs");
  const across = requireUnit("currentNoise", currentNoise, "A");
  add("current noise at the non-inverting input", across, noiseGain * sourceOhms, "atInputs");
  const inverting = requireUnit("invertingCurrentNoise", invertingCurrentNoise, "A");
  add("current noise at the inverting input", inverting, feedbackOhms, "atFeedback");
  resistor("source", sourceOhms, noiseGain, "atInputs");
  resistor(options.connection === "inverting" ? "input resistor" : "ground resistor", groundOhms, -ratio, "atFeedback");
  resistor("feedback resistor", feedbackOhms, 1, "atFeedback");
  return parts;
}

function requireUnit<Given extends Spectrum | undefined>(name: string, spectrum: Given, unit: string): Given {
  if (spectrum === undefined || spectrum.unit === unit) return spectrum;
  throw new OutOfDomainError(`${name} must be a density in ${unit}/√Hz; got one in ${spectrum.unit}/√Hz.`);
}
