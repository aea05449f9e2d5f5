import { type Beyond, OutOfDomainError, type Weighting } from "@quietband/core";
import { refuseUnknownKeys, requirePositive, requireWhole } from "../convert/domain.js";

/** What {@link checkStatedFigure} takes besides curve and figure: what is known of how the figure came about. */
export interface CheckOptions {
  /** How the curve goes on beyond its points, where the figure's band reaches there. */
  readonly beyond?: Beyond | undefined;
  /**
   * What a peak-to-peak figure is: a factor times the RMS ("convention"), or what a record showed ("record"); both are looked
   * at unless given.
   */
  readonly basis?: FigureBasis | undefined;
  /** Peak-to-peak / RMS of the convention; 6.6 by common practice. */
  readonly factor?: number | undefined;
  /** The filter the figure was measured through, or "brick wall"; either of brick wall and usual filter unless given. */
  readonly weighting?: Weighting | "brick wall" | undefined;
  /** Length of a record, s; 10 s unless given. */
  readonly recordSeconds?: number | undefined;
  /** The figure is the largest of so many records; 1 unless given. */
  readonly records?: number | undefined;
  /** Samples per second of the record; a continuous trace unless given. */
  readonly sampleRateHz?: number | undefined;
  /** What a ratio (ppm) is of: the reference, in the curve's unit. */
  readonly relativeTo?: number | undefined;
}

/** What a peak-to-peak figure is: a factor times the RMS, or what a record showed. */
export type FigureBasis = "convention" | "record";

const optionNames: readonly (keyof CheckOptions)[] = [
  ...(["beyond", "basis", "factor", "weighting"] as const),
  ...(["recordSeconds", "records", "sampleRateHz", "relativeTo"] as const),
];

/** The options with what is assumed where nothing was said. */
export interface KnownMeasurement {
  readonly bases: readonly FigureBasis[];
  readonly factor: number | undefined;
  readonly weighting: CheckOptions["weighting"];
  readonly recordSeconds: number;
  readonly records: number;
  readonly sampleRateHz: number | undefined;
  readonly beyond: Beyond | undefined;
}

function requireWord(name: string, word: string | undefined, known: readonly string[]): void {
  if (word === undefined || known.includes(word)) return;
  throw new OutOfDomainError(`${name} must be ${known.map((one) => `"${one}"`).join(" or ")}; got "${word}".`);
}

export function knownMeasurement(options: CheckOptions): KnownMeasurement {
  refuseUnknownKeys("checkStatedFigure", optionNames, options);
  const { basis, factor, weighting, sampleRateHz, beyond } = options;
  requireWord("basis", basis, ["convention", "record"]);
  if (typeof weighting === "string") requireWord("weighting, unless it is a filter,", weighting, ["brick wall"]);
  return {
    bases: basis === undefined ? ["convention", "record"] : [basis],
    factor,
    weighting,
    recordSeconds: requirePositive("recordSeconds", options.recordSeconds ?? 10, "s"),
    records: requireWhole("records", options.records ?? 1, [1, 1e9]),
    sampleRateHz: sampleRateHz === undefined ? undefined : requirePositive("sampleRateHz", sampleRateHz, "Hz"),
    beyond,
  };
}
