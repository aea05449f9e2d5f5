import { readQuantity, type Weighting } from "@quietband/core";
import { malformedAt } from "../file/check-against-schema.js";
import { type FilePlace, madeAt, numberAt, placesAt, quantityAt, quantityIn, textAt } from "../file/file-place.js";
import { type FilterKind, filterKinds } from "./filter-kinds.js";
import { cascadeOf } from "./signal-path.js";

/** A gain: a number, dB, or a ratio of two quantities, which may change the unit. */
export interface ChainGain {
  readonly gain: number;
  /** Unit before and behind, where they differ. */
  readonly change?: { readonly from: string; readonly to: string };
}

export function gainAt(place: FilePlace, key: string): ChainGain {
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
export function filterAt(place: FilePlace, key: string): Weighting | undefined {
  const given = place.fields[key];
  if (given === undefined) return undefined;
  const at = `${place.pointer}/${key}`;
  const list = Array.isArray(given) ? placesAt(place, key) : [{ fields: given as FilePlace["fields"], pointer: at }];
  return cascadeOf(list.map(oneFilter));
}

function oneFilter(place: FilePlace): Weighting {
  const kind = filterKinds[textAt(place, "kind")] as FilterKind;
  const values = kind.numbers.map(({ word, unit }): [string, number] => [
    word,
    unit === "" ? (numberAt(place, word) ?? Number.NaN) : quantityAt(place, word, unit).value,
  ]);
  return madeAt(place.pointer, () => kind.make(Object.fromEntries(values)));
}
