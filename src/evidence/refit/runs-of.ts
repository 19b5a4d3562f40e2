import type { Comparisons } from "./comparisons-of.js";
import type { RefitProblem } from "./refitter.js";

/** One run of a rule, and which comparisons are read from it. */
export interface Run {
  /** Row of the group that a one-step run starts from. */
  readonly row: number;
  /** Absolute period of its start, and its length. */
  readonly from: number;
  readonly span: number;
  /** Comparisons `first` to `end` - 1. */
  readonly first: number;
  readonly end: number;
}

/** The runs of a problem: one from the initial state, or one from every recorded row to the next. */
export function runsOf(
  { rule, group, options }: RefitProblem,
  compared: Comparisons,
): { readonly runs: readonly Run[]; readonly inputs: readonly Float64Array[]; readonly longest: number } {
  const last = group.index[group.index.length - 1]!;
  const inputs = rule.inputs.map((name) => {
    const column = new Float64Array(last + 1).fill(Number.NaN);
    group.index.forEach((period, i) => {
      column[period] = group.inputs[name]?.[i] ?? Number.NaN;
    });
    return column;
  });
  if (options.errors !== "process")
    return { runs: [{ row: 0, from: 0, span: last, first: 0, end: compared.count }], inputs, longest: last };
  const runs: Run[] = [];
  let first = 0;
  for (let row = 1; row < group.index.length; row++) {
    let end = first;
    while (end < compared.count && compared.row[end] === row) end++;
    const from = group.index[row - 1]!;
    runs.push({ row: row - 1, from, span: group.index[row]! - from, first, end });
    first = end;
  }
  return { runs, inputs, longest: Math.max(...runs.map((run) => run.span)) };
}
