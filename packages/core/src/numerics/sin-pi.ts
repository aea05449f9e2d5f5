/** sin(π·turns) for |turns| ≤ ½, right to an ulp; take whole turns off first. */
export function sinPi(turns: number): number {
  return Math.sin(Math.PI * turns);
}
