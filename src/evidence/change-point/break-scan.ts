import type { Refitter } from "../../estimate/index.js";

/** One date at which the parameters may change: what two fits, before and after it, leave unexplained. */
export interface BreakDate {
  /** First compared value of the part after. */
  readonly first: number;
  /** The two sums of squares together. */
  readonly value: number;
  readonly before: Float64Array;
  readonly after: Float64Array;
}

/** Fits the compared values `from` to `end` - 1, from a start. */
export type PartFit = NonNullable<Refitter["minimisePart"]>;

/**
 * Fits the parts before and after every admitted date, each search starting from the neighbouring date's estimates.
 *
 * @param dates - first compared value of the part after, in increasing order.
 */
export function breakScan(again: Refitter, fitPart: PartFit, dates: readonly number[]): readonly BreakDate[] {
  const { count } = again.rows;
  // The neighbour's estimates or the whole record's, whichever ends lower.
  const lower = (start: Float64Array, from: number, end: number): ReturnType<PartFit> => {
    const near = fitPart(start, from, end);
    const whole = fitPart(again.at, from, end);
    return near.value <= whole.value ? near : whole;
  };
  let before = again.at;
  const left = dates.map((first) => {
    const found = lower(before, 0, first);
    before = found.estimates;
    return found;
  });
  let after = again.at;
  const right = [...dates].reverse().map((first) => {
    const found = lower(after, first, count);
    after = found.estimates;
    return found;
  });
  return dates.map((first, k) => {
    const [one, two] = [left[k]!, right[dates.length - 1 - k]!];
    return {
      first,
      value: one.value + two.value,
      before: one.estimates,
      after: two.estimates,
    };
  });
}
