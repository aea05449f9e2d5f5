import { OutOfDomainError } from "./errors.js";

/**
 * Completes what the caller gave from one frozen object of defaults and refuses keys that the defaults do not have.
 * `where` names the function in the message. A key given as `undefined` counts as not given.
 */
export function completeOptions<Options extends object>(
  where: string,
  defaults: Options,
  given: { readonly [Key in keyof Options]?: Options[Key] | undefined } | undefined,
): Options {
  const known = Object.keys(defaults);
  refuseUnknownKeys(where, known, given);
  const complete: Record<string, unknown> = Object.fromEntries(Object.entries(defaults));
  for (const [key, value] of Object.entries(given ?? {})) if (value !== undefined) complete[key] = value;
  return complete as Options;
}

/** Refuses keys nobody reads: a misspelt option must not pass as a default. */
export function refuseUnknownKeys(where: string, known: readonly string[], given: object | undefined): void {
  for (const key of Object.keys(given ?? {})) {
    if (known.includes(key)) continue;
    throw new OutOfDomainError(`${where} knows no option "${key}"; it takes ${known.join(", ")}.`);
  }
}
