import { NoiseError } from "@quietband/core";
import type { Command } from "./command.js";
import { nearest, type OptionSpec, parseOptions } from "./command-options.js";
import type { Streams } from "./streams.js";
import { UsageError } from "./usage-error.js";

/** Exit status: done, bad input, used wrongly. */
export const exitStatus: Readonly<Record<"done" | "badInput" | "usage", number>> = Object.freeze({
  done: 0,
  badInput: 1,
  usage: 2,
});

/** Runs one line of the command line and returns its exit status. Every error is one clear line. */
export function runCommandLine(words: readonly string[], commands: readonly Command[], streams: Streams): number {
  try {
    const [name, ...rest] = words;
    if (name === undefined || name === "--help" || name === "help") {
      streams.print(overview(commands));
      return name === undefined ? exitStatus.usage : exitStatus.done;
    }
    const command = commands.find((known) => known.name === name);
    if (command === undefined) throw new UsageError(unknownCommand(name, commands));
    if (rest.includes("--help")) {
      streams.print(helpOf(command));
      return exitStatus.done;
    }
    command.run(parseOptions(command.name, command.options, rest), streams);
    return exitStatus.done;
  } catch (error) {
    if (error instanceof UsageError) {
      streams.complain(`${error.message}\n`);
      return exitStatus.usage;
    }
    if (error instanceof NoiseError || isFileError(error)) {
      streams.complain(`${error instanceof NoiseError ? asTyped(error.message) : fileSentence(error)}\n`);
      return exitStatus.badInput;
    }
    throw error;
  }
}

/** The library names its options as a script types them; here they have dashes. */
function asTyped(message: string): string {
  return message.replace(/beyond: \{ (below|above): (\d) \}/g, "--$1 $2");
}

function isFileError(error: unknown): error is NodeJS.ErrnoException {
  return error instanceof Error && "syscall" in error;
}

/** What went wrong with a file, in a sentence. */
function fileSentence({ code, path = "it", message }: NodeJS.ErrnoException): string {
  if (code === "ENOENT") return `Expected a file at ${path}; there is none.`;
  if (code === "EISDIR") return `Expected a file at ${path}; it is a folder.`;
  return code === "EACCES" ? `The file at ${path} may not be opened; check its permissions.` : message;
}

function unknownCommand(name: string, commands: readonly Command[]): string {
  const near = nearest(
    name,
    commands.map((command) => command.name),
  );
  const meant =
    near === undefined ? `It knows ${commands.map((command) => command.name).join(", ")}.` : `Did you mean ${near}?`;
  return `quietband has no command ${name}. ${meant}`;
}

function overview(commands: readonly Command[]): string {
  const width = Math.max(...commands.map((command) => `${command.name} ${command.takes}`.length));
  const lines = commands.map((command) => `  ${`${command.name} ${command.takes}`.padEnd(width)}  ${command.purpose}`);
  return [
    "quietband turns a noise-density curve into the figures a design review asks for.",
    "",
    ...lines,
    "",
    "quietband <command> --help shows its options and an example. A curve is a file, or - for standard input.",
    "Quantities are typed with their units: --band 0.1Hz:10Hz.",
    "",
  ].join("\n");
}

function helpOf(command: Command): string {
  const shown = ({ name, value }: OptionSpec): string => (value === "" ? `--${name}` : `--${name} ${value}`);
  const width = Math.max(0, ...command.options.map((spec) => shown(spec).length));
  const options = command.options.flatMap((spec) => wrapped(`  ${shown(spec).padEnd(width)}  `, spec.help));
  return [
    `quietband ${command.name} ${command.takes}`.trimEnd(),
    "",
    command.purpose,
    "",
    ...options,
    "",
    "Example",
    `  ${command.example.type}`,
    ...wrapped("  ", command.example.answers),
    "",
  ].join("\n");
}

/** Words in lines of at most 100 characters, the following lines indented like the first. */
function wrapped(lead: string, text: string): string[] {
  const lines: string[] = [];
  let line = lead;
  for (const word of text.split(" ")) {
    if (line.length + word.length > 100 && line.trim() !== "") {
      lines.push(line.trimEnd());
      line = " ".repeat(lead.length);
    }
    line += `${word} `;
  }
  return [...lines, line.trimEnd()];
}
