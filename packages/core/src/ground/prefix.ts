/** SI prefixes and their powers of ten (BIPM, The International System of Units, 9th edition with the prefixes of 2022). */
const powersOfTen: ReadonlyMap<string, number> = new Map([
  ["q", -30],
  ["r", -27],
  ["y", -24],
  ["z", -21],
  ["a", -18],
  ["f", -15],
  ["p", -12],
  ["n", -9],
  ["µ", -6],
  ["u", -6],
  ["m", -3],
  ["c", -2],
  ["d", -1],
  ["da", 1],
  ["h", 2],
  ["k", 3],
  ["M", 6],
  ["G", 9],
  ["T", 12],
  ["P", 15],
  ["E", 18],
  ["Z", 21],
  ["Y", 24],
  ["R", 27],
  ["Q", 30],
]);

/** Power of ten of a prefix, 0 for none; undefined for what is no prefix. Both micro signs and u are micro. */
export function prefixPower(prefix: string): number | undefined {
  return prefix === "" ? 0 : powersOfTen.get(prefix.replace("μ", "µ"));
}

/** The prefix whose power is a given multiple of three, for engineering notation. */
export function engineeringPrefix(power: number): string | undefined {
  if (power === 0) return "";
  for (const [prefix, value] of powersOfTen) if (value === power && prefix !== "u") return prefix;
  return undefined;
}
