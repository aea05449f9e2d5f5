import { requireBand } from "./domain.js";
import { MalformedDataError } from "./errors.js";
import { quoted } from "./quoted.js";
import { readQuantity } from "./read-quantity.js";

/** Band edges. */
export interface BandEdges {
  readonly fromHz: number;
  readonly toHz: number;
}

/**
 * Reads a band as it is typed: `0.1Hz:80Hz`, `0.1:10 Hz`, `10 Hz : 20 kHz`, `0:1k`, `1Hz:inf`.
 *
 * @param text - lower and upper edge with a colon between. A lower edge without a unit takes that of the upper edge when it
 *   is plain Hz; under `1:20 kHz` it could be 1 Hz or 1 kHz, so that is refused. 0 and inf (or ∞) need no unit.
 * @throws MalformedDataError for text that is no band; OutOfDomainError where the edges are not 0 ≤ from < to.
 *
 * @example
 * ```ts
 * import { readBand } from "@quietband/core";
 * readBand("0.1Hz:80Hz"); // → {"fromHz":0.1,"toHz":80}
 * readBand("10 Hz : 20 kHz").toHz; // → 20000
 * readBand("0.1:10 Hz").fromHz; // → 0.1
 * ```
 */
export function readBand(text: string): BandEdges {
  const edges = (typeof text === "string" ? text : "").split(":", 3).map((edge) => edge.trim());
  const [low = "", high = ""] = edges;
  if (edges.length !== 2 || low === "" || high === "") throw notBand(text);
  const toHz = edgeHz(high, text);
  const fromHz = edgeHz(isNumber(low) && /[\d.]\s*Hz$/.test(high) ? `${low} Hz` : low, text);
  requireBand(fromHz, toHz);
  return Object.freeze({ fromHz, toHz });
}

function edgeHz(edge: string, text: string): number {
  if (/^(?:inf|infinity|∞)(?:\s*Hz)?$/i.test(edge)) return Number.POSITIVE_INFINITY;
  if (!isNumber(edge)) return readQuantity(edge, { unit: "Hz" }).value;
  if (Number(edge) === 0) return 0;
  throw notBand(text);
}

function isNumber(edge: string): boolean {
  return /^[\d.]/.test(edge) && Number.isFinite(Number(edge));
}

function notBand(text: string): MalformedDataError {
  return new MalformedDataError(`Expected a band with units at its edges, such as 0.1Hz:80Hz; got ${quoted(text)}.`);
}
