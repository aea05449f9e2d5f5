import { MalformedDataError } from "../ground/errors.js";
import { sentence } from "../ground/quoted.js";

/** A refusal of a curve's text, in one sentence that begins with its line. */
export function refusal(line: number, text: string): MalformedDataError {
  return new MalformedDataError(sentence(`Line ${line}: ${text}`), { line });
}
