// The calls we use of a package whose own declarations its module form does not name.
declare module 'cephes' {
  const cephes: {
    /** Resolves when the compiled code is ready; nothing may be called before. */
    readonly compiled: Promise<void>;
    /** Quantile of the beta distribution: x with I_x(a, b) = y. */
    incbi(a: number, b: number, y: number): number;
    /** The regularised incomplete beta function I_x(a, b). */
    incbet(a: number, b: number, x: number): number;
    /** Regularised upper incomplete gamma function. */
    igamc(a: number, x: number): number;
  };
  export default cephes;
}
