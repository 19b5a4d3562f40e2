export declare function mean(values: ArrayLike<number>): number;
export declare function std(values: ArrayLike<number>): number;
export declare function variance(values: ArrayLike<number>): number;
export declare function median(values: ArrayLike<number>): number;
export declare function mode<T>(values: Iterable<T>): T[];
