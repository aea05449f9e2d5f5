// What is used of fft.js; its own declarations are all `any` and partly wrong.
declare module "fft.js" {
  type Complex = number[] | Float64Array;
  export default class FFT {
    constructor(size: number);
    createComplexArray(): number[];
    realTransform(out: Complex, data: ArrayLike<number>): void;
    completeSpectrum(spectrum: Complex): void;
    inverseTransform(out: Complex, data: ArrayLike<number>): void;
  }
}
