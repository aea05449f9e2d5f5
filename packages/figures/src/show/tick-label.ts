import { writeQuantity } from "@quietband/core";

/** Labels of a logarithmic axis: each tick with its own prefix. */
export function tickLabel(unit: string): (value: number) => string {
  return (value) => writeQuantity(value, unit);
}

/** Labels of a linear axis: all with the prefix of the largest tick, so that even steps look even. */
export function evenTickLabel(unit: string): (value: number, largest: number) => string {
  return (value, largest) => {
    const whole = writeQuantity(largest, unit);
    const [number = "", prefixedUnit = ""] = whole.split(/ (.*)/s);
    const power = Math.round(Math.log10(Math.abs(largest / Number(number.replaceAll("−", "-")))));
    if (largest === 0 || !Number.isFinite(power)) return writeQuantity(value, unit);
    const scaled = Number((value * 10 ** -power).toPrecision(12));
    return `${scaled} ${prefixedUnit}`.trimEnd().replace("-", "−");
  };
}
