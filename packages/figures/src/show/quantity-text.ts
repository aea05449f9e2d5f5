/** SI prefixes by their power of ten, SI brochure, table 7. */
const prefixes: ReadonlyMap<number, string> = new Map(
  "qryzafpnµm"
    .split("")
    .map((prefix, index) => [3 * index - 30, prefix] as const)
    .concat(
      [[0, ""]],
      "kMGTPEZYRQ".split("").map((prefix, index) => [3 * index + 3, prefix] as const),
    ),
);

/** Units that take no prefix: ratios and counts. */
const bare: ReadonlySet<string> = new Set(["", "%", "ppm", "ppb", "dB", "LSB"]);

/** A value in engineering notation; `like` lets a row of values share the prefix of the largest. */
export function quantityText(
  value: number,
  unit: string,
  { digits = 12, like = value }: { readonly digits?: number; readonly like?: number } = {},
): string {
  const rounded = value.toPrecision(digits);
  const exponent = like === 0 ? 0 : engineeringExponent(Number(like.toPrecision(digits)), unit);
  const scaled = Number(shifted(rounded, -exponent).toPrecision(digits));
  const text = `${scaled}`.replace("-", "−").replace("e−", "e-");
  return `${text} ${prefixes.get(exponent) ?? ""}${unit}`.trimEnd();
}

/** Multiple of three below the decimal exponent; frequencies down to 1 mHz are written in hertz, as the trade does. */
function engineeringExponent(value: number, unit: string): number {
  if (bare.has(unit.split("/")[0] ?? "")) return 0;
  const exponent = 3 * Math.floor(Number(value.toExponential().split("e")[1]) / 3);
  if (unit === "Hz" && exponent === -3) return 0;
  return prefixes.has(exponent) ? exponent : 0;
}

/** A decimal moved by powers of ten without rounding twice. */
function shifted(text: string, by: number): number {
  const [mantissa = "", exponent = "0"] = text.split("e");
  return Number(`${mantissa}e${Number(exponent) + by}`);
}
