export interface BallArgs {
    readonly d: number;
    readonly radius?: number | undefined;
}

export interface Body {
    readonly dimension: number;
    readonly intrinsicVolumes: readonly LogNumber[];
}

export interface CrossPolytopeArgs {
    readonly d: number;
    readonly scale?: number | undefined;
}

export interface CubeArgs {
    readonly d: number;
    readonly side?: number | undefined;
}

export interface EllipsoidArgs {
    readonly semiAxes: readonly number[];
}

export interface RegularSimplexArgs {
    readonly d: number;
    readonly edge?: number | undefined;
}

export declare function ball(args: BallArgs): Body;

export declare function ballVolume(d: number, radius?: number): LogNumber;

export declare function box(sides: readonly number[]): Body;

export declare function crossPolytope(args: CrossPolytopeArgs): Body;

export declare function cube(args: CubeArgs): Body;

export declare function ellipsoid(args: EllipsoidArgs): Body;

export declare function flagCoefficient(d: number, k: number): LogNumber;

export declare function meanWidth(body: Body): number;

export declare function regularSimplex(args: RegularSimplexArgs): Body;

export declare function sphereArea(d: number, radius?: number): LogNumber;

export declare function steinerVolume(body: Body, distance: number): LogNumber;

export declare function surfaceArea(body: Body): LogNumber;
