import { OutOfDomainError } from "@quietband/core";
import { requirePositive } from "./domain.js";

/** An RMS value: a number, or any result that carries one (`bandNoise`, `runningNoise` ...). */
export type Rms = number | { readonly rms: number };

/** The number in an {@link Rms}, positive; a peak-to-peak value is refused, for its level would be some 16 dB off. */
export function rmsOf(name: string, given: Rms, unit = ""): number {
  if (!(given instanceof Object)) return requirePositive(name, given, unit);
  if ((given as { readonly kind?: unknown }).kind === "peak-to-peak")
    throw new OutOfDomainError(
      `${name} must be an RMS value${unit === "" ? "" : ` in ${unit}`}; got a peak-to-peak value; take its rms, or rmsFromPeakToPeak with the factor it was made with.`,
    );
  return requirePositive(name, given.rms, unit);
}
