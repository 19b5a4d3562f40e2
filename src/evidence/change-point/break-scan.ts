import type { Refitter } from "../refit/refitter.js";

/** One date at which the parameters may change: what two fits, before and after it, leave unexplained. */
export interface BreakDate {
  /** First compared value of the part after. */
  readonly first: number;
  readonly sumOfSquares: number;
  readonly before: Float64Array;
  readonly after: Float64Array;
}

/**
 * Fits the parts before and after every admitted date, each search starting from the neighbouring date's estimates.
 *
 * @param dates - first compared value of the part after, in increasing order.
 */
export function breakScan(again: Refitter, dates: readonly number[]): readonly BreakDate[] {
  const { count } = again.rows;
  let before = again.at;
  const left = dates.map((first) => {
    const found = lower(again, before, 0, first);
    before = found.estimates;
    return found;
  });
  let after = again.at;
  const right = [...dates].reverse().map((first) => {
    const found = lower(again, after, first, count);
    after = found.estimates;
    return found;
  });
  return dates.map((first, k) => {
    const [one, two] = [left[k]!, right[dates.length - 1 - k]!];
    return {
      first,
      sumOfSquares: one.sumOfSquares + two.sumOfSquares,
      before: one.estimates,
      after: two.estimates,
    };
  });
}

/** The lower of the searches from the neighbour's estimates and from the whole record's. */
function lower(
  again: Refitter,
  start: Float64Array,
  from: number,
  end: number,
): ReturnType<Refitter["minimiseWindow"]> {
  const near = again.minimiseWindow(start, from, end);
  const whole = again.minimiseWindow(again.at, from, end);
  return near.sumOfSquares <= whole.sumOfSquares ? near : whole;
}
