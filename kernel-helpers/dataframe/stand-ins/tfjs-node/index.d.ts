/** Rows and columns of double-precision numbers; rank 0, 1 or 2. */
export declare class Tensor {
  readonly shape: number[];
  readonly rank: number;
  readonly size: number;
  arraySync(): number | number[] | number[][];
  dataSync(): number[];
  clone(): Tensor;
  transpose(): Tensor;
  sqrt(): Tensor;
  argMax(): Tensor;
  argMin(): Tensor;
  max(axis?: number): Tensor;
  min(axis?: number): Tensor;
  mean(axis?: number): Tensor;
  add(other: Tensor | number): Tensor;
  sub(other: Tensor | number): Tensor;
  mul(other: Tensor | number): Tensor;
  div(other: Tensor | number): Tensor;
  divNoNan(other: Tensor | number): Tensor;
  pow(other: Tensor | number): Tensor;
  mod(other: Tensor | number): Tensor;
  greater(other: Tensor | number): Tensor;
  greaterEqual(other: Tensor | number): Tensor;
  less(other: Tensor | number): Tensor;
  lessEqual(other: Tensor | number): Tensor;
  equal(other: Tensor | number): Tensor;
  notEqual(other: Tensor | number): Tensor;
}
export declare function scalar(value: number): Tensor;
export declare function tensor1d(values: ArrayLike<number>): Tensor;
export declare function tensor2d(values: ArrayLike<number> | ArrayLike<number>[], shape?: number[]): Tensor;
export declare function moments(tensor: Tensor, axis?: number): { mean: Tensor; variance: Tensor };
export declare const data: {
  array<T>(values: T[]): {
    shuffle(window: number, seed: string): { take(count: number): { toArray(): Promise<T[]> } };
  };
};
