import { type Beyond, type Curve, MalformedDataError, readCurve } from "@quietband/core";
import type { OptionSpec, ParsedOptions } from "./command-options.js";
import type { Streams } from "./streams.js";
import { UsageError } from "./usage-error.js";

/** Options of every command that integrates a curve. */
export const beyondOptions: readonly OptionSpec[] = Object.freeze([
  {
    name: "below",
    value: "EXPONENT",
    help: "go on below the points as f^−EXPONENT (power), for instance 1; also hold or segments",
  },
  { name: "above", value: "EXPONENT", help: "go on above the points, for instance 0; also hold or segments" },
]);

/** The one curve a command works on: a file, or - for standard input. */
export function readCurveInput(
  command: string,
  parsed: ParsedOptions,
  streams: Streams,
): { readonly curve: Curve; readonly name: string } {
  const [path, ...more] = parsed.files;
  if (path === undefined || more.length > 0)
    throw new UsageError(
      `quietband ${command} takes one curve: a file, or - for standard input; got ${parsed.files.length}.`,
    );
  const curve = readCurve(path === "-" ? streams.readInput() : streams.readFile(path));
  return { curve, name: curve.label === "" ? fileTitle(path) : curve.label };
}

/** What a curve without a label is called: its file without folder and ending. */
export function fileTitle(path: string): string {
  return path === "-" ? "standard input" : (path.split(/[\\/]/).at(-1) ?? path).replace(/\.[^.]+$/, "");
}

export function readBeyond(parsed: ParsedOptions): Beyond {
  return { below: side(parsed.one("below"), "below"), above: side(parsed.one("above"), "above") };
}

function side(text: string | undefined, name: string): "refuse" | "hold" | "segments" | number {
  if (text === undefined) return "refuse";
  if (text === "hold" || text === "segments") return text;
  const exponent = Number(text);
  if (text.trim() !== "" && Number.isFinite(exponent)) return exponent;
  throw new MalformedDataError(`Expected an exponent, hold or segments for --${name}; got "${text.slice(0, 40)}".`);
}

/** Lines of provenance that every report prints under its heading. */
export function provenanceLines({ source }: Curve): string[] {
  return source.map(({ key, value }) => (key === "" ? `  ${value}` : `  ${key}: ${value}`));
}
