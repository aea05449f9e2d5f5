import {
  type Curve,
  cascade,
  MalformedDataError,
  polyline,
  powerLaws,
  readBand,
  readCurve,
  readQuantity,
  type Spectrum,
  writeQuantity,
} from "@quietband/core";
import type { Candidate } from "../chain/candidate.js";
import { type CandidateRow, type CurveComparison, compareCurves } from "../chain/compare-curves.js";
import { candidatesPlot } from "../show/candidates-plot.js";
import { textTable } from "../show/text-table.js";
import type { Command } from "./command.js";
import type { ParsedOptions } from "./command-options.js";
import { beyondOptions, fileTitle, readBeyond } from "./curve-input.js";
import { short } from "./noise-figures.js";
import type { Progress, Streams } from "./streams.js";
import { readThrough } from "./through.js";
import { quantityOption } from "./typed-values.js";
import { UsageError } from "./usage-error.js";

/** Several parts through one path, quietest first. */
export const compareCommand: Command = {
  name: "compare",
  purpose: "several curves through the same band and filter, ranked",
  takes: "<curve> <curve> ...",
  options: [
    { name: "band", value: "FROM:TO", help: "the band, for instance 0.1Hz:10Hz; inf where a filter ends it" },
    {
      name: "through",
      value: "FILTER",
      help: "a filter in words, as quietband noise takes it; may be repeated",
      repeats: true,
    },
    ...beyondOptions,
    {
      name: "spot",
      value: "HZ",
      help: "list the densities at this frequency, source included; may be repeated",
      repeats: true,
    },
    { name: "source", value: "OHMS", help: "resistance of the source: its thermal noise and current noise count" },
    { name: "temperature", value: "T", help: "of the source; 25 °C is assumed, and said to be, unless given" },
    {
      name: "current",
      value: "NAME=NOISE",
      help: "current noise of a curve, by its name: a file, or a white density such as 1.5pA/√Hz; may be repeated",
      repeats: true,
    },
    {
      name: "gain",
      value: "NAME=FACTOR",
      help: "amplitude gain that refers a curve to where all are compared, for instance R2=0.5; may be repeated",
      repeats: true,
    },
    { name: "output", value: "FILE", help: "densities and noise against bandwidth of all, as SVG" },
    { name: "title", value: "WORDS", help: "heading of the picture" },
    { name: "json", value: "", help: "everything as JSON" },
  ],
  example: {
    type: "quietband compare A1.csv J1.csv --band 0.1Hz:10Hz --below 1",
    answers:
      "Which of two amplifiers is quieter between 0.1 Hz and 10 Hz, by how much, and whether the points can tell.",
  },
  run(parsed, streams) {
    const typed = parsed.one("band");
    if (typed === undefined) throw new UsageError("quietband compare needs a band: --band 0.1Hz:10Hz.");
    if (parsed.files.length === 0)
      throw new UsageError("quietband compare takes the curves to compare: files, or - for standard input; got none.");
    const { fromHz, toHz } = readBand(typed);
    const weighting = readThrough(parsed.all("through"));
    const { candidates, curves } = readCandidates(parsed, streams);
    const path = {
      fromHz,
      toHz,
      weighting,
      sourceOhms: quantityOption(parsed, "source", "Ω"),
      celsius: quantityOption(parsed, "temperature", "°C"),
    };
    const spotsHz = parsed.all("spot").map((text) => readQuantity(text, { unit: "Hz" }).value);
    const comparison = compareCurves(candidates, { ...path, spotsHz });
    const output = parsed.one("output");
    if (output !== undefined) {
      const ranked = comparison.rows.flatMap((row) => candidates.filter(({ name }) => name === row.name));
      const title = parsed.one("title") ?? "Candidates";
      streams.writeFile(output, candidatesPlot(ranked, { ...path, title, note: comparison.notes.join(" ") }));
    }
    if (parsed.has("json")) {
      const sources = curves.map(({ name, curve }) => ({ name, source: curve.source }));
      streams.print(`${JSON.stringify({ through: weighting?.name, comparison, curves: sources }, undefined, 2)}\n`);
      return;
    }
    const through = weighting === undefined ? "" : ` through ${cascade(weighting).name}`;
    streams.print(
      [
        `${comparison.rows.length} ${comparison.rows.length === 1 ? "curve" : "curves"}, ${edge(fromHz)} to ${edge(toHz)}${through}`,
        "",
        rankedTable(comparison),
        "",
        ...[...comparison.notes, ...rowNotes(comparison.rows)].map((note) => `  ${note}`),
        "  not included: part-to-part spread of a typical curve",
        "",
      ].join("\n"),
    );
  },
};

interface NamedCurve {
  readonly name: string;
  readonly curve: Curve;
}

function readCandidates(
  parsed: ParsedOptions,
  streams: Streams,
): { readonly candidates: readonly (Candidate & { readonly name: string })[]; readonly curves: readonly NamedCurve[] } {
  const read = (path: string): Curve => readCurve(path === "-" ? streams.readInput() : streams.readFile(path));
  const beyond = readBeyond(parsed);
  const curves = named(readAll(parsed.files, read, streams.progress("reading", parsed.files.length)));
  const names = curves.map(({ name }) => name);
  const gains = byName(parsed, "gain", names);
  const currents = byName(parsed, "current", names);
  const candidates = curves.map(({ name, curve }) => {
    const current = currents.get(name);
    return {
      name,
      spectrum: polyline(curve, { beyond }),
      gain: factorOf(gains.get(name)),
      currentNoise:
        current === undefined ? undefined : currentNoise(current, () => polyline(read(current), { beyond })),
    };
  });
  return { candidates, curves };
}

/** Every file in its turn; a display of progress is taken away also where one cannot be read. */
function readAll(
  paths: readonly string[],
  read: (path: string) => Curve,
  progress: Progress,
): readonly { readonly path: string; readonly curve: Curve }[] {
  try {
    return paths.map((path) => {
      const curve = read(path);
      progress.step();
      return { path, curve };
    });
  } finally {
    progress.end();
  }
}

/** By label or file; where two would be called the same, by the whole path. */
function named(files: readonly { readonly path: string; readonly curve: Curve }[]): readonly NamedCurve[] {
  const titled = files.map(({ path, curve }) => (curve.label === "" ? fileTitle(path) : curve.label));
  return files.map(({ path, curve }, index) => {
    const name = titled[index] as string;
    return { name: titled.indexOf(name) === titled.lastIndexOf(name) ? name : path, curve };
  });
}

/** Values of an option typed as NAME=VALUE, one for a curve at most. */
function byName(parsed: ParsedOptions, option: string, names: readonly string[]): ReadonlyMap<string, string> {
  const values = new Map<string, string>();
  for (const text of parsed.all(option)) {
    const name = names.find((known) => text.startsWith(`${known}=`));
    if (name === undefined)
      throw new MalformedDataError(
        `Expected --${option} for one of the curves, ${names.map((known) => `${known}=...`).join(" or ")}; got "${text.slice(0, 40)}".`,
      );
    if (values.has(name)) throw new MalformedDataError(`--${option} may be given once for ${name}.`);
    values.set(name, text.slice(name.length + 1));
  }
  return values;
}

function factorOf(text: string | undefined): number | undefined {
  if (text === undefined) return undefined;
  const value = Number(text);
  if (text.trim() !== "" && Number.isFinite(value)) return value;
  throw new MalformedDataError(`Expected a plain number for the factor of --gain; got "${text.slice(0, 40)}".`);
}

/** A density typed with its unit is white; anything else names a file. */
function currentNoise(text: string, readFile: () => Spectrum): Spectrum {
  if (!/^[\d.,]+\s*\S*A\s*\/\s*\S+$/.test(text)) return readFile();
  const density = readQuantity(text, { unit: "A/√Hz" }).value;
  return powerLaws([{ coefficient: density * density, exponent: 0 }], { unit: "A" });
}

function rankedTable({ unit, spotsHz, rows }: CurveComparison): string {
  return textTable({
    columns: [
      { heading: "" },
      { heading: "curve" },
      { heading: "RMS", align: "right" },
      { heading: "± (k = 1)", align: "right" },
      { heading: "over the first", align: "right" },
      { heading: "beyond the points", align: "right" },
      ...spotsHz.map((hz) => ({ heading: `at ${writeQuantity(hz, "Hz")}`, align: "right" as const })),
    ],
    rows: rows.map((row) => [
      `${row.rank}`,
      row.name,
      short(row.rms, unit),
      row.standardUncertainty === undefined ? "not stated" : `${(100 * row.standardUncertainty).toFixed(1)} %`,
      overBest(row),
      percent(row.outsidePoints.below + row.outsidePoints.above),
      ...row.densities.map((density) => short(density, `${unit}/√Hz`)),
    ]),
  });
}

/** A ratio that the points cannot tell from 1 is no ranking. */
function overBest({ rank, overBest: ratio, tiedWithBest }: CandidateRow): string {
  if (rank === 1) return "";
  return `× ${ratio.toPrecision(3)}${tiedWithBest ? " (a tie)" : ""}`;
}

function rowNotes(rows: readonly CandidateRow[]): readonly string[] {
  return rows.flatMap(({ name, notes }) => notes.map((note) => `${name}: ${note}`));
}

/** What a filter leaves of the frequencies beyond the points is not worth a number. */
function percent(share: number): string {
  return share < 1e-6 ? "none" : `${Number((100 * share).toPrecision(2))} %`;
}

function edge(hz: number): string {
  return hz === Number.POSITIVE_INFINITY ? "∞" : writeQuantity(hz, "Hz");
}
