/** SI prefixes, smallest first: symbol and power of ten (SI brochure, 9th edition, table 7). */
const siPrefixes: readonly (readonly [symbol: string, exponent: number])[] = Object.freeze(
  (
    [
      ["q", -30],
      ["r", -27],
      ["y", -24],
      ["z", -21],
      ["a", -18],
      ["f", -15],
      ["p", -12],
      ["n", -9],
      ["µ", -6],
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
    ] as const
  ).map((prefix) => Object.freeze(prefix)),
);

/** Beside the symbols: the Greek letter µ, u for µ, and K for kilo (IEC 60062, and everyday use). */
const exponents: ReadonlyMap<string, number> = new Map<string, number>([
  ...siPrefixes,
  ["\u03bc", -6],
  ["u", -6],
  ["K", 3],
]);

/** Power of ten of a prefix as people type it, or undefined. */
export function prefixExponent(symbol: string): number | undefined {
  return exponents.get(symbol);
}

const symbols: ReadonlyMap<number, string> = new Map([[0, ""], ...siPrefixes.map(([s, e]) => [e, s] as const)]);

/** Prefix of a power of ten; empty for 0, undefined where there is none. */
export function prefixSymbol(exponent: number): string | undefined {
  return symbols.get(exponent);
}
