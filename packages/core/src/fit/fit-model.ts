import type { PowerLawTerm } from "../numerics/power-law.js";
import type { FitModelName, ResolvedExponent } from "./fit-options.js";

/**
 * A model as the solver sees it: ln S = scale + ln Σ_t e^(t's logarithm), the first term being 1 (the floor) or the lone power
 * law. Parameters besides the scale are logarithms of frequencies or levels, and the exponent.
 */
export interface FitModel {
  readonly name: FitModelName;
  /** Names of the parameters after the scale, in order. */
  readonly parameters: readonly FitParameter[];
  /** Which of them is the exponent; −1 where it is fixed or there is none. */
  readonly exponentAt: number;
  readonly exponent: ResolvedExponent;
  /** ln(S/e^scale) at ln f, and its slopes by the parameters. */
  shapeAt(x: number, parameters: ArrayLike<number>, slopes: Float64Array): number;
  /** The same at every x, slopes row by row. */
  shapeOver(x: Float64Array, parameters: ArrayLike<number>, shape: Float64Array, slopes: Float64Array): void;
}

export type FitParameter =
  | "ln corner"
  | "exponent"
  | "ln walk corner"
  | "ln trap level"
  | "ln trap corner"
  | "ln rise corner";

/** A term e^(coefficient-free logarithm) of a shape: its logarithm at x and the slopes it has of its own. */
interface ShapeTerm {
  logAt(x: number, parameters: ArrayLike<number>): number;
  addSlopes(x: number, parameters: ArrayLike<number>, share: number, slopes: Float64Array): void;
}

/** Density of a rising term goes as f, its power as f²: an amplifier's high-frequency rise. */
const riseExponent = 2;

export function fitModel(name: FitModelName, exponent: ResolvedExponent): FitModel {
  const parameters: FitParameter[] = [];
  if (name !== "floor" && name !== "flicker") parameters.push("ln corner");
  const own = exponent.kind !== "fixed" && name !== "floor";
  const exponentAt = own ? parameters.push("exponent") - 1 : -1;
  const extra = parameters.length;
  parameters.push(...extraParameters(name));
  const exponentOf = (p: ArrayLike<number>): number =>
    exponentAt >= 0 ? (p[exponentAt] as number) : exponent.kind === "fixed" ? exponent.value : 1;
  const base = { name, parameters, exponentAt, exponent };
  const shapeAt = shapeOf(name, exponentAt, exponentOf, extra);
  return { ...base, shapeAt, shapeOver: pointByPoint(shapeAt, parameters.length) };
}

type ExponentOf = (parameters: ArrayLike<number>) => number;

function shapeOf(name: FitModelName, exponentAt: number, exponentOf: ExponentOf, extra: number): FitModel["shapeAt"] {
  if (name === "floor") return () => 0;
  if (name === "floorAndFlicker") return twoTerms(exponentAt, exponentOf);
  if (name !== "flicker") return manyTerms([cornerTerm(exponentAt, exponentOf), ...extraTerms(name, extra)]);
  return (x, p, slopes) => {
    if (exponentAt >= 0) slopes[exponentAt] = -x;
    return -exponentOf(p) * x;
  };
}

function pointByPoint(shapeAt: FitModel["shapeAt"], size: number): FitModel["shapeOver"] {
  const own = new Float64Array(size);
  return (x, p, shape, slopes) => {
    for (let i = 0; i < x.length; i += 1) {
      shape[i] = shapeAt(x[i] as number, p, own);
      for (let s = 0; s < size; s += 1) slopes[i * size + s] = own[s] as number;
    }
  };
}

/** ln(1 + (f_c/f)^a), without overflow. */
function twoTerms(exponentAt: number, exponentOf: ExponentOf): FitModel["shapeAt"] {
  return (x, p, slopes) => {
    const steepness = exponentOf(p);
    const distance = (p[0] as number) - x;
    const smaller = Math.exp(-Math.abs(steepness * distance));
    const share = (steepness * distance > 0 ? 1 : smaller) / (1 + smaller);
    slopes[0] = steepness * share;
    if (exponentAt >= 0) slopes[exponentAt] = distance * share;
    return Math.max(steepness * distance, 0) + Math.log1p(smaller);
  };
}

/** ln(1 + Σ e^log) with one exponential a term. */
function manyTerms(terms: readonly ShapeTerm[]): FitModel["shapeAt"] {
  const shares = new Float64Array(terms.length);
  return (x, p, slopes) => {
    let largest = 0;
    for (let t = 0; t < shares.length; t += 1) {
      const log = (terms[t] as ShapeTerm).logAt(x, p);
      shares[t] = log;
      if (log > largest) largest = log;
    }
    let sum = Math.exp(-largest);
    for (let t = 0; t < shares.length; t += 1) {
      const share = Math.exp((shares[t] as number) - largest);
      shares[t] = share;
      sum += share;
    }
    slopes.fill(0);
    for (let t = 0; t < shares.length; t += 1)
      (terms[t] as ShapeTerm).addSlopes(x, p, (shares[t] as number) / sum, slopes);
    return largest + Math.log(sum);
  };
}

function extraParameters(name: FitModelName): readonly FitParameter[] {
  if (name === "floorFlickerRandomWalk") return ["ln walk corner"];
  if (name === "floorFlickerLorentzian") return ["ln trap level", "ln trap corner"];
  return name === "floorFlickerRise" ? ["ln rise corner"] : [];
}

/** (f_c/f)^a. */
function cornerTerm(exponentAt: number, exponentOf: (p: ArrayLike<number>) => number): ShapeTerm {
  return {
    logAt: (x, p) => exponentOf(p) * ((p[0] as number) - x),
    addSlopes(x, p, share, slopes) {
      slopes[0] = (slopes[0] as number) + share * exponentOf(p);
      if (exponentAt >= 0) slopes[exponentAt] = (slopes[exponentAt] as number) + share * ((p[0] as number) - x);
    },
  };
}

function extraTerms(name: FitModelName, at: number): ShapeTerm[] {
  const add = (slopes: Float64Array, index: number, value: number): void => {
    slopes[index] = (slopes[index] as number) + value;
  };
  if (name === "floorFlickerRandomWalk")
    return [
      {
        logAt: (x, p) => 2 * ((p[at] as number) - x),
        addSlopes: (_x, _p, share, slopes) => add(slopes, at, 2 * share),
      },
    ];
  if (name === "floorFlickerRise")
    return [
      {
        logAt: (x, p) => riseExponent * (x - (p[at] as number)),
        addSlopes: (_x, _p, share, slopes) => add(slopes, at, -riseExponent * share),
      },
    ];
  if (name !== "floorFlickerLorentzian") return [];
  return [
    {
      logAt: (x, p) => (p[at] as number) - softplus(2 * (x - (p[at + 1] as number))),
      addSlopes(x, p, share, slopes) {
        add(slopes, at, share);
        add(slopes, at + 1, (2 * share) / (1 + Math.exp(-2 * (x - (p[at + 1] as number)))));
      },
    },
  ];
}

/** ln(1 + e^z) without overflow. */
function softplus(z: number): number {
  return z > 0 ? z + Math.log1p(Math.exp(-z)) : Math.log1p(Math.exp(z));
}

/** The power laws of a fitted model, and its Lorentzian's level and corner where it has one. */
export function termsOf(
  model: FitModel,
  scale: number,
  p: ArrayLike<number>,
): { readonly terms: readonly PowerLawTerm[]; readonly trap?: { readonly level: number; readonly cornerHz: number } } {
  const level = Math.exp(scale);
  const exponent =
    model.exponentAt >= 0
      ? (p[model.exponentAt] as number)
      : model.exponent.kind === "fixed"
        ? model.exponent.value
        : 1;
  const at = (name: FitParameter): number => Math.exp(p[model.parameters.indexOf(name)] as number);
  if (model.name === "floor") return { terms: [{ at: 1, level, exponent: 0 }] };
  if (model.name === "flicker") return { terms: [{ at: 1, level, exponent }] };
  const terms = [
    { at: 1, level, exponent: 0 },
    { at: at("ln corner"), level, exponent },
  ];
  if (model.name === "floorFlickerRandomWalk") terms.push({ at: at("ln walk corner"), level, exponent: 2 });
  if (model.name === "floorFlickerRise") terms.push({ at: at("ln rise corner"), level, exponent: -riseExponent });
  if (model.name !== "floorFlickerLorentzian") return { terms };
  return { terms, trap: { level: level * at("ln trap level"), cornerHz: at("ln trap corner") } };
}
