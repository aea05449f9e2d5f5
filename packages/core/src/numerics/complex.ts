/** A complex number. */
export interface Complex {
  readonly re: number;
  readonly im: number;
}

export function times(one: Complex, other: Complex): Complex {
  return { re: one.re * other.re - one.im * other.im, im: one.re * other.im + one.im * other.re };
}

/** Smith's division: no overflow where the quotient has none. */
export function over(one: Complex, other: Complex): Complex {
  if (Math.abs(other.re) >= Math.abs(other.im)) {
    const ratio = other.im / other.re;
    const scale = other.re + other.im * ratio;
    return { re: (one.re + one.im * ratio) / scale, im: (one.im - one.re * ratio) / scale };
  }
  const ratio = other.re / other.im;
  const scale = other.re * ratio + other.im;
  return { re: (one.re * ratio + one.im) / scale, im: (one.im * ratio - one.re) / scale };
}

export function size(z: Complex): number {
  return Math.sqrt(z.re * z.re + z.im * z.im);
}

/** exp(z) − 1 without cancellation near 0. */
export function expMinusOne({ re, im }: Complex): Complex {
  const growth = Math.expm1(re);
  const half = Math.sin(0.5 * im);
  return { re: growth - 2 * (growth + 1) * half * half, im: (growth + 1) * Math.sin(im) };
}
