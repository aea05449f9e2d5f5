import { NoiseError, type Quantity, readBand, readQuantity, type Weighting } from "@quietband/core";
import { malformedAt } from "./check-against-schema.js";
import { type FilterKind, filterKinds } from "./filter-kinds.js";
import { cascadeOf } from "./signal-path.js";

/** A record of a chain file whose shape has been checked, and where it stands. */
export interface ChainPlace {
  readonly fields: Readonly<Record<string, unknown>>;
  /** JSON pointer. */
  readonly pointer: string;
}

/** The text under a key that the schema requires. */
export function textAt({ fields }: ChainPlace, key: string): string {
  return fields[key] as string;
}

/** The text under a key whose shape has been checked, or undefined. */
export function wordsAt({ fields }: ChainPlace, key: string): string | undefined {
  return fields[key] as string | undefined;
}

/** The plain number under a key whose shape has been checked, or undefined. */
export function numberAt({ fields }: ChainPlace, key: string): number | undefined {
  return fields[key] as number | undefined;
}

/** The record under a key, or undefined. */
export function placeAt({ fields, pointer }: ChainPlace, key: string): ChainPlace | undefined {
  const inner = fields[key];
  return inner === undefined ? undefined : { fields: inner as ChainPlace["fields"], pointer: `${pointer}/${key}` };
}

/** The records of a list under a key. */
export function placesAt({ fields, pointer }: ChainPlace, key: string): ChainPlace[] {
  const list = (fields[key] ?? []) as readonly ChainPlace["fields"][];
  return list.map((inner, index) => ({ fields: inner, pointer: `${pointer}/${key}/${index}` }));
}

/** Makes something of what stands at a place; an error says which place. */
export function madeAt<Made>(pointer: string, make: () => Made): Made {
  try {
    return make();
  } catch (error) {
    if (error instanceof NoiseError && !error.message.startsWith("At /"))
      error.message = `At ${pointer}: ${error.message}`;
    throw error;
  }
}

/** A quantity with its unit; where a key is required. */
export function quantityAt(place: ChainPlace, key: string, unit?: string): Quantity {
  return quantityIn(textAt(place, key), `${place.pointer}/${key}`, unit);
}

/** A number without a unit is refused: a lost "m" would be a factor of a thousand. */
function quantityIn(text: string, pointer: string, unit?: string): Quantity {
  return madeAt(pointer, () => {
    const found = readQuantity(text);
    const wanted = unit === undefined ? "a quantity with its unit" : `a quantity in ${unit}, its unit written out`;
    if (found.unit === "" || found.unit === "1") throw malformedAt(pointer, `expected ${wanted}; got "${text}".`);
    if (unit !== undefined && found.unit !== unit)
      throw malformedAt(pointer, `expected ${wanted}; got "${text}", which is in ${found.unit}.`);
    return found;
  });
}

/** The value of a quantity, or undefined where the key is not given. */
export function valueAt(place: ChainPlace, key: string, unit: string): number | undefined {
  return place.fields[key] === undefined ? undefined : quantityAt(place, key, unit).value;
}

/** A relative uncertainty, "5 %", or undefined where the key is not given. */
export function shareAt(place: ChainPlace, key: string): number | undefined {
  const text = wordsAt(place, key);
  if (text === undefined) return undefined;
  const pointer = `${place.pointer}/${key}`;
  return madeAt(pointer, () => {
    const found = readQuantity(text);
    if (found.unit === "1" && /[%a-z]\s*$/i.test(text)) return found.value;
    throw malformedAt(pointer, `expected a share such as 5 %; got "${text}".`);
  });
}

/** A band, with its unit. */
export function bandAt(place: ChainPlace, key: string): { readonly fromHz: number; readonly toHz: number } {
  return madeAt(`${place.pointer}/${key}`, () => readBand(textAt(place, key)));
}

/** A gain: a number, dB, or a ratio of two quantities, which may change the unit. */
export interface ChainGain {
  readonly gain: number;
  /** Unit before and behind, where they differ. */
  readonly change?: { readonly from: string; readonly to: string };
}

export function gainAt(place: ChainPlace, key: string): ChainGain {
  const given = place.fields[key] as number | string | undefined;
  if (typeof given !== "string") return { gain: given ?? 1 };
  const at = `${place.pointer}/${key}`;
  const refused = (): never => {
    throw malformedAt(at, `expected a number, a ratio such as 4 mV / 5 V, or dB; got "${given}".`);
  };
  const [above = "", below, ...more] = given.split(/\s\/\s/);
  if (more.length > 0) return refused();
  if (below === undefined) {
    const { value, unit } = madeAt(at, () => readQuantity(above));
    return unit === "dB" ? { gain: 10 ** (value / 20) } : refused();
  }
  const [numerator, denominator] = [quantityIn(above, at), quantityIn(below, at)];
  const gain = numerator.value / denominator.value;
  if (!Number.isFinite(gain)) return refused();
  return numerator.unit === denominator.unit
    ? { gain }
    : { gain, change: { from: denominator.unit, to: numerator.unit } };
}

/** A filter or several in a row; undefined where none is given. */
export function filterAt(place: ChainPlace, key: string): Weighting | undefined {
  const given = place.fields[key];
  if (given === undefined) return undefined;
  const at = `${place.pointer}/${key}`;
  const list = Array.isArray(given) ? placesAt(place, key) : [{ fields: given as ChainPlace["fields"], pointer: at }];
  return cascadeOf(list.map(oneFilter));
}

function oneFilter(place: ChainPlace): Weighting {
  const kind = filterKinds[textAt(place, "kind")] as FilterKind;
  const values = kind.numbers.map(({ word, unit }): [string, number] => [
    word,
    unit === "" ? (numberAt(place, word) ?? Number.NaN) : quantityAt(place, word, unit).value,
  ]);
  return madeAt(place.pointer, () => kind.make(Object.fromEntries(values)));
}
