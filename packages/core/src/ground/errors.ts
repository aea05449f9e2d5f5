/** What kind of refusal a {@link NoiseError} is; stable, for scripts. */
export type NoiseErrorCode = "out-of-domain" | "malformed-data" | "divergent-integral" | "no-convergence";

/**
 * Every error this library throws on purpose. The message is one sentence: what was expected, what came, its unit and
 * what to do. Anything else that escapes is a defect of the library.
 *
 * @example
 * ```ts
 * import { NoiseError, readQuantity } from "@quietband/core";
 * let code = "";
 * try { readQuantity("ten hertz"); } catch (error) { if (error instanceof NoiseError) code = error.code; }
 * code; // → malformed-data
 * ```
 */
export class NoiseError extends Error {
  readonly code: NoiseErrorCode;

  constructor(code: NoiseErrorCode, message: string) {
    super(message);
    this.name = new.target.name;
    this.code = code;
  }
}

/** A value outside the domain of the function it was given to. */
export class OutOfDomainError extends NoiseError {
  constructor(message: string) {
    super("out-of-domain", message);
  }
}

/** Data that cannot be read as what it should be; `line` (from 1) or `index` (from 0) say where, when known. */
export class MalformedDataError extends NoiseError {
  readonly line: number | undefined;
  readonly index: number | undefined;

  constructor(message: string, place: { readonly line?: number; readonly index?: number } = {}) {
    super("malformed-data", message);
    this.line = place.line;
    this.index = place.index;
  }
}

/** An integral that has no finite value; `edge` is the band edge to move. */
export class DivergentIntegralError extends NoiseError {
  readonly edge: "fromHz" | "toHz";

  constructor(message: string, edge: "fromHz" | "toHz") {
    super("divergent-integral", message);
    this.edge = edge;
  }
}

/** A search or an integration that did not reach its tolerance; carries the best estimate it had. */
export class NoConvergenceError extends NoiseError {
  readonly bestEstimate: number;
  readonly estimatedError: number;

  constructor(message: string, best: { readonly bestEstimate: number; readonly estimatedError: number }) {
    super("no-convergence", message);
    this.bestEstimate = best.bestEstimate;
    this.estimatedError = best.estimatedError;
  }
}
