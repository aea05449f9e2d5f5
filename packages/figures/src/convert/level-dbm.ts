import { refuseUnknownKeys, requirePositive } from "./domain.js";
import { powerRatioFromDb } from "./power-ratio-db.js";
import { type Rms, rmsOf } from "./rms.js";

/** The resistance a level in dBm is of: without it a voltage has no power. */
export interface LevelLoad {
  /** Ω, positive. */
  readonly ohms: number;
}

const milliwatt = 1e-3;

/**
 * Level re 1 mW of an RMS voltage across a resistance: 10·log10(rms²/(R·1 mW)), dBm.
 *
 * @param rms - RMS voltage, V, positive, or a result with an rms.
 * @param load - `ohms`, required.
 * @throws OutOfDomainError for what is not positive, and for a peak-to-peak value.
 *
 * @example
 * ```ts
 * import { levelDbm } from "@quietband/figures";
 * levelDbm(1, { ohms: 50 }); // → 13.0103
 * ```
 */
export function levelDbm(rms: Rms, load: LevelLoad): number {
  const value = rmsOf("rms", rms, "V");
  return 10 * Math.log10(value * (value / (ohmsOf("levelDbm", load) * milliwatt)));
}

/**
 * RMS voltage, V, of a level in dBm across a resistance.
 *
 * @example
 * ```ts
 * import { rmsFromDbm } from "@quietband/figures";
 * rmsFromDbm(0, { ohms: 600 }); // → 0.774597
 * ```
 */
export function rmsFromDbm(dbm: number, load: LevelLoad): number {
  return Math.sqrt(powerRatioFromDb(dbm) * ohmsOf("rmsFromDbm", load) * milliwatt);
}

function ohmsOf(where: string, load: LevelLoad): number {
  refuseUnknownKeys(where, ["ohms"], load);
  return requirePositive("ohms, the resistance the level is of,", (load as LevelLoad | undefined)?.ohms as number, "Ω");
}
