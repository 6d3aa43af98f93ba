export interface Chart {
    readonly $schema: string;
    readonly description: string;
    readonly [property: string]: unknown;
}

export interface ChartOptions {
    readonly x: Readonly<Record<string, readonly (number | LogNumber)[]>>;
    readonly series?: Readonly<Record<string, readonly unknown[]>>;
    readonly args?: Readonly<Record<string, unknown>>;
    readonly show?: Shown;
}

export type ChartedQuestion = (args: never) => Probability | LogNumber | number;

export type Shown = 'value' | 'complement' | 'log';

export declare function chart(subject: ChartedQuestion | Distribution, options: ChartOptions): Chart;

export declare function sizingChart(report: SizingReport): Chart;
