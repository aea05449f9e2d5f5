/**
 * Pole frequencies f₁ to f₄ of the A and C weightings, Hz, from the defining relations of IEC 61672-1 (half-power frequencies
 * 10^1.5 Hz and 10^3.9 Hz of the C weighting, 10^2.45 Hz of the A high-pass), 16 digits: poles of 8 digits move powers by
 * 1e-8, the printed ones by 2e-5.
 */
export const soundPoles: readonly [number, number, number, number] = Object.freeze([
  20.59899705756814, 107.6526486430463, 737.8622307362899, 12194.21714799801,
] as const);
