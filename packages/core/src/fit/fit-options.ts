import { OutOfDomainError } from "../ground/errors.js";
import type { Beyond } from "../spectrum/beyond.js";
import type { Bump } from "./bump.js";

/** The models a fit knows; all but the Lorentzian are sums of power laws, so every integral keeps an exact route. */
export type FitModelName =
  | "floor"
  | "flicker"
  | "floorAndFlicker"
  | "floorFlickerRandomWalk"
  | "floorFlickerLorentzian"
  | "floorFlickerRise";

/** An exponent as one more observation: it runs from fixed, where low points are missing, to free, where they are many. */
export interface ExponentPrior {
  readonly mean: number;
  readonly standardUncertainty: number;
}

/** What {@link fitCurve} takes besides the curve. */
export interface FitOptions {
  /** 'auto' (the default) chooses by evidence among the models that the points support. */
  readonly model?: "auto" | FitModelName | undefined;
  /** Exponent of the 1/f part: a number in (0, 4], 'free', or a prior; 1 ± 0.15 unless given. */
  readonly exponent?: number | "free" | ExponentPrior | undefined;
  /** Only points from here up take part, Hz. */
  readonly fromHz?: number | undefined;
  /** Only points up to here take part, Hz. */
  readonly toHz?: number | undefined;
  /** Gross misreadings are named ('report', the default) or also given no weight ('downweight'). */
  readonly misreadings?: "report" | "downweight" | undefined;
  /** A bump that no model describes: its points stand for themselves, straight lines in place of the model. */
  readonly bump?: Bump | undefined;
  /** How the spectrum goes on beyond the fitted points; 'segments' lets the model's own formula go on. */
  readonly beyond?: Beyond | undefined;
}

/** An exponent, resolved: fixed at a value, or a parameter with or without a prior. */
export type ResolvedExponent =
  | { readonly kind: "fixed"; readonly value: number }
  | { readonly kind: "free" }
  | { readonly kind: "prior"; readonly mean: number; readonly standardUncertainty: number };

export const defaultExponent: ExponentPrior = Object.freeze({ mean: 1, standardUncertainty: 0.15 });

export function resolveExponent(given: FitOptions["exponent"]): ResolvedExponent {
  if (given === "free") return { kind: "free" };
  if (typeof given === "number") {
    if (given > 0 && given <= 4) return { kind: "fixed", value: given };
    throw new OutOfDomainError(`A fixed exponent must be above 0 and at most 4 (1 is flicker noise); got ${given}.`);
  }
  const { mean, standardUncertainty } = given ?? defaultExponent;
  if (mean > 0 && mean <= 4 && standardUncertainty > 0 && standardUncertainty <= 4)
    return { kind: "prior", mean, standardUncertainty };
  throw new OutOfDomainError(
    `A prior exponent needs a mean above 0 and at most 4 and a standardUncertainty above 0 and at most 4; got ${mean} ± ${standardUncertainty}.`,
  );
}
