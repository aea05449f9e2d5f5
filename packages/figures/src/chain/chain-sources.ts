import { type JsonSchema, kind, record, text } from "../file/json-schema.js";

type Fields = Readonly<Record<string, JsonSchema>>;

const to = (name: string): JsonSchema => ({ $ref: `#/$defs/${name}` });
const hertz = (what: string): JsonSchema => text(`${what}, with its unit.`, "10 Hz", "2.4 kHz");
const volts = (what: string): JsonSchema => text(`${what}, with its unit.`, "2.048 V", "4 mV");
const ohms = (what: string): JsonSchema => text(`${what}, with its unit.`, "350 Ω", "10 kohm");
const amperes = (what: string): JsonSchema => text(`${what}, with its unit.`, "1 µA");
const farads = (what: string): JsonSchema => text(`${what}, with its unit.`, "12 pF");

/** What every source may have. */
const named: Fields = { name: text("What a report calls it; names differ.") };
const way: Fields = {
  gain: to("gain"),
  enters: text("Stage at whose input it enters, or output; the first stage unless given."),
  filter: to("filter"),
  partFactor: {
    description: "Stated spread from part to part: by which factor a noisy part is above this one.",
    type: "number",
    minimum: 1,
  },
};
const common: Fields = { ...way, uncertainty: to("uncertainty") };
const several: Fields = {
  ...common,
  parallel: { description: "Number of equal parts averaged.", type: "integer", minimum: 1 },
};

const beyondSide: JsonSchema = {
  description: "How the power density goes on there: an exponent, hold, segments or refuse.",
  anyOf: [{ type: "number" }, { enum: ["refuse", "hold", "segments"] }],
};

const fit = record(
  "Fit a model to the points and use it instead of them.",
  {
    model: {
      enum: [
        "auto",
        "floor",
        "flicker",
        "floorAndFlicker",
        "floorFlickerRandomWalk",
        "floorFlickerLorentzian",
        "floorFlickerRise",
      ],
    },
  },
  {
    exponent: { anyOf: [{ type: "number", exclusiveMinimum: 0 }, { enum: ["free"] }] },
    from: hertz("Only points from here up take part"),
    to: hertz("Only points up to here take part"),
  },
);

const eachSide: JsonSchema = {
  description: "Each side.",
  type: "object",
  properties: { below: beyondSide, above: beyondSide },
  required: [],
  minProperties: 1,
  additionalProperties: false,
};

const curve: readonly [Fields, Fields] = [
  { file: text("File of the typed curve.", "A1.csv") },
  {
    beyond: {
      description: "How it goes on beyond its points; refused unless given.",
      anyOf: [{ enum: ["refuse", "hold", "segments"] }, eachSide],
    },
    fit,
  },
];

const model: readonly [Fields, Fields] = [
  {
    floor: text("White floor, with its unit.", "70 nV/√Hz", "0.5 pA/√Hz"),
    corner: hertz("Where the 1/f part equals the floor; 0 Hz for white noise"),
  },
  { exponent: { description: "Exponent of the power density; 1 unless given.", type: "number", exclusiveMinimum: 0 } },
];

/** A noise inside another source: the reference's, an amplifier's. */
export const noiseSchema: JsonSchema = {
  oneOf: [
    kind("curve", "Points typed from a plot.", ...curve),
    kind("model", "A white floor with a 1/f part.", ...model),
  ],
};

const waveform = (shape: string): JsonSchema =>
  kind(
    shape,
    `A ${shape} wave.`,
    { amplitude: volts("Peak value"), frequency: hertz("Frequency") },
    { offset: volts("Mean; 0 V unless given") },
  );

const input: JsonSchema = {
  oneOf: [
    kind("dc", "A direct voltage.", { level: volts("Its value") }),
    waveform("sine"),
    waveform("square"),
    waveform("triangle"),
  ],
};

/** One shape for every kind of source. */
export const sourceSchema: JsonSchema = {
  oneOf: [
    kind("curve", "Noise as typed from a plot.", { ...named, ...curve[0] }, { ...curve[1], ...several }),
    kind("model", "Noise as a white floor with a 1/f part.", { ...named, ...model[0] }, { ...model[1], ...several }),
    kind(
      "resistor",
      "Thermal noise, 4kTR at the chain's temperature.",
      { ...named, resistance: ohms("Resistance") },
      several,
    ),
    kind(
      "resistor excess",
      "Excess noise of a resistor that carries current (IEC 60195).",
      {
        ...named,
        voltage: volts("Voltage across it"),
        noiseIndex: text("Noise index in dB; 0 dB is 1 µV/V in a decade.", "-20 dB"),
      },
      common,
    ),
    kind(
      "shot",
      "Shot noise 2qI of a current, across a resistance.",
      { ...named, current: amperes("Direct current"), across: ohms("Resistance it flows into") },
      common,
    ),
    kind(
      "current",
      "A current noise across a resistance.",
      { ...named, noise: to("noise"), across: ohms("Resistance it flows into") },
      several,
    ),
    kind(
      "stage",
      "An amplifier with its resistors. Its noise stands at its output: enters is what follows it.",
      { ...named, connection: { enum: ["nonInverting", "inverting"] }, voltageNoise: to("noise") },
      {
        currentNoise: to("noise"),
        invertingCurrentNoise: to("noise"),
        ground: ohms("From the inverting input to ground, or to the signal of an inverting stage"),
        feedback: ohms("From the output to the inverting input"),
        source: ohms("What the non-inverting input sees"),
        gainBandwidth: hertz("Product of gain and bandwidth"),
        q: { description: "Quality factor of the closed loop.", type: "number", exclusiveMinimum: 0 },
        inputCapacitance: farads("From the inverting input to ground"),
        feedbackCapacitance: farads("Across the feedback resistor"),
        ...way,
      },
    ),
    kind(
      "quantization",
      "Rounding of a converter as white noise.",
      { ...named, step: volts("One step"), sampleRate: hertz("Rate of the samples") },
      common,
    ),
    kind("tone", "A sine.", { ...named, amplitude: volts("Peak value"), frequency: hertz("Frequency") }, common),
    kind(
      "ripple",
      "A ripple by its peak-to-peak value.",
      {
        ...named,
        peakToPeak: volts("Peak-to-peak value"),
        frequency: hertz("Frequency"),
        shape: { enum: ["sine", "triangle", "square"] },
      },
      common,
    ),
    kind("stated rms", "A stated RMS value.", { ...named, rms: volts("RMS value"), band: to("band") }, common),
    kind(
      "stated peak-to-peak",
      "A stated peak-to-peak value of noise.",
      {
        ...named,
        peakToPeak: volts("Peak-to-peak value"),
        factor: { description: "Peak-to-peak / RMS it was made with.", type: "number", exclusiveMinimum: 0 },
        band: to("band"),
      },
      common,
    ),
    kind(
      "reference",
      "What a converter's reference brings in at a given input; it stands at the converter's input, before its digital filter.",
      { ...named, noise: to("noise"), voltage: volts("Voltage of the reference"), input },
      {
        converter: { description: "deltaSigma unless given.", enum: ["deltaSigma", "sampler"] },
        sampleRate: hertz("Rate of a sampler"),
        referenceFilter: to("filter"),
        bias: volts("What the converter measures with its input shorted"),
        leaveOut: hertz("Noise slower than this counts as drift around a tone"),
        ...common,
      },
    ),
  ],
};
