export interface HullMembership {
    readonly position: 'inside' | 'outside' | 'undecided';
    readonly distance: number;
    readonly weights: readonly HullWeight[];
    readonly separator: Separator | null;
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

export interface LongWorkOptions {
    readonly onProgress?: (done: number, total: number) => void;
    readonly signal?: {
        readonly aborted: boolean;
    };
}

export type Points = readonly ArrayLike<number>[];

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

export declare function hullVertices(points: Points, options?: LongWorkOptions): Promise<number[]>;

export declare function inHull(points: Points, query: ArrayLike<number>, options?: InHullOptions): HullMembership;

export declare function interpolationAudit(points: Points, options?: InterpolationAuditOptions): Promise<InterpolationAudit>;

export declare function sampler(law: Law, options: SamplerOptions): () => Float64Array;

export declare function separable(points: Points, labels: ArrayLike<number | boolean>, options?: SeparableOptions): Separability;

export declare function simulate(event: SimulatedEvent, options: SimulateOptions): Promise<Simulation>;
