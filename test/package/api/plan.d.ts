export interface Answer {
    readonly value: number;
    readonly log: number;
    readonly exact: boolean;
    readonly bracket: readonly [number, number];
    readonly probability: Probability;
}

export type FixedArgs<Args, Name> = Args extends unknown ? Omit<Args, Name & keyof Args> : never;

export type ParameterOf<Args> = Args extends unknown ? keyof Args & string : never;

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

export type Target = number | Probability | {
    readonly atLeast: number | Probability;
} | {
    readonly atMost: number | Probability;
} | {
    readonly complementAtMost: number | Probability;
};

export declare function largest<Args, Name extends ParameterOf<Args>>(question: (args: Args) => Probability, parameter: Name, args: FixedArgs<Args, Name>, target: Target): Answer;

export declare function logSpaced(from: number, to: number, perDecade: number): number[];

export declare function sizingReport(args: SizingReportArgs): SizingReport;

export declare function smallest<Args, Name extends ParameterOf<Args>>(question: (args: Args) => Probability, parameter: Name, args: FixedArgs<Args, Name>, target: Target): Answer;
