export interface Answer {
    readonly value: number;
    readonly log: number;
    readonly exact: boolean;
    readonly bracket: readonly [number, number];
    readonly probability: Probability;
}

export interface BetaLaw {
    readonly kind: 'law';
    readonly family: 'beta';
    readonly b: number;
}

export interface BetaPrimeLaw {
    readonly kind: 'law';
    readonly family: 'betaPrime';
    readonly b: number;
}

export type Count = number | LogNumber;

export interface DisplayBundle {
    readonly 'text/plain': string;
    readonly 'text/markdown': string;
    readonly 'text/html': string;
}

export type DisplayRow = readonly [name: string, value: string];

export interface Distribution {
    readonly mean: number;
    readonly variance: number;
    cdf(x: number): Probability;
    quantile(p: number | Probability): number;
    logPdf?(x: number): number;
}

export declare class DomainError extends RangeError {
    readonly name: string;
    readonly code: string;
    readonly parameter: string;
    readonly received: unknown;
    constructor(fn: string, parameter: string, requirement: string, received: unknown);
}

export type FixedArgs<Args, Name> = Args extends unknown ? Omit<Args, Name & keyof Args> : never;

export interface GaussianLaw {
    readonly kind: 'law';
    readonly family: 'gaussian';
}

export type Hull = 'plain' | 'symmetric' | 'withCentre';

export interface HullIntrinsicVolumeRatioOptions extends HullVolumeRatioOptions {
    readonly k: number;
}

export interface HullVolumeRatioOptions {
    readonly n: Count;
    readonly d: number;
    readonly law: Law;
    readonly hull?: Hull | undefined;
}

export interface LabelArgs {
    readonly n: number;
    readonly d: number;
    readonly intercept?: boolean;
}

export type Law = GaussianLaw | BetaLaw | BetaPrimeLaw | StudentTLaw;

export declare class LogNumber extends Displayable {
    readonly kind: "logNumber";
    readonly log: number;
    readonly logError: number;
    constructor(log: number, logError: number);
    static fromLog(log: number, logError?: number): LogNumber;
    static of(value: number): LogNumber;
    static from(plain: PlainLogNumber | LogNumber): LogNumber;
    get value(): number;
    get log10(): number;
    toString(): string;
    toJSON(): PlainLogNumber;
    displayRows(): readonly DisplayRow[];
}

export interface OriginInHullArgs {
    readonly n: Count;
    readonly d: number;
}

export interface OriginInHullLowerBoundArgs {
    readonly n: Count;
    readonly d: number;
    readonly depth: number;
    readonly generalPosition?: boolean;
}

export type ParameterOf<Args> = Args extends unknown ? keyof Args & string : never;

export interface PlainLogNumber {
    readonly kind: 'logNumber';
    readonly log: number | string;
    readonly logError: number | string;
}

export interface PlainProbability {
    readonly kind: 'probability';
    readonly value: number;
    readonly complement: number;
    readonly log: number | string;
    readonly logComplement: number | string;
    readonly logError: number | string;
}

export declare class Probability extends Displayable {
    readonly kind: "probability";
    readonly value: number;
    readonly complement: number;
    readonly log: number;
    readonly logComplement: number;
    readonly logError: number;
    constructor(value: number, complement: number, log: number, logComplement: number, logError: number);
    static of(fields: ProbabilityFields): Probability;
    static fromLog(log: number, logError?: number): Probability;
    static fromLogComplement(logComplement: number, logError?: number): Probability;
    static fromValue(value: number, logError?: number): Probability;
    static fromComplement(complement: number, logError?: number): Probability;
    static from(plain: PlainProbability | Probability): Probability;
    toString(): string;
    toJSON(): PlainProbability;
    displayRows(): readonly DisplayRow[];
}

export interface ProbabilityFields {
    readonly value: number;
    readonly complement: number;
    readonly log: number;
    readonly logComplement: number;
    readonly logError?: number;
}

export interface SizingAnswer {
    readonly target: number;
    readonly answer: Answer | null;
    readonly reason?: string;
    readonly limit?: number;
}

export declare class SizingReport extends Displayable {
    readonly kind: "sizingReport";
    readonly d: number;
    readonly law: Law;
    readonly n: Count | null;
    readonly rows: readonly SizingRow[];
    constructor(d: number, law: Law, n: Count | undefined, rows: readonly SizingRow[]);
    toString(): string;
    toMarkdown(): string;
    toJSON(): object;
    displayRows(): readonly DisplayRow[];
    private heading;
}

export interface SizingReportArgs {
    readonly d: number;
    readonly n?: Count;
    readonly law?: Law;
    readonly targets?: readonly number[];
}

export interface SizingRow {
    readonly question: string;
    readonly title: string;
    readonly assumes: string;
    readonly limitName?: string;
    readonly planned?: Probability;
    readonly sizes: readonly SizingAnswer[];
}

export interface StudentTLaw {
    readonly kind: 'law';
    readonly family: 'studentT';
    readonly degreesOfFreedom: number;
}

export type Target = number | Probability | {
    readonly atLeast: number | Probability;
} | {
    readonly atMost: number | Probability;
} | {
    readonly complementAtMost: number | Probability;
};

export declare function betaLaw(b: number): BetaLaw;

export declare function betaPrimeLaw(b: number): BetaPrimeLaw;

export declare function dichotomyCount(args: LabelArgs): LogNumber;

export declare function gaussian(): GaussianLaw;

export declare function hullIntrinsicVolumeRatio(options: HullIntrinsicVolumeRatioOptions): Probability;

export declare function hullVolumeRatio(options: HullVolumeRatioOptions): Probability;

export declare function labelSeparability(args: LabelArgs): Probability;

export declare function largest<Args, Name extends ParameterOf<Args>>(question: (args: Args) => Probability, parameter: Name, args: FixedArgs<Args, Name>, target: Target): Answer;

export declare function logisticFitExists(args: LabelArgs): Probability;

export declare function originInHull(args: OriginInHullArgs): Probability;

export declare function originInHullLowerBound(args: OriginInHullLowerBoundArgs): Probability;

export declare function sizingReport(args: SizingReportArgs): SizingReport;

export declare function smallest<Args, Name extends ParameterOf<Args>>(question: (args: Args) => Probability, parameter: Name, args: FixedArgs<Args, Name>, target: Target): Answer;

export declare function studentT(options: {
    readonly degreesOfFreedom: number;
}): StudentTLaw;

export declare function surroundTime(args: {
    readonly d: number;
}): Distribution;

export declare function uniformBall(): BetaLaw;

export declare function uniformSphere(): BetaLaw;
