import { MalformedDataError } from "@quietband/core";
import { repeatedKey } from "./repeated-key.js";

/** What a JSON text holds; a key that stands twice in one record is refused. `what` begins the sentence: "A chain file". */
export function parseFile(json: string, what: string): unknown {
  let value: unknown;
  try {
    value = JSON.parse(json);
  } catch (error) {
    // the parser quotes lines of the text; a refusal is one line
    const why = error instanceof Error ? error.message.replace(/\s+/g, " ") : "it is not";
    throw new MalformedDataError(`${what} must be JSON; ${why}.`);
  }
  const twice = repeatedKey(json);
  if (twice === undefined) return value;
  throw new MalformedDataError(`${what} must give each key of a record once; "${twice.slice(0, 40)}" stands twice.`);
}
