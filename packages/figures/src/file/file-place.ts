import { NoiseError, type Quantity, readBand, readQuantity } from "@quietband/core";
import { malformedAt } from "./check-against-schema.js";

/** A record of a JSON file whose shape has been checked, and where it stands. */
export interface FilePlace {
  readonly fields: Readonly<Record<string, unknown>>;
  /** JSON pointer. */
  readonly pointer: string;
}

/** The text under a key that the schema requires. */
export function textAt({ fields }: FilePlace, key: string): string {
  return fields[key] as string;
}

/** The text under a key whose shape has been checked, or undefined. */
export function wordsAt({ fields }: FilePlace, key: string): string | undefined {
  return fields[key] as string | undefined;
}

/** The plain number under a key whose shape has been checked, or undefined. */
export function numberAt({ fields }: FilePlace, key: string): number | undefined {
  return fields[key] as number | undefined;
}

/** The record under a key, or undefined. */
export function placeAt({ fields, pointer }: FilePlace, key: string): FilePlace | undefined {
  const inner = fields[key];
  return inner === undefined ? undefined : { fields: inner as FilePlace["fields"], pointer: `${pointer}/${key}` };
}

/** The records of a list under a key. */
export function placesAt({ fields, pointer }: FilePlace, key: string): FilePlace[] {
  const list = (fields[key] ?? []) as readonly FilePlace["fields"][];
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
export function quantityAt(place: FilePlace, key: string, unit?: string): Quantity {
  return quantityIn(textAt(place, key), `${place.pointer}/${key}`, unit);
}

/** A number without a unit is refused: a lost "m" would be a factor of a thousand. */
export function quantityIn(text: string, pointer: string, unit?: string): Quantity {
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
export function valueAt(place: FilePlace, key: string, unit: string): number | undefined {
  return place.fields[key] === undefined ? undefined : quantityAt(place, key, unit).value;
}

/** A relative uncertainty, "5 %", or undefined where the key is not given. */
export function shareAt(place: FilePlace, key: string): number | undefined {
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
export function bandAt(place: FilePlace, key: string): { readonly fromHz: number; readonly toHz: number } {
  return madeAt(`${place.pointer}/${key}`, () => readBand(textAt(place, key)));
}
