import { OutOfDomainError, type Spectrum } from "@quietband/core";
import { requireNotNegative, requirePositive, shown } from "../convert/domain.js";
import type { LoopNetwork } from "./closed-loop.js";
import type { Temperature } from "./temperature.js";

/** What {@link amplifierStage} takes. */
export interface AmplifierStageOptions extends Temperature {
  readonly connection: "nonInverting" | "inverting";
  /** Voltage noise between the inputs, V²/Hz. */
  readonly voltageNoise: Spectrum;
  /** Current noise of each input, A²/Hz; the two are independent. None unless given. */
  readonly currentNoise?: Spectrum | undefined;
  /** Current noise of the inverting input, where it differs. */
  readonly invertingCurrentNoise?: Spectrum | undefined;
  /**
   * R1: from the inverting input to ground, or to the signal of an inverting stage, whose source resistance belongs to it;
   * Ω. Left out, the stage is a follower.
   */
  readonly groundOhms?: number | undefined;
  /** R2: from the output to the inverting input, Ω; 0 unless given. */
  readonly feedbackOhms?: number | undefined;
  /** R3: what the non-inverting input sees, the source of a non-inverting stage included, Ω; 0 unless given. */
  readonly sourceOhms?: number | undefined;
  /** Product of gain and bandwidth, Hz; the stage has no bandwidth of its own unless given. */
  readonly gainBandwidthHz?: number | undefined;
  /** Quality factor of the closed loop, for an amplifier with a second pole; one pole unless given. */
  readonly q?: number | undefined;
  /** Capacitance from the inverting input to ground, F, the amplifier's own included. */
  readonly inputFarads?: number | undefined;
  /** Capacitance across the feedback resistor, F. */
  readonly feedbackFarads?: number | undefined;
  /** For reports; "stage" unless given. */
  readonly name?: string | undefined;
}

const connections: readonly string[] = Object.freeze(["nonInverting", "inverting"]);

export const stageOptionNames: readonly string[] = Object.freeze([
  "connection",
  "voltageNoise",
  "currentNoise",
  "invertingCurrentNoise",
  "groundOhms",
  "feedbackOhms",
  "sourceOhms",
  "gainBandwidthHz",
  "q",
  "inputFarads",
  "feedbackFarads",
  "name",
  "kelvin",
  "celsius",
]);

/** A stage's network with everything filled in and checked. */
export interface StageNetwork extends LoopNetwork {
  readonly sourceOhms: number;
}

export function resolveNetwork(options: AmplifierStageOptions): StageNetwork {
  const { connection, groundOhms, feedbackOhms = 0, sourceOhms = 0, gainBandwidthHz, q } = options;
  const { inputFarads = 0, feedbackFarads = 0 } = options;
  if (!connections.includes(connection))
    throw new OutOfDomainError(`connection must be 'nonInverting' or 'inverting'; got ${shown(connection)}.`);
  if (groundOhms !== undefined) requirePositive("groundOhms", groundOhms, "Ω");
  requireNotNegative("feedbackOhms", feedbackOhms, "Ω");
  requireNotNegative("sourceOhms", sourceOhms, "Ω");
  requireNotNegative("inputFarads", inputFarads, "F");
  requireNotNegative("feedbackFarads", feedbackFarads, "F");
  if (connection === "inverting" && (groundOhms === undefined || feedbackOhms === 0))
    throw new OutOfDomainError("An inverting stage needs groundOhms, from the signal, and feedbackOhms, in Ω.");
  requireSpeed(options, inputFarads + feedbackFarads > 0);
  return {
    groundOhms: groundOhms ?? Number.POSITIVE_INFINITY,
    feedbackOhms,
    sourceOhms,
    gainBandwidthHz,
    q,
    inputFarads,
    feedbackFarads,
  };
}

/** Peaks need a speed, and one cause. */
function requireSpeed({ gainBandwidthHz, q }: AmplifierStageOptions, capacitive: boolean): void {
  if (gainBandwidthHz !== undefined) requirePositive("gainBandwidthHz", gainBandwidthHz, "Hz");
  if (q !== undefined) requirePositive("q", q);
  if (gainBandwidthHz === undefined && (q !== undefined || capacitive))
    throw new OutOfDomainError("A stage with q or capacitances needs gainBandwidthHz, in Hz, to close its loop.");
  if (q !== undefined && capacitive)
    throw new OutOfDomainError("A stage takes q or capacitances, not both: each makes its own peak.");
}
