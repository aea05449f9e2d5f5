import { deepFrozen } from "../file/deep-frozen.js";
import { type JsonSchema, kind, record, text } from "../file/json-schema.js";
import { noiseSchema, sourceSchema } from "./chain-sources.js";
import { filterKinds } from "./filter-kinds.js";

const to = (name: string): JsonSchema => ({ $ref: `#/$defs/${name}` });

const oneFilter: JsonSchema = {
  oneOf: Object.entries(filterKinds).map(([name, { numbers }]) =>
    kind(
      name,
      `${name[0]?.toUpperCase()}${name.slice(1)}.`,
      Object.fromEntries(
        numbers.map(({ word, unit }) => [
          word,
          unit === "" ? { type: "number", exclusiveMinimum: 0 } : text(`In ${unit}, with its unit.`, `5 ${unit}`),
        ]),
      ),
    ),
  ),
};

const whole = record(
  "A measuring channel: its sources of noise, the path from input to output, and the band.",
  {
    title: text("What the channel is."),
    band: to("band"),
    sources: { description: "At least one.", type: "array", items: to("source"), minItems: 1 },
  },
  {
    temperature: text("Of all resistors; needed where there are any.", "25 °C", "298.15 K"),
    path: { description: "Stages from input to output.", type: "array", items: to("stage"), minItems: 1 },
    filter: to("filter"),
    referredTo: text("Where the total is stated: input (unless given), output, or a stage, which means its input."),
    correlations: {
      description: "Correlations between sources by name.",
      type: "array",
      items: record("One pair.", {
        between: { type: "array", items: text("Name of a source."), minItems: 2, maxItems: 2 },
        coefficient: { type: "number", minimum: -1, maximum: 1 },
      }),
      minItems: 1,
    },
    measured: record("The measured quantity: units per unit where the total is stated.", {
      unit: text("Unit of the measured quantity.", "µε", "°C"),
      perUnit: { type: "number" },
    }),
    peakToPeakFactor: { description: "6.6 unless given.", type: "number", exclusiveMinimum: 0 },
    target: text("An RMS that should be met, with its unit.", "20 nV"),
  },
);

/**
 * The shape of a chain file as JSON Schema, 2020-12: what `readChain` reads. Quantities are texts with their units; plain
 * numbers are gains, orders, exponents, factors and counts.
 */
export const chainSchema: Readonly<Record<string, unknown>> = deepFrozen({
  $schema: "https://json-schema.org/draft/2020-12/schema",
  title: "Noise chain",
  ...whole,
  $defs: {
    band: text(
      "Lower and upper edge with a colon between; inf where filters end it.",
      "0.1 Hz : 10 Hz",
      "0.1 Hz : inf",
    ),
    gain: {
      description: "Amplitude gain: a number, a ratio of two quantities, or dB.",
      anyOf: [{ type: "number" }, text("A ratio or dB.", "4 mV / 5 V", "40 dB")],
    },
    uncertainty: text("Relative standard uncertainty (k = 1) beyond what the noise carries.", "5 %"),
    filter: {
      description: "A filter, or several in a row.",
      anyOf: [to("oneFilter"), { type: "array", items: to("oneFilter"), minItems: 1 }],
    },
    oneFilter,
    noise: noiseSchema,
    source: sourceSchema,
    stage: record("A stage of the path.", { name: text("Names differ.") }, { gain: to("gain"), filter: to("filter") }),
  },
});
