import {
  type BandNoise,
  type FitAgainstPoints,
  type FitModelName,
  type FitOptions,
  type FittedCurve,
  fitAgainstPoints,
  fitCurve,
  MalformedDataError,
  readBand,
  writeQuantity,
} from "@quietband/core";
import { residualBars } from "../show/residual-bars.js";
import { textTable } from "../show/text-table.js";
import type { Command } from "./command.js";
import { beyondOptions, provenanceLines, readBeyond, readCurveInput } from "./curve-input.js";
import { inColumns, short } from "./noise-figures.js";
import { quantityOption } from "./typed-values.js";

/** Floor, corner and exponent of a curve, with what they rest on. */
export const fitCommand: Command = {
  name: "fit",
  purpose: "floor, corner and exponent of a curve, how well they are known, and what does not fit",
  takes: "<curve>",
  options: [
    { name: "from", value: "HZ", help: "fit only points from here up" },
    { name: "to", value: "HZ", help: "fit only points up to here, for instance 1kHz where a loop peaks above" },
    { name: "exponent", value: "A", help: "1, free, or 1±0.15 (the default): one more observation" },
    {
      name: "model",
      value: "NAME",
      help: "auto (the default), floor, flicker, floorAndFlicker, floorFlickerRandomWalk, floorFlickerLorentzian or floorFlickerRise",
    },
    { name: "downweight", value: "", help: "give grossly misread points no weight" },
    {
      name: "bump",
      value: "FROM:TO",
      help: "a bump that no model describes: its points stand for themselves",
    },
    {
      name: "band",
      value: "FROM:TO",
      help: "also the noise of this band, by the model and by straight lines through the points",
    },
    ...beyondOptions,
    { name: "json", value: "", help: "everything as JSON" },
  ],
  example: {
    type: "quietband fit R1.csv --to 1kHz",
    answers:
      "The model through the points of R1.csv up to 1 kHz, its standard errors, and the residual of every point.",
  },
  run(parsed, streams) {
    const { curve, name } = readCurveInput("fit", parsed, streams);
    const beyond = readBeyond(parsed);
    const fit = fitCurve(curve, {
      beyond,
      model: parsed.one("model") as FitModelName | "auto" | undefined,
      exponent: readExponent(parsed.one("exponent")),
      fromHz: quantityOption(parsed, "from", "Hz"),
      toHz: quantityOption(parsed, "to", "Hz"),
      misreadings: parsed.has("downweight") ? "downweight" : undefined,
      bump: parsed.one("bump") === undefined ? undefined : readBand(parsed.one("bump") ?? ""),
    });
    const typed = parsed.one("band");
    const band = typed === undefined ? undefined : fitAgainstPoints(curve, fit, { ...readBand(typed), beyond });
    if (parsed.has("json")) {
      const { pieces: _, sensitivities: __, ...shown } = fit;
      streams.print(`${JSON.stringify({ curve: name, source: curve.source, fit: shown, band }, undefined, 2)}\n`);
      return;
    }
    streams.print(
      [
        `${name}: ${modelText(fit)}`,
        ...provenanceLines(curve),
        "",
        ...fitLines(fit, curve.unit),
        ...(band === undefined ? [] : bandLines(band, typed ?? "")),
        "",
      ].join("\n"),
    );
  },
};

/** "1", "free", "1±0.15" or "1+-0.15". */
function readExponent(text: string | undefined): FitOptions["exponent"] {
  if (text === undefined) return undefined;
  if (text === "free") return "free";
  const [mean, spread] = text.split(/±|\+-/).map(Number);
  if (mean === undefined || !Number.isFinite(mean) || (spread !== undefined && !Number.isFinite(spread)))
    throw new MalformedDataError(
      `Expected a number, free, or a number ± its uncertainty for --exponent; got "${text.slice(0, 40)}".`,
    );
  return spread === undefined ? mean : { mean, standardUncertainty: spread };
}

const modelWords: Readonly<Record<FitModelName, string>> = {
  floor: "white floor only",
  flicker: "one power law",
  floorAndFlicker: "floor and 1/f",
  floorFlickerRandomWalk: "floor, 1/f and random walk",
  floorFlickerLorentzian: "floor, 1/f and a Lorentzian",
  floorFlickerRise: "floor, 1/f and a rise at the top",
};

export function modelText({ model }: FittedCurve): string {
  return modelWords[model];
}

function parameterLines(fit: FittedCurve, unit: string): string[] {
  const { floor, cornerHz, exponent, standardErrors: errors } = fit;
  const { k } = fit.coverage;
  const relative = (error: number | undefined): string =>
    error === undefined
      ? ""
      : `± ${(100 * error).toFixed(1)} % (k = 1); 95 % within a factor ${Math.exp(k * error).toPrecision(3)} (k = ${k.toFixed(2)})`;
  const lines = [];
  if (floor !== undefined)
    lines.push({ name: "floor", value: short(floor, `${unit}/√Hz`), basis: relative(errors.floor) });
  if (cornerHz !== undefined && cornerHz > 0)
    lines.push({ name: "corner", value: short(cornerHz, "Hz"), basis: relative(errors.cornerHz) });
  if (exponent !== undefined)
    lines.push({
      name: "exponent",
      value: exponent.toFixed(3),
      basis:
        errors.exponent === undefined
          ? "fixed"
          : `± ${errors.exponent.toFixed(3)} (k = 1); 95 % within ± ${(k * errors.exponent).toFixed(3)} (k = ${k.toFixed(2)})`,
    });
  lines.push({
    name: "χ² a degree",
    value: fit.chiSquarePerDegree.toFixed(2),
    basis: `${fit.degreesOfFreedom} degrees of freedom; ${fit.coverage.basis}`,
  });
  return inColumns(lines);
}

/** The noise of a band both ways. */
function bandLines({ fit, points, notes }: FitAgainstPoints, typed: string): string[] {
  const line = (name: string, noise: BandNoise) => ({
    name,
    value: short(noise.rms, noise.unit),
    basis: `RMS ± ${(100 * (noise.standardUncertainty ?? 0)).toFixed(1)} % (k = 1)`,
  });
  return [
    "",
    `Noise of ${typed}`,
    ...inColumns([line("by the model", fit), line("by straight lines through the points", points)]),
    ...[...notes, ...fit.notes.filter((note) => /^(Below|Above) /.test(note))].map((note) => `  ${note}`),
  ];
}

function fitLines(fit: FittedCurve, unit: string): string[] {
  const named = new Set(fit.misreadings.map(({ frequency }) => frequency));
  const rows = fit.residualsDb.map(({ frequency, residualDb, inFit }) => ({
    label: writeQuantity(frequency, "Hz"),
    residualDb,
    remark: named.has(frequency) ? "misread?" : inFit ? undefined : "left out",
  }));
  const tried =
    fit.alternatives.length === 0
      ? []
      : [
          "",
          textTable({
            columns: [
              { heading: "tried" },
              { heading: "χ²" },
              { heading: "criterion above the choice" },
              { heading: "verdict" },
            ],
            rows: fit.alternatives.map(({ model, chiSquare, criterionDifference, verdict }) => [
              modelWords[model],
              Number(chiSquare.toPrecision(4)),
              Number(criterionDifference.toPrecision(3)),
              verdict,
            ]),
          }),
        ];
  return [
    ...parameterLines(fit, unit),
    "",
    ...fit.findings.map(({ message }) => `  ${message}`),
    "",
    "Points over the model",
    residualBars(rows),
    ...tried,
  ];
}
