/** A decimal number found at the start of a text: its digits, its power of ten, and where it ends. */
export interface Decimal {
  /** Sign and digits with a point at most: "-114.0". */
  readonly digits: string;
  readonly power: number;
  readonly end: number;
}

/**
 * Reads a decimal number by one pass over its characters: sign, digits, a point (or a comma where allowed), exponent. The
 * value is made later by one conversion of digits and all powers of ten together, so that "85 n" is exactly 85e-9.
 */
export function readDecimal(text: string, decimalComma: boolean): Decimal | undefined {
  let at = 0;
  let sign = "";
  if (text[at] === "-" || text[at] === "−" || text[at] === "+") {
    if (text[at] !== "+") sign = "-";
    at += 1;
  }
  const whole = digitsFrom(text, at);
  at += whole.length;
  let fraction = "";
  if (text[at] === "." || (decimalComma && text[at] === ",")) {
    fraction = digitsFrom(text, at + 1);
    if (fraction !== "" || whole !== "") at += 1 + fraction.length;
  }
  if (whole === "" && fraction === "") return undefined;
  let power = 0;
  if (text[at] === "e" || text[at] === "E") {
    const signed = text[at + 1] === "-" || text[at + 1] === "+" || text[at + 1] === "−" ? 1 : 0;
    const exponent = digitsFrom(text, at + 1 + signed);
    if (exponent !== "") {
      power = Number(exponent) * (signed === 1 && text[at + 1] !== "+" ? -1 : 1);
      at += 1 + signed + exponent.length;
    }
  }
  return { digits: `${sign}${whole === "" ? "0" : whole}.${fraction === "" ? "0" : fraction}`, power, end: at };
}

/** The double nearest to digits · 10^power. */
export function decimalValue(digits: string, power: number): number {
  return Number(`${digits}e${power}`);
}

function digitsFrom(text: string, start: number): string {
  let end = start;
  for (; end < text.length; end += 1) {
    const code = text.charCodeAt(end);
    if (code < 48 || code > 57) break;
  }
  return text.slice(start, end);
}
