export interface Answer {
    readonly value: number;
    readonly log: number;
    readonly exact: boolean;
    readonly bracket: readonly [number, number];
    readonly probability: Probability;
}

export interface ApproxSeparabilityArgs {
    readonly n: number;
    readonly d: number;
    readonly signal?: number;
    readonly classShare?: number;
    readonly offset?: number;
    readonly intercept?: boolean;
}

export interface ApproxTotalOrderOptions {
    readonly trials: number;
    readonly seed: number;
}

export interface ApproxVolumeThresholdArgs {
    readonly d: number;
    readonly k?: number | undefined;
    readonly law: Law;
    readonly share?: number | undefined;
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

export interface CapProbabilityArgs {
    readonly d: number;
    readonly height: number;
    readonly law: Law;
}

export interface ChiBarSquaredOptions {
    readonly null?: 'lineality' | 'origin';
}

export interface Cone {
    readonly kind: 'cone';
    readonly ambient: number;
    readonly dimension: number;
    readonly lineality: number;
    readonly intrinsicVolumes: readonly number[];
    readonly logIntrinsicVolumes: readonly number[];
    readonly logErrors: readonly number[];
    readonly statisticalDimension: number;
    readonly variance: number;
    readonly method: 'exact' | 'simulated';
    readonly standardErrors?: readonly number[];
    readonly symmetric?: true;
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
    constructor(fn: string, parameter: string, requirement: string, received: unknown, shown?: string);
}

export interface EBarSquaredOptions {
    readonly observations: number;
}

export interface Exceedance {
    readonly lower: Probability;
    readonly upper: Probability;
    readonly approx: Probability;
    readonly exact?: Probability;
}

export interface ExpectedFacesArgs extends ExpectedVerticesArgs {
    readonly k: number;
}

export interface ExpectedFacetsArgs {
    readonly n: Count;
    readonly d: number;
    readonly law: Law;
    readonly hull?: Hull | undefined;
}

export interface ExpectedFacetsBelowArgs {
    readonly n: Count;
    readonly d: number;
    readonly height: number;
    readonly law: Law;
}

export interface ExpectedHullIntrinsicVolumeArgs extends ExpectedHullVolumeArgs {
    readonly k: number;
}

export interface ExpectedHullVolumeArgs {
    readonly n: Count;
    readonly d: number;
    readonly law: Law;
    readonly hull?: Hull | undefined;
}

export interface ExpectedVerticesArgs {
    readonly n: Count;
    readonly d: number;
    readonly law: Law;
    readonly hull?: Hull | undefined;
}

export interface FacetHeight extends Distribution {
    logPdf(x: number): number;
    readonly limit: number;
}

export interface FacetHeightArgs {
    readonly n: Count;
    readonly d: number;
    readonly law: Law;
}

export type FixedArgs<Args, Name> = Args extends unknown ? Omit<Args, Name & keyof Args> : never;

export interface GaussianLaw {
    readonly kind: 'law';
    readonly family: 'gaussian';
}

export interface HausdorffDistance {
    exceedance(t: number): Exceedance;
    guarantee(confidence: number | Probability): number;
    readonly approxMean: number;
}

export interface HausdorffDistanceArgs {
    readonly n: Count;
    readonly d: number;
    readonly law: Law;
}

export interface HausdorffWithinArgs {
    readonly n: Count;
    readonly d: number;
    readonly distance: number;
    readonly law: Law;
}

export interface HeightLimit {
    readonly rate: number;
    readonly limit: number;
}

export interface HeightLimitArgs {
    readonly n: Count;
    readonly d: number;
}

export type Hull = 'plain' | 'symmetric' | 'withCentre';

export interface HullIntrinsicVolumeRatioArgs extends HullVolumeRatioArgs {
    readonly k: number;
}

export interface HullMembership {
    readonly position: 'inside' | 'outside' | 'undecided';
    readonly distance: number;
    readonly weights: readonly HullWeight[];
    readonly separator: Separator | null;
}

export interface HullVolumeRatioArgs {
    readonly n: Count;
    readonly d: number;
    readonly law: Law;
    readonly hull?: Hull | undefined;
}

export interface HullWeight {
    readonly index: number;
    readonly weight: number;
}

export interface InHullOptions {
    readonly tolerance?: number;
}

export declare class InterpolationAudit extends Displayable implements InterpolationAuditFields {
    readonly kind: "interpolationAudit";
    readonly n: number;
    readonly d: number;
    readonly rank: number;
    readonly insideRate: number;
    readonly approxInterval: readonly [lower: number, upper: number];
    readonly confidence: number;
    readonly gaussian: Probability;
    readonly effectiveDimension: number | null;
    readonly effectiveDimensionAtLeast: number;
    constructor(fields: InterpolationAuditFields);
    toString(): string;
    private dimensionText;
    displayRows(): readonly DisplayRow[];
}

export interface InterpolationAuditFields {
    readonly n: number;
    readonly d: number;
    readonly rank: number;
    readonly insideRate: number;
    readonly approxInterval: readonly [lower: number, upper: number];
    readonly confidence: number;
    readonly gaussian: Probability;
    readonly effectiveDimension: number | null;
    readonly effectiveDimensionAtLeast: number;
}

export interface InterpolationAuditOptions extends LongWorkOptions {
    readonly confidence?: number;
}

export interface JointWalkHullArgs {
    readonly walks: readonly number[];
    readonly bridges?: readonly number[];
    readonly d: number;
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

export interface LogisticSignalArgs {
    readonly ratio: number;
    readonly offset?: number;
}

export interface LogisticThresholdArgs {
    readonly signal: number;
    readonly offset?: number;
    readonly intercept?: boolean;
}

export interface LongWorkOptions {
    readonly onProgress?: (done: number, total: number) => void;
    readonly signal?: {
        readonly aborted: boolean;
    };
}

export interface NextPointInHullArgs {
    readonly n: Count;
    readonly d: number;
    readonly law?: Law | undefined;
    readonly queryScale?: number | undefined;
    readonly hull?: Hull | undefined;
}

export interface OrderRestrictedLaw extends Distribution {
    readonly weights: readonly number[];
    pValue(x: number): number;
    logPdf(x: number): number;
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

export interface OrthantWeightsArgs {
    readonly covariance: readonly (readonly number[])[];
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

export interface PointInHullArgs {
    readonly n: Count;
    readonly d: number;
    readonly mahalanobisDistance: number;
}

export type Points = readonly ArrayLike<number>[];

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

export interface ProjectedFaces {
    readonly expected: LogNumber;
    readonly survival: Probability;
}

export interface ProjectedFacesArgs {
    readonly polytope: ProjectedPolytope;
    readonly n: number;
    readonly d: number;
    readonly k: number;
}

export type ProjectedPolytope = 'simplex' | 'simplexWithOrigin' | 'crosspolytope' | 'cube';

export interface QueriesInHullArgs {
    readonly n: Count;
    readonly d: number;
    readonly mahalanobisDistances: ArrayLike<number>;
}

export type RecoveryArgs = {
    readonly model: 'l1' | 'nonnegativeL1' | 'nonnegativeFeasible';
    readonly n: number;
    readonly sparsity: number;
    readonly measurements: number;
} | {
    readonly model: 'box';
    readonly n: number;
    readonly free: number;
    readonly measurements: number;
};

export interface RecoveryBoundsArgs {
    readonly cone: Cone | {
        readonly ambient: number;
        readonly statisticalDimension: number;
    };
    readonly measurements: number;
}

export interface SamplerOptions {
    readonly d: number;
    readonly seed: number;
}

export interface Separability {
    readonly kind: 'complete' | 'quasi-complete' | 'overlapping' | 'undecided';
    readonly normal: readonly number[] | null;
    readonly offset: number | null;
    readonly margin: number;
    readonly rank: number;
    readonly weights: readonly HullWeight[];
}

export interface SeparableOptions {
    readonly intercept?: boolean;
}

export interface Separator {
    readonly normal: readonly number[];
    readonly offset: number;
}

export interface SimpleTreeOptions {
    readonly control?: number;
    readonly treatment?: number;
}

export interface SimplexVolume {
    moment(q: number): LogNumber;
    readonly meanOfLog: number;
    readonly varianceOfLog: number;
}

export interface SimplexVolumeArgs {
    readonly d: number;
    readonly r?: number | undefined;
    readonly law: Law;
}

export interface SimulateOptions extends LongWorkOptions {
    readonly n: number;
    readonly d: number;
    readonly law?: Law;
    readonly sampler?: () => ArrayLike<number>;
    readonly trials: number;
    readonly seed?: number;
}

export type SimulatedEvent = (points: readonly Float64Array[], next: Float64Array) => boolean;

export interface Simulation {
    readonly hits: number;
    readonly trials: number;
    readonly estimate: number;
    readonly interval: readonly [lower: number, upper: number];
}

export interface SizingAnswer {
    readonly target: number;
    readonly answer: Answer | null;
    readonly reason?: string;
    readonly limit?: Count;
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

export interface WalkHullArgs {
    readonly steps: number;
    readonly d: number;
}

export interface WeakThresholdArgs {
    readonly undersampling: number;
    readonly model: 'l1' | 'nonnegativeL1';
}

export declare function approxSeparability(args: ApproxSeparabilityArgs): Probability;

export declare function approxTotalOrder(weights: readonly number[], options: ApproxTotalOrderOptions): readonly number[];

export declare function approxVolumeThreshold(args: ApproxVolumeThresholdArgs): LogNumber;

export declare function betaLaw(b: number): BetaLaw;

export declare function betaPrimeLaw(b: number): BetaPrimeLaw;

export declare function bridgeHull(args: WalkHullArgs): Probability;

export declare function capProbability(args: CapProbabilityArgs): Probability;

export declare function chiBarSquared(weights: readonly number[] | Cone, options?: ChiBarSquaredOptions): OrderRestrictedLaw;

export declare function coneMeetsSubspace(cone: Cone, options: {
    codimension: number;
}): Probability;

export declare function conesMeet(first: Cone, second: Cone): Probability;

export declare function dichotomyCount(args: LabelArgs): LogNumber;

export declare function eBarSquared(weights: readonly number[], options: EBarSquaredOptions): OrderRestrictedLaw;

export declare function expectedFaces(args: ExpectedFacesArgs): LogNumber;

export declare function expectedFacets(args: ExpectedFacetsArgs): LogNumber;

export declare function expectedFacetsBelow(args: ExpectedFacetsBelowArgs): LogNumber;

export declare function expectedHullIntrinsicVolume(args: ExpectedHullIntrinsicVolumeArgs): LogNumber;

export declare function expectedHullVolume(args: ExpectedHullVolumeArgs): LogNumber;

export declare function expectedVertices(args: ExpectedVerticesArgs): LogNumber;

export declare function facetHeight(args: FacetHeightArgs): FacetHeight;

export declare function gaussian(): GaussianLaw;

export declare function hausdorffDistance(args: HausdorffDistanceArgs): HausdorffDistance;

export declare function hausdorffWithin(args: HausdorffWithinArgs): Probability;

export declare function heightLimit(args: HeightLimitArgs): HeightLimit;

export declare function hullIntrinsicVolumeRatio(args: HullIntrinsicVolumeRatioArgs): Probability;

export declare function hullVertices(points: Points, options?: LongWorkOptions): Promise<number[]>;

export declare function hullVolumeRatio(args: HullVolumeRatioArgs): Probability;

export declare function inHull(points: Points, query: ArrayLike<number>, options?: InHullOptions): HullMembership;

export declare function interpolationAudit(points: Points, options?: InterpolationAuditOptions): Promise<InterpolationAudit>;

export declare function jointWalkHull(args: JointWalkHullArgs): Probability;

export declare function labelSeparability(args: LabelArgs): Probability;

export declare function largest<Args, Name extends ParameterOf<Args>>(question: (args: Args) => Probability, parameter: Name, args: FixedArgs<Args, Name>, target: Target): Answer;

export declare function logisticFitExists(args: LabelArgs): Probability;

export declare function logisticSignal(args: LogisticSignalArgs): number;

export declare function logisticThreshold(args: LogisticThresholdArgs): number;

export declare function nextPointInHull(args: NextPointInHullArgs): Probability;

export declare function originInHull(args: OriginInHullArgs): Probability;

export declare function originInHullLowerBound(args: OriginInHullLowerBoundArgs): Probability;

export declare function orthantWeights(args: OrthantWeightsArgs): readonly number[];

export declare function pointInHull(args: PointInHullArgs): Probability;

export declare function projectedFaces(args: ProjectedFacesArgs): ProjectedFaces;

export declare function queriesInHull(args: QueriesInHullArgs): Probability;

export declare function recoveryBounds(args: RecoveryBoundsArgs): {
    readonly lower: Probability;
    readonly upper: Probability;
};

export declare function recoverySuccess(args: RecoveryArgs): Probability;

export declare function reversedWeights(weights: readonly number[]): readonly number[];

export declare function sampler(law: Law, options: SamplerOptions): () => Float64Array;

export declare function separable(points: Points, labels: ArrayLike<number | boolean>, options?: SeparableOptions): Separability;

export declare function simpleTree(k: number, options?: SimpleTreeOptions): readonly number[];

export declare function simplexVolume(args: SimplexVolumeArgs): SimplexVolume;

export declare function simulate(event: SimulatedEvent, options: SimulateOptions): Promise<Simulation>;

export declare function sizingReport(args: SizingReportArgs): SizingReport;

export declare function smallest<Args, Name extends ParameterOf<Args>>(question: (args: Args) => Probability, parameter: Name, args: FixedArgs<Args, Name>, target: Target): Answer;

export declare function studentT(args: {
    readonly degreesOfFreedom: number;
}): StudentTLaw;

export declare function surroundTime(args: {
    readonly d: number;
}): Distribution;

export declare function totalOrder(k: number, weights?: readonly number[]): readonly number[];

export declare function uniformBall(): BetaLaw;

export declare function uniformSphere(): BetaLaw;

export declare function walkHull(args: WalkHullArgs): Probability;

export declare function weakThreshold(args: WeakThresholdArgs): {
    readonly perMeasurement: number;
    readonly perVariable: number;
};
