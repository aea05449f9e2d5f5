import { resolveUnit } from "../ground/unit.js";

/** How a column of a curve's table is to be read. */
export interface DensityUnit {
  /** An amplitude density, a power density (its square), or a level in dB re one unit/√Hz. */
  readonly kind: "density" | "power" | "level";
  /** Unit of the signal: "V". */
  readonly unit: string;
  /** Power of ten of the value as typed: −9 for nV/√Hz, −18 for nV²/Hz, of the reference for a level. */
  readonly power: number;
}

/** Spellings of "per root hertz" after a unit; longest first where one begins another. */
const perRoot: readonly string[] = Object.freeze([
  "/√(Hz)",
  "/√Hz",
  "/sqrt(Hz)",
  "/sqrtHz",
  "/rt(Hz)",
  "/rtHz",
  "/rootHz",
  "/Hz^(1/2)",
  "/Hz^1/2",
  "/Hz^0.5",
  "/Hz½",
  "·Hz^-0.5",
  "·Hz^-1/2",
]);

/** Whether a text is a density's unit, what it means, or why it is refused. */
export function readDensityUnit(text: string): DensityUnit | { readonly refusal: string } | undefined {
  const plain = text.replaceAll(" ", "").replaceAll("μ", "µ");
  const root = perRoot.find((ending) => plain.endsWith(ending));
  if (root !== undefined) return amplitude(plain.slice(0, -root.length));
  if (!plain.endsWith("/Hz")) return undefined;
  const before = plain.slice(0, -3);
  const squared = /^\((.+)\)(?:²|\^2)$/.exec(before) ?? /^(.+?)(?:²|\^2)$/.exec(before);
  if (squared !== null) return power(squared[1] as string);
  return resolveUnit(before) === undefined
    ? undefined
    : {
        refusal: `${text.trim()} is neither an amplitude nor a power density: did you mean ${before}/√Hz or ${before}²/Hz?`,
      };
}

function amplitude(text: string): DensityUnit | undefined {
  if (text.startsWith("dB") && text.length > 2) {
    const reference = resolveUnit(text.slice(2));
    return reference === undefined || reference.scale !== 1
      ? undefined
      : { kind: "level", unit: reference.unit, power: reference.power };
  }
  const found = resolveUnit(text);
  if (found === undefined || found.scale !== 1 || found.unit === "dB") return undefined;
  return { kind: "density", unit: found.unit, power: found.power };
}

function power(text: string): DensityUnit | undefined {
  const found = amplitude(text);
  if (found === undefined) return undefined;
  // dB re V²/Hz is the same number as dB re V/√Hz
  return found.kind === "level" ? found : { kind: "power", unit: found.unit, power: 2 * found.power };
}
