import { UsageError } from "./usage-error.js";

/** One option a command takes. */
export interface OptionSpec {
  /** Without the dashes. */
  readonly name: string;
  /** What to type after it, for help; empty for a switch. */
  readonly value: string;
  readonly help: string;
  /** May be given more than once. */
  readonly repeats?: boolean;
}

/** What was typed after the name of a command. */
export interface ParsedOptions {
  readonly files: readonly string[];
  /** The values of an option, in the order typed; empty when it was not. */
  all(name: string): readonly string[];
  /** Its one value, when typed. */
  one(name: string): string | undefined;
  has(name: string): boolean;
}

/** Reads what follows a command; refuses options it does not take and says which one was probably meant. */
export function parseOptions(command: string, specs: readonly OptionSpec[], words: readonly string[]): ParsedOptions {
  const files: string[] = [];
  const values = new Map<string, string[]>();
  for (let index = 0; index < words.length; index += 1) {
    const word = words[index] as string;
    if (!isOption(command, word)) {
      files.push(word);
      continue;
    }
    const [name, inline] = splitOnce(word.slice(2));
    const spec = specs.find((known) => known.name === name);
    if (spec === undefined) throw new UsageError(unknownOption(command, name, specs));
    const follows = spec.value !== "" && inline === undefined;
    const value = givenValue(spec, follows ? words[index + 1] : inline);
    if (follows) index += 1;
    const before = values.get(name) ?? [];
    if (before.length > 0 && spec.repeats !== true) throw new UsageError(`--${name} may be given once only.`);
    values.set(name, [...before, value]);
  }
  return {
    files,
    all: (name) => values.get(name) ?? [],
    one: (name) => values.get(name)?.[0],
    has: (name) => values.has(name),
  };
}

function isOption(command: string, word: string): boolean {
  if (word.startsWith("--") && word.length > 2) return true;
  if (!word.startsWith("-") || word.length === 1) return false;
  throw new UsageError(`Options begin with two dashes; got ${word}. See quietband ${command} --help.`);
}

function givenValue({ name, value: expected }: OptionSpec, given: string | undefined): string {
  if (expected === "" && given !== undefined) throw new UsageError(`--${name} takes no value; got ${given}.`);
  if (expected !== "" && given === undefined) throw new UsageError(`--${name} needs a value: --${name} ${expected}.`);
  return given ?? "";
}

function splitOnce(text: string): readonly [string, string | undefined] {
  const at = text.indexOf("=");
  return at < 0 ? [text, undefined] : [text.slice(0, at), text.slice(at + 1)];
}

function unknownOption(command: string, name: string, specs: readonly OptionSpec[]): string {
  const near = nearest(
    name,
    specs.map((spec) => spec.name),
  );
  const meant = near === undefined ? "" : ` Did you mean --${near}?`;
  return `quietband ${command} takes no option --${name}.${meant}`;
}

/** The known word closest to a mistyped one, when it is close: two letters off, or a third of them. */
export function nearest(word: string, known: readonly string[]): string | undefined {
  let best: string | undefined;
  let least = Number.POSITIVE_INFINITY;
  for (const candidate of known) {
    const far = lettersApart(word, candidate);
    if (far < least) [best, least] = [candidate, far];
  }
  return least <= Math.max(2, word.length / 3) ? best : undefined;
}

/** Levenshtein distance. */
function lettersApart(one: string, other: string): number {
  let row = Array.from({ length: other.length + 1 }, (_, index) => index);
  for (let i = 1; i <= one.length; i += 1) {
    const next = [i];
    for (let j = 1; j <= other.length; j += 1) {
      const change = (row[j - 1] ?? 0) + (one[i - 1] === other[j - 1] ? 0 : 1);
      next.push(Math.min(change, (row[j] ?? 0) + 1, (next[j - 1] ?? 0) + 1));
    }
    row = next;
  }
  return row[other.length] ?? 0;
}
