import { requireBand } from "./domain.js";
import { MalformedDataError } from "./errors.js";
import { parseQuantity } from "./quantity.js";

/**
 * A band as typed: "0.1Hz:10Hz", "0.1:10 kHz" (one unit for both), "0:inf".
 *
 * @param text - lower and upper edge with a colon between.
 * @throws MalformedDataError for text that is no band; OutOfDomainError for crossed edges.
 *
 * @example
 * ```ts
 * import { readBand } from "@quietband/core";
 * readBand("0.1 Hz : 80 Hz").toHz; // → 80
 * readBand("1:20 kHz").fromHz; // → 1000
 * ```
 */
export function readBand(text: string): { readonly fromHz: number; readonly toHz: number } {
  const [low, high, ...more] = text.split(":").map((edge) => edge.trim());
  if (low === undefined || high === undefined || more.length > 0)
    throw new MalformedDataError(
      `Expected a band of two frequencies with a colon between, for instance 0.1Hz:10Hz; got "${text.slice(0, 40)}".`,
    );
  const upper = edgeOf(high, text);
  const lower = edgeOf(low, text);
  if (upper.unit === "" && upper.value !== 0 && upper.value !== Number.POSITIVE_INFINITY)
    throw new MalformedDataError(
      `Expected a unit on the upper edge of a band, for instance 0.1Hz:10Hz; got "${text.slice(0, 40)}".`,
    );
  // "1:20 kHz": the unit of the upper edge stands for both, its prefix included
  const shared =
    lower.unit === "" && lower.value !== 0 ? edgeOf(`${low}${high.replace(/^[^a-zA-Zµμ]*/, "")}`, text) : lower;
  requireBand(shared.value, upper.value);
  return Object.freeze({ fromHz: shared.value, toHz: upper.value });
}

function edgeOf(text: string, whole: string): { readonly value: number; readonly unit: string } {
  if (/^(inf|infinity|∞)$/i.test(text)) return { value: Number.POSITIVE_INFINITY, unit: "" };
  const found = parseQuantity(text, false);
  if (found !== undefined && (found.unit === "Hz" || found.unit === "")) return found;
  throw new MalformedDataError(
    `Expected frequencies in Hz for the band "${whole.slice(0, 40)}"; got "${text.slice(0, 40)}".`,
  );
}
