/** The character that separates the fraction. */
export type DecimalMark = "." | ",";

/** Powers of ten that are exact in binary. */
const exactPowers: readonly number[] = Object.freeze(Array.from({ length: 23 }, (_, n) => Number(`1e${n}`)));

/** Integers of so many digits are exact in binary. */
const exactDigits = 15;

/** Exponents beyond this are zero or infinity whatever stands before them, and adding to them stays exact. */
const largestExponent = 100_000;

/**
 * The number written in [from, to) times 10^shift, correctly rounded, or NaN where anything but one plain decimal number
 * stands there: `[sign] digits [mark digits] [e [sign] digits]`.
 *
 * Digits and shift are rounded together, so 85 shifted by −9 is the double 85e-9; 85 · 1e-9 is another. An integer below
 * 10^15 times or over a power up to 10^22 is one rounding (Clinger 1990); the rest goes to Number() with the shifted
 * exponent.
 */
export function decimalIn(text: string, from: number, to: number, mark: DecimalMark, shift: number): number {
  const negative = isMinus(text.charCodeAt(from));
  const start = negative || text.charCodeAt(from) === 43 ? from + 1 : from;
  let at = start;
  let integer = 0;
  for (; at < to && isDigit(text.charCodeAt(at)); at += 1) integer = integer * 10 + (text.charCodeAt(at) - 48);
  let digits = at - start;
  let fraction = 0;
  if (at < to && text.charCodeAt(at) === (mark === "." ? 46 : 44)) {
    const point = at;
    for (at += 1; at < to && isDigit(text.charCodeAt(at)); at += 1) integer = integer * 10 + (text.charCodeAt(at) - 48);
    fraction = at - point - 1;
    digits += fraction;
  }
  if (digits <= 0) return Number.NaN;
  const power = shift + (at === to ? 0 : exponentIn(text, at, to));
  if (Number.isNaN(power)) return Number.NaN;
  const value =
    digits <= exactDigits
      ? integerTimesPower(integer, power - fraction)
      : Number(`${text.slice(start, at).replace(",", ".")}e${power}`);
  return negative ? -value : value;
}

function integerTimesPower(integer: number, power: number): number {
  if (integer === 0) return 0;
  if (power < 0 && power >= -22) return integer / (exactPowers[-power] as number);
  if (power >= 0 && power <= 22) return integer * (exactPowers[power] as number);
  return Number(`${integer}e${power}`);
}

/** The exponent `e[sign]digits` that fills [from, to), NaN for anything else. */
function exponentIn(text: string, from: number, to: number): number {
  const letter = text.charCodeAt(from);
  if (letter !== 101 && letter !== 69) return Number.NaN;
  const negative = isMinus(text.charCodeAt(from + 1));
  const start = negative || text.charCodeAt(from + 1) === 43 ? from + 2 : from + 1;
  if (start >= to) return Number.NaN;
  let exponent = 0;
  for (let at = start; at < to; at += 1) {
    const code = text.charCodeAt(at);
    if (!isDigit(code)) return Number.NaN;
    exponent = Math.min(exponent * 10 + (code - 48), largestExponent);
  }
  return negative ? -exponent : exponent;
}

/** The minus of keyboards and that of typography. */
export function isMinus(code: number): boolean {
  return code === 45 || code === 0x2212;
}

export function isDigit(code: number): boolean {
  return code >= 48 && code <= 57;
}
