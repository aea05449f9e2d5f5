import { prefixPower } from "./prefix.js";

/** A unit as typed, resolved: the unit without prefix, and the factor 10^power · scale to it. */
export interface ResolvedUnit {
  readonly unit: string;
  readonly power: number;
  /** Other than a power of ten: 60 for minutes. */
  readonly scale: number;
}

/** Units that take SI prefixes, and how they may be spelled. */
const prefixed: ReadonlyMap<string, string> = new Map([
  ["Hz", "Hz"],
  ["V", "V"],
  ["A", "A"],
  ["W", "W"],
  ["Ω", "Ω"],
  ["Ω", "Ω"],
  ["ohm", "Ω"],
  ["ohms", "Ω"],
  ["s", "s"],
  ["F", "F"],
  ["H", "H"],
  ["C", "C"],
  ["K", "K"],
  ["T", "T"],
  ["Pa", "Pa"],
  ["g", "g"],
  ["ε", "ε"],
  ["rad", "rad"],
  ["m/s²", "m/s²"],
  ["m/s^2", "m/s²"],
  ["FS", "FS"],
]);

/** Units that stand alone. */
const alone: ReadonlyMap<string, ResolvedUnit> = new Map([
  ["%", { unit: "1", power: -2, scale: 1 }],
  ["ppm", { unit: "1", power: -6, scale: 1 }],
  ["ppb", { unit: "1", power: -9, scale: 1 }],
  ["1", { unit: "1", power: 0, scale: 1 }],
  ["dB", { unit: "dB", power: 0, scale: 1 }],
  ["°C", { unit: "°C", power: 0, scale: 1 }],
  ["LSB", { unit: "LSB", power: 0, scale: 1 }],
  ["min", { unit: "s", power: 0, scale: 60 }],
  ["h", { unit: "s", power: 0, scale: 3600 }],
  ["day", { unit: "s", power: 0, scale: 86_400 }],
  ["days", { unit: "s", power: 0, scale: 86_400 }],
]);

/** Resolves a plain unit with its prefix; undefined for what is none. */
export function resolveUnit(text: string): ResolvedUnit | undefined {
  const single = alone.get(text);
  if (single !== undefined) return single;
  for (let length = 0; length <= 2 && length < text.length; length += 1) {
    const unit = prefixed.get(text.slice(length));
    const power = prefixPower(text.slice(0, length));
    if (unit !== undefined && power !== undefined) return { unit, power, scale: 1 };
  }
  return undefined;
}
