export interface ApproxVolumeThresholdArgs {
    readonly d: number;
    readonly k?: number | undefined;
    readonly law: Law;
    readonly share?: number | undefined;
}

export interface CapProbabilityArgs {
    readonly d: number;
    readonly height: number;
    readonly law: Law;
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

export interface HullVolumeRatioArgs {
    readonly n: Count;
    readonly d: number;
    readonly law: Law;
    readonly hull?: Hull | undefined;
}

export interface NextPointInHullArgs {
    readonly n: Count;
    readonly d: number;
    readonly law?: Law | undefined;
    readonly queryScale?: number | undefined;
    readonly hull?: Hull | undefined;
}

export interface PointInHullArgs {
    readonly n: Count;
    readonly d: number;
    readonly mahalanobisDistance: number;
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

export declare function approxVolumeThreshold(args: ApproxVolumeThresholdArgs): LogNumber;

export declare function capProbability(args: CapProbabilityArgs): Probability;

export declare function expectedFaces(args: ExpectedFacesArgs): LogNumber;

export declare function expectedFacets(args: ExpectedFacetsArgs): LogNumber;

export declare function expectedFacetsBelow(args: ExpectedFacetsBelowArgs): LogNumber;

export declare function expectedHullIntrinsicVolume(args: ExpectedHullIntrinsicVolumeArgs): LogNumber;

export declare function expectedHullVolume(args: ExpectedHullVolumeArgs): LogNumber;

export declare function expectedVertices(args: ExpectedVerticesArgs): LogNumber;

export declare function facetHeight(args: FacetHeightArgs): FacetHeight;

export declare function hausdorffDistance(args: HausdorffDistanceArgs): HausdorffDistance;

export declare function hausdorffWithin(args: HausdorffWithinArgs): Probability;

export declare function heightLimit(args: HeightLimitArgs): HeightLimit;

export declare function hullIntrinsicVolumeRatio(args: HullIntrinsicVolumeRatioArgs): Probability;

export declare function hullVolumeRatio(args: HullVolumeRatioArgs): Probability;

export declare function nextPointInHull(args: NextPointInHullArgs): Probability;

export declare function pointInHull(args: PointInHullArgs): Probability;

export declare function projectedFaces(args: ProjectedFacesArgs): ProjectedFaces;

export declare function queriesInHull(args: QueriesInHullArgs): Probability;

export declare function simplexVolume(args: SimplexVolumeArgs): SimplexVolume;
