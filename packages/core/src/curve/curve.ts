/** One point of a curve, in SI units. */
export interface CurvePoint {
  /** Hz. */
  readonly frequency: number;
  /** Amplitude density, unit/√Hz. */
  readonly density: number;
  /** Relative standard uncertainty (k = 1) of the density, independent from point to point. */
  readonly uncertainty: number;
  /** False where the point is kept for show and left out of fits. */
  readonly inFit: boolean;
  /** Line of the text it was read from, counted from 1. */
  readonly line?: number;
}

/**
 * Points (frequency, density) read off a plot or typed in, ascending in frequency, with what is known of them.
 * Made by `curveFromPoints`, `readCurve` or `pointsFromPicks`; frozen.
 */
export interface Curve {
  /** Unit of the signal: "V" means densities in V/√Hz. */
  readonly unit: string;
  /** Name for reports and legends; may be empty. */
  readonly label: string;
  readonly points: readonly CurvePoint[];
  /** Whether the point uncertainties were given or are the library's assumption (5 %), which every report prints. */
  readonly uncertaintyIs: "given" | "assumed";
  /** Relative standard uncertainty of an error common to all points (a misread axis); 0 when none was stated. */
  readonly commonUncertainty: number;
  /** Errors that points share but feel differently: the calibration of a plot's axes. Independent of each other. */
  readonly commonEffects?: readonly CommonEffect[];
  /** Where it comes from: `key: value` pairs in the order given (document, figure, conditions, stated figures ...). */
  readonly source: readonly CurveSourceEntry[];
}

/** One standard deviation of a shared error and what it does to each point. */
export interface CommonEffect {
  /** "frequency axis", "density axis". */
  readonly name: string;
  /** Relative change of the density of each point, in the order of the points. */
  readonly effects: readonly number[];
}

/** One line of provenance; `key` is empty for a free remark. */
export interface CurveSourceEntry {
  readonly key: string;
  readonly value: string;
}
