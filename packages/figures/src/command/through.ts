import { cascade, MalformedDataError, OutOfDomainError, readQuantity, type Weighting } from "@quietband/core";
import { type FilterKind, type FilterNumber, filterKinds } from "../chain/filter-kinds.js";
import { nearest } from "./command-options.js";

/** For help: every kind and what it asks for. */
export function throughKinds(): string[] {
  return Object.entries(filterKinds).map(([name, { numbers }]) =>
    [name, ...numbers.map(({ word, unit }) => (unit === "" ? `${word} N` : `${word} ${unit}`))].join(", "),
  );
}

/**
 * A filter in words: its kind, then its numbers after commas, each with its word ("order 2", "cutoff 5 Hz") or, where only
 * one number of that unit is asked for, without ("5 Hz"). Several make a cascade.
 */
export function readThrough(texts: readonly string[]): Weighting | undefined {
  const [first, ...others] = texts.map(readFilter);
  return first === undefined ? undefined : cascade(first, ...others);
}

function readFilter(text: string): Weighting {
  const [name = "", ...rest] = text.split(",").map((part) => part.trim());
  const known = Object.keys(filterKinds).find((kind) => kind.toLowerCase() === name.toLowerCase());
  if (known === undefined) {
    const near = nearest(name, Object.keys(filterKinds));
    throw new MalformedDataError(
      `No filter is called "${name.slice(0, 40)}"; ${near === undefined ? `known are ${Object.keys(filterKinds).join(", ")}` : `did you mean "${near}"?`}${near === undefined ? "." : ""}`,
    );
  }
  const kind = filterKinds[known] as FilterKind;
  const asks = kind.numbers;
  const values: Record<string, number> = {};
  for (const part of rest) readNumber(known, asks, part, values);
  const missing = asks.find(({ word }) => values[word] === undefined);
  if (missing !== undefined)
    throw new OutOfDomainError(
      `A ${known} needs ${asks.map(({ word, unit }) => (unit === "" ? word : `${word} in ${unit}`)).join(", ")}; ${missing.word} is missing.`,
    );
  return kind.make(values);
}

function readNumber(kind: string, asks: readonly FilterNumber[], part: string, values: Record<string, number>): void {
  const named = asks.find(({ word }) => part.toLowerCase().startsWith(`${word} `));
  const text = named === undefined ? part : part.slice(named.word.length + 1);
  const found = readQuantity(text);
  const asked = named ?? onlyOne(asks.filter(({ word, unit }) => unit === found.unit && values[word] === undefined));
  if (asked === undefined || (found.unit !== asked.unit && found.unit !== ""))
    throw new MalformedDataError(
      `Expected the numbers of a ${kind} as ${asks.map(({ word, unit }) => `"${word} ${unit === "" ? "N" : `1 ${unit}`}"`).join(", ")}; got "${part.slice(0, 40)}".`,
    );
  values[asked.word] = found.value;
}

function onlyOne<Item>(items: readonly Item[]): Item | undefined {
  return items.length === 1 ? items[0] : undefined;
}
