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

export interface ArrangementArgs {
    readonly n: number;
    readonly d: number;
    readonly central?: boolean;
    readonly bounded?: boolean;
}

export interface ArrangementFacesArgs extends ArrangementArgs {
    readonly k: number;
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

export interface EBarSquaredOptions {
    readonly observations: number;
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

export interface LogisticSignalArgs {
    readonly ratio: number;
    readonly offset?: number;
}

export interface LogisticThresholdArgs {
    readonly signal: number;
    readonly offset?: number;
    readonly intercept?: boolean;
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

export interface RandomCone {
    readonly kind: 'randomCone';
    expectedFaces(k: number): LogNumber;
    readonly expectedIntrinsicVolumes: readonly number[];
    readonly logExpectedIntrinsicVolumes: readonly number[];
    readonly statisticalDimension: number;
    readonly solidAngle: number;
}

export interface RandomConeArgs {
    readonly n: number;
    readonly d: number;
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

export interface SimpleTreeOptions {
    readonly control?: number;
    readonly treatment?: number;
}

export interface WalkHullArgs {
    readonly steps: number;
    readonly d: number;
}

export interface WeakThresholdArgs {
    readonly undersampling: number;
    readonly model: 'l1' | 'nonnegativeL1';
}

export declare function approxNuclearNormDimension(args: {
    rank: number;
    rows: number;
    columns: number;
}): number;

export declare function approxPolyhedralCone(generators: readonly ArrayLike<number>[], options: {
    trials: number;
    seed: number;
}): Cone;

export declare function approxSeparability(args: ApproxSeparabilityArgs): Probability;

export declare function approxTotalOrder(weights: readonly number[], options: ApproxTotalOrderOptions): readonly number[];

export declare function arrangementFaces(args: ArrangementFacesArgs): LogNumber;

export declare function arrangementRegions(args: ArrangementArgs): LogNumber;

export declare function bridgeHull(args: WalkHullArgs): Probability;

export declare function chiBarSquared(weights: readonly number[] | Cone, options?: ChiBarSquaredOptions): OrderRestrictedLaw;

export declare function circularCone(n: number, angle: number): Cone;

export declare function coneMeetsSubspace(cone: Cone, options: {
    codimension: number;
}): Probability;

export declare function conesMeet(first: Cone, second: Cone): Probability;

export declare function coverEfronCone(args: RandomConeArgs): RandomCone;

export declare function dichotomyCount(args: LabelArgs): LogNumber;

export declare function eBarSquared(weights: readonly number[], options: EBarSquaredOptions): OrderRestrictedLaw;

export declare function halfspace(n: number): Cone;

export declare function jointWalkHull(args: JointWalkHullArgs): Probability;

export declare function l1DescentCone(args: {
    n: number;
    sparsity: number;
}): Cone;

export declare function l1StatisticalDimension(args: {
    n: number;
    sparsity: number;
}): {
    readonly exact: number;
    readonly upper: number;
};

export declare function labelSeparability(args: LabelArgs): Probability;

export declare function linfDescentCone(args: {
    n: number;
    saturated: number;
}): Cone;

export declare function logisticFitExists(args: LabelArgs): Probability;

export declare function logisticSignal(args: LogisticSignalArgs): number;

export declare function logisticThreshold(args: LogisticThresholdArgs): number;

export declare function originInHull(args: OriginInHullArgs): Probability;

export declare function originInHullLowerBound(args: OriginInHullLowerBoundArgs): Probability;

export declare function orthant(n: number): Cone;

export declare function orthantWeights(args: OrthantWeightsArgs): readonly number[];

export declare function polarCone(cone: Cone): Cone;

export declare function polyhedralCone(generators: readonly ArrayLike<number>[]): Cone;

export declare function productCone(first: Cone, second: Cone): Cone;

export declare function ray(): Cone;

export declare function recoveryBounds(args: RecoveryBoundsArgs): {
    readonly lower: Probability;
    readonly upper: Probability;
};

export declare function recoverySuccess(args: RecoveryArgs): Probability;

export declare function reversedWeights(weights: readonly number[]): readonly number[];

export declare function schlaefliCone(args: RandomConeArgs): RandomCone;

export declare function simpleTree(k: number, options?: SimpleTreeOptions): readonly number[];

export declare function subspace(args: {
    dimension: number;
    ambient: number;
}): Cone;

export declare function surroundTime(args: {
    readonly d: number;
}): Distribution;

export declare function totalOrder(k: number, weights?: readonly number[]): readonly number[];

export declare function walkHull(args: WalkHullArgs): Probability;

export declare function weakThreshold(args: WeakThresholdArgs): {
    readonly perMeasurement: number;
    readonly perVariable: number;
};

export declare function weylChamber(type: 'A' | 'B' | 'D', n: number): Cone;
