/**
 * Chebyshev coefficients of (x + 1)·exp(x²)·erfc(x) in t = (x − 3.75)/(x + 3.75), x from 0 to ∞, made at 50 digits by
 * fixtures/reference/scaled-erfc.py. The form is Schonfelder's (Math. Comp. 32, 1978, 1232–1240): one smooth series for
 * the whole half-line, so both the middle and the far tail keep their relative accuracy.
 */
const scaledErfc: readonly number[] = Object.freeze([
  0.7413252377645009815, -0.2197156636466119746, 0.04605103013854379277, -0.000750427805528762181,
  -0.004473299719805818896, 0.002376939142568985638, -0.0007794734317652547561, 0.0001818103729583229448,
  -0.0000289607828906704371, 2.22604593574741557e-6, 2.515251190410435224e-7, -9.406319389546813409e-8,
  6.640309925244266657e-9, 1.746514944948983885e-9, -3.727479843815925856e-10, -1.856454686079995433e-11,
  1.30265550925673648e-11, -2.244229122164314855e-13, -4.26506136520840222e-13, 2.49035074357367483e-14,
  1.460700889396283939e-14, -1.204967429149751849e-15, -5.460487226535967411e-16, 4.754109520528723888e-17,
  2.239048108927615348e-17, -1.589475023495213912e-18,
]);

/**
 * P(X > z) of a standard normal X, ½·erfc(z/√2), for any z; relative error below 1e-15 where the tail is the small side
 * (measured at 40 digits for 0 ≤ z ≤ 38, beyond which it underflows).
 */
export function normalTail(z: number): number {
  if (z < 0) return 1 - normalTail(-z);
  return 0.5 * halfSquareDecay(z) * erfcScaled(z * Math.SQRT1_2);
}

/** ln P(X > z), finite where the tail itself has long underflowed. */
export function lnNormalTail(z: number): number {
  if (z < 0) return Math.log1p(-normalTail(-z));
  return Math.log(0.5 * erfcScaled(z * Math.SQRT1_2)) - 0.5 * z * z;
}

/** Density of a standard normal. */
export function normalDensity(z: number): number {
  return halfSquareDecay(Math.abs(z)) / Math.sqrt(2 * Math.PI);
}

/** exp(x²)·erfc(x) for x ≥ 0 by Clenshaw's recurrence. */
function erfcScaled(x: number): number {
  const t = (x - 3.75) / (x + 3.75);
  let before = 0;
  let sum = 0;
  for (let index = scaledErfc.length - 1; index > 0; index -= 1) {
    const next = 2 * t * sum - before + (scaledErfc[index] as number);
    before = sum;
    sum = next;
  }
  return (t * sum - before + (scaledErfc[0] as number)) / (1 + x);
}

/** exp(−z²/2) with z² split so that its rounding, z²·1e-16 relative, does not enter: the head has 24 bits. */
function halfSquareDecay(z: number): number {
  const head = Math.fround(z);
  return Math.exp(-0.5 * head * head) * Math.exp(-0.5 * (z - head) * (z + head));
}
