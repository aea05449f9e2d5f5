import { otherCapitals, plainSpelling, readPrefixedUnit, unwrapped } from "./base-unit.js";
import { quoted } from "./quoted.js";

/** What a number beside a unit measures: the signal, its amplitude density, or its power density. */
export type UnitKind = "signal" | "density" | "powerDensity";

/** A unit as read: 1 of what was written is factor · 10^exponent of the canonical unit. */
export interface UnitReading {
  /** Canonical text: "V", "V/√Hz", "V²/Hz". */
  readonly unit: string;
  /** Unit of the signal: "V". */
  readonly signal: string;
  readonly kind: UnitKind;
  /** Decimal exponent of the prefix, doubled where the unit is squared. */
  readonly exponent: number;
  readonly factor: number;
  /** Whether the number is a level in dB re 1 of the unit (times 10^exponent). */
  readonly isLevel: boolean;
}

/** Why a text is no unit, as the end of a sentence. */
export interface UnitProblem {
  readonly problem: string;
  /** Whether a unit was meant beyond doubt, as in nV/Hz: a heading must not take it for part of a name. */
  readonly meantAsUnit?: boolean;
}

const longest = 40;

/** Ends that make an amplitude density, in plain spelling and lower case. */
const rootEnds: readonly string[] = Object.freeze([
  "/√hz",
  "/√(hz)",
  "/sqrt(hz)",
  "/sqrthz",
  "/rthz",
  "/rt(hz)",
  "/rt-hz",
  "/roothz",
  "/root(hz)",
  "/hz^0.5",
  "/hz^.5",
  "/hz^(0.5)",
  "/hz^(1/2)",
  "/hz^1/2",
  "/(hz^0.5)",
  "/(hz^(1/2))",
  "·hz^-0.5",
  "·hz^(-1/2)",
  "·hz^-1/2",
]);

/** Units that have no density: F/Hz in a heading is a frequency called F. */
const withoutDensity: ReadonlySet<string> = new Set(["F", "H", "bit", "dB"]);

/** Signals of which the trade writes levels as dB and the unit without a blank; dBm, dBW, dBc ... mean something else. */
const levelSignals: ReadonlySet<string> = new Set(["V", "A", "g", "m/s²", "Pa", "T"]);

/**
 * Reads a unit as the trade writes it: `nV/√Hz`, `nV/sqrt(Hz)`, `nV/rtHz`, `nV/Hz^0.5`, `V²/Hz`, `(m/s²)²/Hz`, `dBV/√Hz`,
 * `dB re 1 µV/√Hz`, `kHz`, `ppm`. A prefix belongs to the unit it stands before and is squared with it: nV²/Hz is (nV)²/Hz.
 */
export function readUnit(text: string): UnitReading | UnitProblem {
  if (text.length > longest) return { problem: `${quoted(text)} is no unit` };
  const spelled = plainSpelling(text);
  const reference = levelReference(spelled);
  const { head, kind } = splitDensity(reference?.text ?? spelled);
  const squared = kind === "powerDensity" ? withoutSquare(head) : head;
  const found = readPrefixedUnit(squared ?? head);
  if (found === undefined) return unknownUnit(text, head);
  if (reference !== undefined && !reference.spelledOut && !tellsReference(found.unit, kind))
    return {
      problem: `${quoted(text)} is a level whose reference the text does not tell; write dBV/√Hz or dB re 1 V/√Hz`,
    };
  if (kind !== "signal" && (found.factor !== 1 || withoutDensity.has(found.unit))) return unknownUnit(text, head);
  if (squared === undefined) return missingSquare(text, head, reference !== undefined);
  const power = kind === "powerDensity" ? 2 : 1;
  return Object.freeze({
    unit: unitText(found.unit, kind),
    signal: found.unit,
    kind,
    exponent: found.exponent * power,
    factor: found.factor,
    isLevel: reference !== undefined,
  });
}

/** Canonical text of a unit: V, V/√Hz, V²/Hz; (m/s²)²/Hz where the signal is itself a quotient. */
function unitText(signal: string, kind: UnitKind): string {
  if (kind === "signal") return signal;
  if (kind === "density") return `${signal}/√Hz`;
  if (signal === "1") return "1/Hz";
  return signal.includes("/") ? `(${signal})²/Hz` : `${signal}²/Hz`;
}

/** dBA of a signal is a weighting of sound; with /√Hz behind it an ampere is meant. */
function tellsReference(signal: string, kind: UnitKind): boolean {
  return kind === "signal" ? signal === "V" : levelSignals.has(signal);
}

/** What follows dB, when something does. */
function levelReference(spelled: string): { readonly text: string; readonly spelledOut: boolean } | undefined {
  if (!spelled.startsWith("dB") || spelled === "dB") return undefined;
  const rest = spelled.slice(2);
  if (rest.startsWith("re"))
    return { text: unwrapped(rest.startsWith("re1") ? rest.slice(3) : rest.slice(2)), spelledOut: true };
  return { text: unwrapped(rest), spelledOut: false };
}

function splitDensity(spelled: string): { readonly head: string; readonly kind: UnitKind } {
  const lower = spelled.toLowerCase();
  const root = rootEnds.find((end) => lower.endsWith(end));
  if (root !== undefined) return { head: spelled.slice(0, spelled.length - root.length), kind: "density" };
  if (lower.endsWith("/hz")) return { head: spelled.slice(0, -3), kind: "powerDensity" };
  return { head: spelled, kind: "signal" };
}

/** The unit under a square, or undefined where nothing is squared. */
function withoutSquare(head: string): string | undefined {
  if (head === "1") return head;
  if (head === "m^2/s^4") return "m/s^2";
  if (readPrefixedUnit(head) !== undefined) return undefined;
  if (head.endsWith("^2")) return head.slice(0, -2);
  return head.endsWith("2") ? head.slice(0, -1) : head;
}

function missingSquare(text: string, head: string, isLevel: boolean): UnitProblem {
  const written = head.replace("^2", "²");
  const isQuotient = head.includes("/");
  const lead = isLevel ? "dB" : "";
  const root = isQuotient ? `(${written})` : written;
  return {
    problem: `${quoted(text)} is neither a density nor a power density; did you mean ${lead}${root}/√Hz or ${lead}${root}²/Hz?`,
    meantAsUnit: true,
  };
}

function unknownUnit(text: string, head: string): UnitProblem {
  const meant = otherCapitals(head);
  if (meant !== undefined) return { problem: `${quoted(text)} is no unit; did you mean ${meant}?` };
  return { problem: `${quoted(text)} is no unit known here; write for example nV/√Hz, V²/Hz, dBV/√Hz, kHz, ppm` };
}
