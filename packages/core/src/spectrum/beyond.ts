import { requireFinite } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { refuseUnknownKeys } from "../ground/options.js";

/**
 * How a spectrum goes on beyond the points it rests on, below and above.
 *
 * - `'refuse'`: not at all (the default); asking there is an error.
 * - `'hold'`: the density stays at its value at the last point.
 * - `'segments'`: its own law goes on: the end segment of a polyline, the formula of a fitted model. For published
 *   profiles whose ends are lines by definition.
 * - a number: the power density goes on from the last point as f^−exponent.
 * - `{ exponent, standardUncertainty }`: the same; the exponent's uncertainty joins the result's.
 *
 * A bare exponent carries ± 0.15 (k = 1), which the note says: going on below a hand-read
 * curve with exponent 1 ± 0.15 is far safer than with its last two points, which scatter by 8 %.
 */
export type BeyondSide =
  | "refuse"
  | "hold"
  | "segments"
  | number
  | { readonly exponent: number; readonly standardUncertainty: number };

/** One rule for both sides, or one for each. */
export type Beyond =
  | "refuse"
  | "hold"
  | "segments"
  | { readonly below?: BeyondSide | undefined; readonly above?: BeyondSide | undefined };

/** Standard uncertainty of an exponent that is assumed beyond the points and given as a bare number. */
export const assumedExponentUncertainty = 0.15;

/** One side, resolved: the exponent of the power density and how well it is known; undefined where refused. */
export interface BeyondLaw {
  readonly exponent: number;
  readonly standardUncertainty: number;
}

/** Resolves the option for both sides; `ownExponents` are those of the end segments or of the model's ends. */
export function resolveBeyond(
  beyond: Beyond,
  ownExponents: { readonly below: number; readonly above: number },
): { readonly below: BeyondLaw | undefined; readonly above: BeyondLaw | undefined } {
  const sides = typeof beyond === "object" ? beyond : { below: beyond, above: beyond };
  refuseUnknownKeys("beyond", ["below", "above"], sides);
  return {
    below: resolveSide("below", sides.below ?? "refuse", ownExponents.below),
    above: resolveSide("above", sides.above ?? "refuse", ownExponents.above),
  };
}

function resolveSide(name: string, side: BeyondSide, ownExponent: number): BeyondLaw | undefined {
  if (side === "refuse") return undefined;
  if (side === "hold") return { exponent: 0, standardUncertainty: 0 };
  if (side === "segments") return { exponent: ownExponent, standardUncertainty: 0 };
  if (typeof side === "number")
    return {
      exponent: requireFinite(`beyond.${name}`, side),
      standardUncertainty: side === 0 ? 0 : assumedExponentUncertainty,
    };
  if (typeof side !== "object")
    throw new OutOfDomainError(
      `beyond.${name} must be 'refuse', 'hold', 'segments', an exponent or {exponent, standardUncertainty}; got ${String(side)}.`,
    );
  requireFinite(`beyond.${name}.exponent`, side.exponent);
  requireFinite(`beyond.${name}.standardUncertainty`, side.standardUncertainty);
  if (side.standardUncertainty < 0)
    throw new OutOfDomainError(
      `beyond.${name}.standardUncertainty must not be negative; got ${side.standardUncertainty}.`,
    );
  return { exponent: side.exponent, standardUncertainty: side.standardUncertainty };
}

/** The sentence a report prints about one side. */
export function beyondNote(name: "below" | "above", edgeHz: number, law: BeyondLaw): string {
  const known = law.standardUncertainty > 0 ? ` ± ${law.standardUncertainty}` : "";
  return `${name === "below" ? "Below" : "Above"} ${Number(edgeHz.toPrecision(4))} Hz there are no points; the power density goes on as f^−a with a = ${Number(law.exponent.toPrecision(4))}${known}.`;
}
