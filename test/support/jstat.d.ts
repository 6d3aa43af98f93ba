/** The part of jstat that the tests use as an oracle; the package ships no types. */
declare module 'jstat' {
  const jstat: {
    gammaln(x: number): number;
    betaln(a: number, b: number): number;
    combinationln(n: number, k: number): number;
    ibeta(x: number, a: number, b: number): number;
    ibetainv(p: number, a: number, b: number): number;
    lowRegGamma(a: number, x: number): number;
    gammapinv(p: number, a: number): number;
    erf(x: number): number;
    erfc(x: number): number;
    factorialln(n: number): number;
    readonly binomial: {
      cdf(k: number, n: number, p: number): number;
      pdf(k: number, n: number, p: number): number;
    };
    readonly normal: {
      cdf(x: number, mean: number, std: number): number;
      inv(p: number, mean: number, std: number): number;
    };
    readonly chisquare: {
      cdf(x: number, dof: number): number;
      inv(p: number, dof: number): number;
    };
  };
  export default jstat;
}
