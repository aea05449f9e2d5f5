/** Uniform on [0, 1), 32 bits, by a Weyl sequence and two multiplications; enough for shuffling and for drawing a few thousand records. */
export function randomNumbers(start: number): () => number {
  let state = start;
  return () => {
    state = (state + 0x9e3779b9) | 0;
    let mixed = Math.imul(state ^ (state >>> 16), 0x21f0aaad);
    mixed = Math.imul(mixed ^ (mixed >>> 15), 0x735a2d97);
    return ((mixed ^ (mixed >>> 15)) >>> 0) / 4294967296;
  };
}
