// The calls we use of a package that ships no declarations.
declare module 'jstat' {
  export const jStat: {
    readonly normal: { inv(p: number, mean: number, deviation: number): number };
    readonly beta: { inv(p: number, a: number, b: number): number };
    readonly chisquare: { cdf(x: number, df: number): number };
  };
}
