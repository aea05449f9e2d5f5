import type { Curve } from "@quietband/core";
import { refuseUnknownKeys } from "../convert/domain.js";
import { checkAgainstSchema, malformedAt, type SchemaDefinitions } from "../file/check-against-schema.js";
import { bandAt, type FilePlace, numberAt, placesAt, quantityAt, textAt, wordsAt } from "../file/file-place.js";
import type { JsonSchema } from "../file/json-schema.js";
import { parseFile } from "../file/parse-file.js";
import type { BudgetCorrelation, BudgetSource, BudgetStage, NoiseBudgetOptions } from "./budget-options.js";
import { filterAt, gainAt } from "./chain-place.js";
import { chainSchema } from "./chain-schema.js";
import { zeroCelsius } from "./physical-constants.js";
import { readChainSource } from "./read-chain-source.js";
import type { Temperature } from "./temperature.js";

/** What {@link readChain} takes besides the file. */
export interface ReadChainOptions {
  /** Gives the curve of a file that the chain names; needed where it names one. */
  readonly loadCurve?: ((file: string) => Curve) | undefined;
}

/** A chain file, read. */
export interface Chain {
  readonly title: string;
  /** For `noiseBudget`. */
  readonly budget: NoiseBudgetOptions;
}

/**
 * A measuring channel from a plain JSON file: what `noiseBudget` takes, with quantities as people type them ("10 kΩ",
 * "85 nV/√Hz"). `chainSchema` is the file's shape as JSON Schema.
 *
 * Nothing is guessed: unknown and repeated keys, numbers without their units, and resistances without a temperature are
 * refused, with the place as a JSON pointer.
 *
 * @param json - the text of the file, or what JSON.parse made of it.
 * @param options - `loadCurve`, for sources by file name; this function reads no files.
 * @throws MalformedDataError that begins with the place: "At /sources/2/resistance: ..."; errors of a source carry theirs too.
 *
 * @example
 * ```ts
 * import { noiseBudget, readChain } from "@quietband/figures";
 * const { budget } = readChain(`{
 *   "title": "Bridge and amplifier (invented)",
 *   "band": "0.1 Hz : inf",
 *   "temperature": "25 °C",
 *   "filter": { "kind": "Butterworth low-pass", "order": 2, "cutoff": "5 Hz" },
 *   "sources": [
 *     { "name": "bridge", "kind": "resistor", "resistance": "350 Ω" },
 *     { "name": "amplifier", "kind": "model", "floor": "7.2 nV/√Hz", "corner": "0.02 Hz" }
 *   ]
 * }`);
 * noiseBudget(budget).rms; // → 17.838e-9
 * ```
 */
export function readChain(json: unknown, options: ReadChainOptions = {}): Chain {
  refuseUnknownKeys("readChain", ["loadCurve"], options);
  const value = typeof json === "string" ? parseFile(json, "A chain file") : json;
  const { $defs, ...whole } = chainSchema;
  checkAgainstSchema(value, whole as JsonSchema, $defs as SchemaDefinitions);
  const top: FilePlace = { fields: value as FilePlace["fields"], pointer: "" };
  const { fields } = top;
  const { fromHz, toHz } = bandAt(top, "band");
  const context = { temperature: temperatureOf(top), fromHz, loadCurve: options.loadCurve };
  const sources = placesAt(top, "sources").flatMap((place) => readChainSource(place, context));
  const measured = fields["measured"] as NoiseBudgetOptions["measured"];
  const target = targetOf(top, sources);
  return Object.freeze({
    title: textAt(top, "title"),
    budget: Object.freeze({
      sources: Object.freeze(sources),
      path: Object.freeze(placesAt(top, "path").map(readStageOfPath)),
      fromHz,
      toHz,
      weighting: filterAt(top, "filter"),
      correlations: (fields["correlations"] ?? []) as readonly BudgetCorrelation[],
      referredTo: wordsAt(top, "referredTo"),
      peakToPeakFactor: numberAt(top, "peakToPeakFactor"),
      measured,
      target,
    }),
  });
}

/** In °C or K, as typed. */
function temperatureOf(top: FilePlace): Temperature | undefined {
  if (top.fields["temperature"] === undefined) return undefined;
  const { value, unit } = quantityAt(top, "temperature");
  if (unit === "°C" && value > -zeroCelsius) return { celsius: value };
  if (unit === "K" && value > 0) return { kelvin: value };
  throw malformedAt(
    "/temperature",
    `expected a temperature above −273.15 °C, in °C or K; got "${textAt(top, "temperature")}".`,
  );
}

function readStageOfPath(place: FilePlace): BudgetStage {
  const { gain, change } = gainAt(place, "gain");
  if (change !== undefined)
    throw malformedAt(
      `${place.pointer}/gain`,
      "a stage keeps the unit of its signal; give a source a gain with a unit.",
    );
  return Object.freeze({ name: textAt(place, "name"), gain, weighting: filterAt(place, "filter") });
}

/** A target in the unit that the sources have where they meet. */
function targetOf(top: FilePlace, [first]: readonly BudgetSource[]): NoiseBudgetOptions["target"] {
  if (top.fields["target"] === undefined || first === undefined) return undefined;
  return { rms: quantityAt(top, "target", first.unit ?? first.source.unit).value };
}
