// What is used of ml-regression, which ships no types.
declare module "ml-regression" {
  export class TheilSenRegression {
    constructor(x: readonly number[], y: readonly number[]);
    readonly slope: number;
    readonly intercept: number;
  }
  export class MultivariateLinearRegression {
    constructor(
      x: readonly (readonly number[])[],
      y: readonly (readonly number[])[],
      options: { readonly intercept: boolean; readonly statistics: boolean },
    );
    readonly weights: readonly (readonly number[])[];
  }
}
