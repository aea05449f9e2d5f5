import { MalformedDataError, NoiseError, writeQuantity } from "@quietband/core";
import type { BasisVerdict } from "../judge/basis-verdict.js";
import type { CheckOptions, FigureBasis } from "../judge/check-options.js";
import { checkStatedFigure, type StatedFigureCheck } from "../judge/check-stated-figure.js";
import type { Reconciler } from "../judge/reconcile.js";
import type { Command } from "./command.js";
import { beyondOptions, provenanceLines, readBeyond, readCurveInput } from "./curve-input.js";
import { type FigureLine, inColumns, short, signed } from "./noise-figures.js";
import { readThrough } from "./through.js";
import { plainNumber, quantityOption } from "./typed-values.js";

/** Stated figures beside what the curve of the same part gives. */
export const checkCommand: Command = {
  name: "check",
  purpose: "whether a stated low-frequency figure agrees with the part's own curve",
  takes: "<curve>",
  options: [
    {
      name: "figure",
      value: "WORDS",
      help: 'for instance "7 µV peak-to-peak, 0.1 Hz to 10 Hz"; the "# stated:" lines of the curve unless given; may be repeated',
      repeats: true,
    },
    { name: "of", value: "VOLTS", help: "what a figure in ppm is of" },
    {
      name: "basis",
      value: "WORD",
      help: "convention (a factor times the RMS) or record (what a record showed); both unless given",
    },
    { name: "factor", value: "N", help: "peak-to-peak / RMS of the convention; 6.6 by common practice" },
    { name: "record", value: "SECONDS", help: "length of a record; 10s unless given" },
    { name: "records", value: "N", help: "the figure is the largest of so many records; 1 unless given" },
    {
      name: "through",
      value: "FILTER",
      help: "the filter the figure was measured through, where it is known, or brick wall; may be repeated",
      repeats: true,
    },
    ...beyondOptions,
    { name: "json", value: "", help: "everything as JSON" },
  ],
  example: {
    type: 'quietband check R1.csv --figure "7 µV peak-to-peak, 0.1 Hz to 10 Hz"',
    answers:
      "Whether that figure agrees with the points of R1.csv, as a convention and as a record, and what rests on what.",
  },
  run(parsed, streams) {
    const { curve, name } = readCurveInput("check", parsed, streams);
    const typed = parsed.all("figure");
    const stated =
      typed.length > 0 ? typed : curve.source.filter(({ key }) => key === "stated").map(({ value }) => value);
    if (stated.length === 0)
      throw new MalformedDataError(
        'The curve states no figure ("# stated: ..."); give one with --figure "7 µV peak-to-peak, 0.1 Hz to 10 Hz".',
      );
    const options = {
      beyond: readBeyond(parsed),
      basis: readBasis(parsed.one("basis")),
      factor: plainNumber(parsed, "factor"),
      recordSeconds: quantityOption(parsed, "record", "s"),
      records: plainNumber(parsed, "records"),
      weighting: readFilter(parsed.all("through")),
      relativeTo: quantityOption(parsed, "of", curve.unit),
    };
    const progress = streams.progress("checking", stated.length);
    const checks = stated.map((text) => {
      progress.step();
      try {
        return { text, check: checkStatedFigure(curve, text, options) };
      } catch (error) {
        // one of several figures may lie beyond the points: the others are still checked
        if (error instanceof NoiseError && stated.length > 1) return { text, refused: error.message };
        progress.end();
        throw error;
      }
    });
    progress.end();
    if (parsed.has("json")) {
      streams.print(
        `${JSON.stringify({ curve: name, source: curve.source, checks: checks.map(({ check, ...refused }) => check ?? refused) }, undefined, 2)}\n`,
      );
      return;
    }
    const lines = checks.flatMap(({ text, check, refused }) => [
      `Stated: ${text}`,
      ...(check === undefined ? [`  not checked: ${refused}`] : checkLines(check)),
      "",
    ]);
    streams.print([name, ...provenanceLines(curve), "", ...lines].join("\n"));
  },
};

function readBasis(word: string | undefined): FigureBasis | undefined {
  if (word === undefined || word === "convention" || word === "record") return word;
  throw new MalformedDataError(`Expected convention or record for --basis; got "${word.slice(0, 40)}".`);
}

function readFilter(words: readonly string[]): CheckOptions["weighting"] {
  return words.length === 1 && words[0] === "brick wall" ? "brick wall" : readThrough(words);
}

const percent = (share: number): string => `${(100 * share).toFixed(1)} %`;

/** One comparison in lines. */
function checkLines(check: StatedFigureCheck): string[] {
  const { figure, unit, stated } = check;
  const digit = writeQuantity(figure.halfUnit * (stated / figure.value), unit, { digits: 1 });
  const views: FigureLine[] = check.views.map(({ basis, predicted, words, noise, spread }) => ({
    name: basis === "record" ? "as a record" : basis === "convention" ? "by convention" : "from the curve",
    value: short(predicted, unit),
    basis: `${words}; ± ${percent(noise.standardUncertainty ?? 0)} (k = 1)${spread > 0 ? `, spread ${percent(spread)}` : ""}`,
  }));
  return [
    ...inColumns([{ name: "stated", value: short(stated, unit), basis: `last digit ± ${digit}` }, ...views]),
    ...check.bases.flatMap((judged) => basisLines(judged, unit)),
    `  Verdict: ${check.summary}.`,
    ...check.notes.map((note) => `  ${note}`),
  ];
}

function basisLines(
  { basis, predicted, differenceDb, tolerance, expanded, ...rest }: BasisVerdict,
  unit: string,
): string[] {
  const { points, rounding, records, filter } = tolerance;
  const parts = [`points ${percent(points)}`, `rounding ${percent(rounding)}`];
  if (records > 0) parts.push(`spread of records ${percent(records)}`);
  if (filter > 0) parts.push(`unknown filter ${percent(filter)}`);
  const heading = {
    record: "As a record",
    convention: "By convention",
    rms: "Of the band",
    density: "At that frequency",
  }[basis];
  return [
    `  ${heading}: ${short(predicted, unit)}, difference ${signed(differenceDb, 2)} dB, ${rest.differenceOverExpanded.toFixed(2)} of the expanded uncertainty of ${percent(expanded.relative)} (95 %, k = ${expanded.k.toFixed(2)})`,
    `    ${parts.join(", ")} (k = 1); a factor ${rest.smallestFactorSeen.toFixed(2)} would have been seen`,
    ...(rest.reconcilers.length === 0 ? [] : [`    would agree with ${reconcilerWords(rest.reconcilers)}, each alone`]),
  ];
}

function reconcilerWords(reconcilers: readonly Reconciler[]): string {
  const value = (number: number, unit: string): string =>
    unit === "" ? String(Number(number.toPrecision(3))) : writeQuantity(number, unit, { digits: 3 });
  return reconcilers
    .map(({ what, unit, taken, needed }) =>
      needed === undefined
        ? `no ${what} (taken ${value(taken, unit)})`
        : `${what === "exponent" ? "an" : "a"} ${what} of ${value(needed, unit)} in place of ${value(taken, unit)}`,
    )
    .join(", ");
}
