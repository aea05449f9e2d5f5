import type { OptionSpec, ParsedOptions } from "./command-options.js";
import type { Streams } from "./streams.js";

/** One command of the command line: every file of a command has these sections in this order. */
export interface Command {
  readonly name: string;
  /** One line for the list of commands. */
  readonly purpose: string;
  /** What follows the name: "<curve>" or nothing. */
  readonly takes: string;
  readonly options: readonly OptionSpec[];
  /** A worked example: what to type, and a sentence on what it answers. */
  readonly example: { readonly type: string; readonly answers: string };
  run(parsed: ParsedOptions, streams: Streams): void;
}
