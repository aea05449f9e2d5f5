import { deepFrozen } from "../file/deep-frozen.js";
import { type JsonSchema, record, text } from "../file/json-schema.js";

const pixels = (description: string): JsonSchema => ({ description, type: "number" });
const positivePixels = (description: string): JsonSchema => ({ description, type: "number", exclusiveMinimum: 0 });

const place: JsonSchema = {
  description: "x and y in pixels, from any corner; y may count downwards.",
  type: "array",
  items: { type: "number" },
  minItems: 2,
  maxItems: 2,
};

const placesOf = (description: string): JsonSchema => ({ description, type: "array", items: place, minItems: 2 });

const ticks = (example: string): JsonSchema => ({
  description: "Two or more; needed unless there are reference points.",
  type: "array",
  items: record("A tick.", {
    pixel: pixels("Where it stands along its axis: x for frequency, y for density."),
    value: text("What is written there, with its unit.", example),
  }),
  minItems: 2,
});

const whole = record(
  "A plot read by pixel: its axes, and places picked along one curve or the vector path of it.",
  {
    unit: text("Unit of the signal: V for a plot in V/√Hz.", "V", "A"),
    frequency: record("The frequency axis.", { scale: { enum: ["log", "linear"] } }, { ticks: ticks("100 Hz") }),
    density: record(
      "The density axis; dB is re 1 unit/√Hz.",
      { scale: { enum: ["log", "linear", "dB"] } },
      { ticks: ticks("10 nV/√Hz") },
    ),
  },
  {
    label: text("Name of the curve."),
    referencePoints: {
      description:
        "Three or more places that are not on one line, instead of ticks, where the scan is turned or sheared.",
      type: "array",
      items: record("A place whose frequency and density are known.", {
        place,
        frequency: text("With its unit.", "100 Hz"),
        density: text("With its unit.", "10 nV/√Hz"),
      }),
      minItems: 3,
    },
    picks: placesOf("Places along the curve."),
    repeatedPicks: {
      description: "The same places picked two or more times: averaged, and their scatter is the pick error.",
      type: "array",
      items: placesOf("One series."),
      minItems: 2,
    },
    path: record(
      "SVG path data of the curve.",
      { data: text("The d of the path.", "M100 50L300 225h400") },
      {
        matrix: {
          description: "Transform a, b, c, d, e, f from the path's coordinates to the pixels of the axes.",
          type: "array",
          items: { type: "number" },
          minItems: 6,
          maxItems: 6,
        },
        tolerance: positivePixels("Largest distance of a chord from a curve, pixels; 0.1 unless given."),
      },
    ),
    pickError: positivePixels("Standard uncertainty of a pick, pixels; 0.5 unless given, 0.25 for a path."),
    lineWidth: positivePixels("Thickness of the drawn line, pixels."),
    tickError: positivePixels("Standard uncertainty of a tick's place, pixels; 0.5 unless given."),
    thin: text("Change of any octave's RMS that thinning may make; 0.1 % for a path unless given.", "0.1 %"),
    source: {
      description: "Where the plot is from; lines for the head of the table.",
      type: "array",
      items: text("A line, or key: value.", "document: data sheet, figure 12"),
      minItems: 1,
    },
  },
);

/** The shape of a picks file as JSON Schema, 2020-12: what `readPicks` reads. Plain numbers are pixels. */
export const picksSchema: Readonly<Record<string, unknown>> = deepFrozen({
  $schema: "https://json-schema.org/draft/2020-12/schema",
  title: "Plot read by pixel",
  ...whole,
});
