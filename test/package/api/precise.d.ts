export interface DichotomyCountExactArgs extends OriginInHullExactArgs {
    readonly intercept?: boolean;
}

export type ExactNumber = number | string | Decimal;

export interface ExactProbability {
    readonly numerator: bigint;
    readonly denominator: bigint;
    toDecimal(digits: number): Decimal;
    toString(): string;
}

export interface HullVolumeRatioDecimalArgs {
    readonly n: number;
    readonly d: number;
    readonly b: ExactNumber;
    readonly digits: number;
}

export interface OriginInHullDecimalArgs {
    readonly n: number;
    readonly d: number;
    readonly digits: number;
}

export interface OriginInHullExactArgs {
    readonly n: number;
    readonly d: number;
}

export declare function dichotomyCountExact(args: DichotomyCountExactArgs): bigint;

export declare function hullVolumeRatioDecimal(args: HullVolumeRatioDecimalArgs): Decimal;

export declare function incompleteBetaDecimal(a: ExactNumber, b: ExactNumber, x: ExactNumber, digits: number): Decimal;

export declare function originInHullDecimal(args: OriginInHullDecimalArgs): Decimal;

export declare function originInHullExact(args: OriginInHullExactArgs): ExactProbability;
