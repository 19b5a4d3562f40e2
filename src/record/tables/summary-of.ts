import { optionWrong } from "../refusals.js";

/** How several values become one. */
export type Summary = "mean" | "sum" | "least" | "most" | "middle" | "deviation" | "last" | "count";

const summaries: Readonly<Record<Summary, (values: readonly number[]) => number>> = {
  mean: (values) => sum(values) / values.length,
  sum,
  least: (values) => Math.min(...values),
  most: (values) => Math.max(...values),
  middle: (values) => {
    const sorted = [...values].sort((a, b) => a - b);
    const half = sorted.length >> 1;
    return sorted.length % 2 === 1 ? sorted[half]! : (sorted[half - 1]! + sorted[half]!) / 2;
  },
  // Divided by n - 1; of one value it is not determined.
  deviation: (values) => {
    const mean = sum(values) / values.length;
    return values.length < 2
      ? Number.NaN
      : Math.sqrt(sum(values.map((value) => (value - mean) ** 2)) / (values.length - 1));
  },
  last: (values) => values[values.length - 1]!,
  count: (values) => values.length,
};

function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0);
}

/** @throws {ModelError} `option-wrong`, naming those there are. */
export function summaryOf(take: Summary): (values: readonly number[]) => number {
  if (!Object.hasOwn(summaries, take))
    throw optionWrong("take", take, `one of ${Object.keys(summaries).join(", ")}`);
  return summaries[take];
}
