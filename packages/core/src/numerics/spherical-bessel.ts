/**
 * Spherical Bessel functions j_0(x) .. j_{n−1}(x) into `values`, x ≥ 0, given sin x and cos x: upward recurrence where it is
 * stable (x above the order), Miller's downward recurrence elsewhere (Abramowitz, Stegun 10.1.19, 10.5).
 */
export function sphericalBesselInto(values: Float64Array, x: number, sine: number, cosine: number): void {
  const count = values.length;
  if (x === 0) {
    values.fill(0);
    values[0] = 1;
  } else if (x > count) upward(values, x, sine, cosine);
  else downward(values, x, sine, cosine);
}

function upward(values: Float64Array, x: number, sine: number, cosine: number): void {
  let before = sine / x;
  values[0] = before;
  let value = (before - cosine) / x;
  for (let n = 1; n < values.length; n += 1) {
    values[n] = value;
    [before, value] = [value, ((2 * n + 1) / x) * value - before];
  }
}

function downward(values: Float64Array, x: number, sine: number, cosine: number): void {
  const count = values.length;
  let above = 0;
  let value = 1e-290;
  for (let n = count + 24; n >= 0; n -= 1) {
    if (n < count) values[n] = value;
    [above, value] = [value, ((2 * n + 1) / x) * value - above];
    if (Math.abs(value) > 1e200) {
      value *= 1e-250;
      above *= 1e-250;
      for (let k = Math.max(n, 0); k < count; k += 1) values[k] = (values[k] as number) * 1e-250;
    }
  }
  // normalised by whichever of j₀ and j₁ is not near a zero
  const j0 = sine / x;
  const j1 = x < 0.1 ? (x / 3) * (1 - (x * x) / 10 + (x * x * x * x) / 280) : (j0 - cosine) / x;
  const scale = Math.abs(j0) >= Math.abs(j1) ? j0 / (values[0] as number) : j1 / (values[1] as number);
  for (let n = 0; n < count; n += 1) values[n] = (values[n] as number) * scale;
}
