/** Decimal digits of a positive or negative number and the power of ten of the first: 1.23e-7 is "123" and −7. */
interface Digits {
  readonly sign: string;
  readonly digits: string;
  readonly exponent: number;
}

/** Shortest digits that read back to the same number, or so many significant ones. */
function digitsOf(value: number, significant?: number): Digits {
  const text = significant === undefined ? value.toExponential() : value.toExponential(significant - 1);
  const negative = text.startsWith("-");
  const [mantissa = "", exponent = "0"] = text.slice(negative ? 1 : 0).split("e");
  return { sign: negative ? "-" : "", digits: mantissa.replace(".", ""), exponent: Number(exponent) };
}

/** Power of ten of the first digit once the value is rounded to so many significant digits; 0 has none and gives 0. */
export function decimalExponent(value: number, significant?: number): number {
  return value === 0 ? 0 : digitsOf(value, significant).exponent;
}

/** What {@link writeNumber} takes besides the number. */
interface WriteNumberOptions {
  /** Power of ten to multiply by. */
  readonly shift?: number | undefined;
  /** Significant digits, zeros included; the fewest that read back to the same double unless given. */
  readonly digits?: number | undefined;
}

/**
 * A number times 10^shift in plain digits, without rounding twice: the digits are those of the number, only the point moves.
 * Very large and very small ones keep an exponent.
 */
export function writeNumber(value: number, { shift = 0, digits }: WriteNumberOptions = {}): string {
  const found = digitsOf(value, digits);
  const exponent = value === 0 ? 0 : found.exponent + shift;
  if (exponent < -6 || exponent > 14) {
    const mantissa = found.digits.length > 1 ? `${found.digits[0]}.${found.digits.slice(1)}` : found.digits;
    return `${found.sign}${mantissa}e${exponent}`;
  }
  if (exponent < 0) return `${found.sign}0.${"0".repeat(-1 - exponent)}${found.digits}`;
  const whole = found.digits.slice(0, exponent + 1).padEnd(exponent + 1, "0");
  const fraction = found.digits.slice(exponent + 1);
  return `${found.sign}${whole}${fraction === "" ? "" : `.${fraction}`}`;
}
