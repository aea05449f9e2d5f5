import { writeQuantity } from "@quietband/core";

/** A floor as label and description name it; four digits are more than a curve read by hand can carry. */
export function floorText(floor: number, unit: string): string {
  return `floor ${writeQuantity(floor, `${unit}/√Hz`, { digits: 4 })}`;
}

/** A corner as label and description name it. */
export function cornerText(cornerHz: number): string {
  return `corner ${writeQuantity(cornerHz, "Hz", { digits: 4 })}`;
}

/** A band as label and description name it. */
export function bandText({ fromHz, toHz }: { readonly fromHz: number; readonly toHz: number }): string {
  return `${hertzText(fromHz)} to ${hertzText(toHz)}`;
}

/** A frequency as it was typed, but for digits nobody types; infinity has no unit. */
export function hertzText(hz: number): string {
  return hz === Number.POSITIVE_INFINITY ? "∞" : writeQuantity(Number(hz.toPrecision(6)), "Hz");
}
