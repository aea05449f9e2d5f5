import { OutOfDomainError, writeQuantity } from "@quietband/core";
import { requireFinite, requirePositive } from "../convert/domain.js";
import { zeroCelsius } from "./physical-constants.js";

/** A temperature by one of two scales. */
export interface Temperature {
  /** K, positive. */
  readonly kelvin?: number | undefined;
  /** °C, above −273.15. */
  readonly celsius?: number | undefined;
}

/** Where none is given; every report prints it. */
export const assumedCelsius = 25;

/** Kelvins, and the words a report prints: an assumed temperature is said to be one. */
export function resolveTemperature({ kelvin, celsius }: Temperature): {
  readonly kelvin: number;
  readonly words: string;
} {
  if (kelvin !== undefined && celsius !== undefined)
    throw new OutOfDomainError("A temperature is given by kelvin or by celsius, not by both.");
  if (kelvin !== undefined)
    return { kelvin: requirePositive("kelvin", kelvin, "K"), words: writeQuantity(kelvin, "K") };
  const given = requireFinite("celsius", celsius ?? assumedCelsius, "°C");
  const words = `${writeQuantity(given, "°C")}${celsius === undefined ? " (assumed)" : ""}`;
  return { kelvin: requirePositive("The temperature", given + zeroCelsius, "K"), words };
}
