/** A complex number. */
export interface Complex {
  readonly re: number;
  readonly im: number;
}

export function times(one: Complex, other: Complex): Complex {
  return { re: one.re * other.re - one.im * other.im, im: one.re * other.im + one.im * other.re };
}

export function over(one: Complex, other: Complex): Complex {
  const scale = 1 / (other.re * other.re + other.im * other.im);
  return {
    re: scale * (one.re * other.re + one.im * other.im),
    im: scale * (one.im * other.re - one.re * other.im),
  };
}

export function plus(one: Complex, other: Complex): Complex {
  return { re: one.re + other.re, im: one.im + other.im };
}

export function minus(one: Complex, other: Complex): Complex {
  return { re: one.re - other.re, im: one.im - other.im };
}

export function scaledBy(factor: number, { re, im }: Complex): Complex {
  return { re: factor * re, im: factor * im };
}

export function conjugate({ re, im }: Complex): Complex {
  return { re, im: -im };
}

export function sizeOf({ re, im }: Complex): number {
  return Math.sqrt(re * re + im * im);
}

/** first² − second² without more cancellation than there is between them. */
export function squareDifference(first: Complex, second: Complex): Complex {
  return times(minus(first, second), plus(first, second));
}

/** r·exp(j·angle) */
export function polar(radius: number, angle: number): Complex {
  return { re: radius * Math.cos(angle), im: radius * Math.sin(angle) };
}

/** exp(z) − 1 without cancellation near 0. */
export function expMinusOne({ re, im }: Complex): Complex {
  const growth = Math.expm1(re);
  const half = Math.sin(0.5 * im);
  return { re: growth - 2 * (growth + 1) * half * half, im: (growth + 1) * Math.sin(im) };
}
