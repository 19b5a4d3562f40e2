import { centralSlope, type DifferenceProblem } from "./finite-difference.js";

const halvings = 10;

/**
 * Central differences extrapolated to vanishing steps: from `widest` on, halved, each order of the error taken
 * out in turn, and the entry kept at which the extrapolation moved least.
 *
 * @returns false where no two steps could be used.
 * @see Ridders (1982), Accurate computation of F'(x) and F'(x)F''(x), Advances in Engineering Software 4:75.
 */
export function extrapolatedSlope(
  problem: DifferenceProblem,
  parameters: Float64Array,
  j: number,
  widest: number,
  column: Float64Array,
): boolean {
  let before: Float64Array[] = [];
  let least = Number.POSITIVE_INFINITY;
  for (let k = 0; k <= halvings; k++) {
    const first = new Float64Array(problem.rows);
    if (!centralSlope(problem, parameters, j, widest / 2 ** k, first)) {
      before = [];
      continue;
    }
    const row = extrapolatedRow(first, before);
    for (let m = 1; m < row.length; m++) {
      const moved = Math.max(distance(row[m]!, row[m - 1]!), distance(row[m]!, before[m - 1]!));
      if (moved >= least) continue;
      least = moved;
      column.set(row[m]!);
    }
    const last = row.length - 1;
    if (last > 1 && distance(row[last]!, before[last - 1]!) > 2 * least) break;
    before = row;
  }
  return least < Number.POSITIVE_INFINITY;
}

/** A row of the tableau: the new difference, then it combined with the row before to cancel h^2, h^4, ... */
function extrapolatedRow(first: Float64Array, before: readonly Float64Array[]): Float64Array[] {
  const row = [first];
  for (let m = 1; m <= before.length; m++) {
    const weight = 4 ** m;
    const lower = row[m - 1]!;
    const upper = before[m - 1]!;
    row.push(lower.map((value, i) => (weight * value - upper[i]!) / (weight - 1)));
  }
  return row;
}

function distance(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += (a[i]! - b[i]!) ** 2;
  return Math.sqrt(sum);
}
