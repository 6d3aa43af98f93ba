export interface BetaPoint {
    readonly x: number;
    readonly y: number;
    readonly logX: number;
    readonly logY: number;
}

export interface ComplexNumber {
    readonly re: number;
    readonly im: number;
}

export declare function binomialCdf(k: number, n: number, p?: number, q?: number): Probability;

export declare function binomialQuantile(prob: number | Probability, n: number, p?: number, q?: number): number;

export declare function chiSquaredCdf(x: number, df: number): Probability;

export declare function chiSquaredQuantile(p: number | Probability, df: number): number;

export declare function erf(x: number): number;

export declare function erfc(x: number): number;

export declare function erfcx(x: number): number;

export declare function expm1mx(x: number): number;

export declare function faddeeva(re: number, im: number): ComplexNumber;

export declare function incompleteBeta(a: number, b: number, x: number, y?: number): Probability;

export declare function incompleteBetaInverse(a: number, b: number, p: number | Probability): BetaPoint;

export declare function incompleteGamma(a: number, x: number): Probability;

export declare function incompleteGammaInverse(a: number, p: number | Probability): number;

export declare function log1mExp(x: number): number;

export declare function log1pmx(x: number): number;

export declare function logAddExp(a: number, b: number): number;

export declare function logBeta(a: number, b: number): number;

export declare function logBinomial(n: number, k: number): number;

export declare function logBinomialPmf(k: number, n: number, p?: number, q?: number): number;

export declare function logFactorial(n: number): number;

export declare function logGamma(x: number): number;

export declare function logGamma1p(x: number): number;

export declare function logGammaRatio(x: number, a: number): number;

export declare function logNormalCdf(x: number): number;

export declare function logStirling1(n: number, k: number): number;

export declare function logStirling1Row(n: number): Float64Array;

export declare function logStirlingB(n: number, k: number): number;

export declare function logStirlingBRow(n: number): Float64Array;

export declare function logSubExp(a: number, b: number): number;

export declare function logSumExp(values: ArrayLike<number>): number;

export declare function millsRatio(x: number): number;

export declare function normalCdf(x: number): Probability;

export declare function normalQuantile(p: number | Probability): number;

export declare function stirlingRemainder(x: number): number;
