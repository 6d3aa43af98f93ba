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

export declare function hullIntrinsicVolumeRatio(options: HullIntrinsicVolumeRatioOptions): Probability;

export declare function hullVolumeRatio(options: HullVolumeRatioOptions): Probability;
