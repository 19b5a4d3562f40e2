import type { ErrorKind } from "../../estimate/index.js";
import type { ObservedGroup } from "../../record/index.js";

/** The values of a group that a fit compares, in the order of its points. */
export interface Comparisons {
  readonly count: number;
  /** [count]: number of the state, and row of the group. */
  readonly state: Int32Array;
  readonly row: Int32Array;
  /** [count]: step index of the value. */
  readonly index: Int32Array;
  /** [rows, states]: the record's values; NaN where one is missing. */
  readonly values: Float64Array;
}

/** Which values a fit of this kind compares: every recorded one, or every one that has a row before it. */
export function comparisonsOf(
  group: ObservedGroup,
  states: readonly string[],
  errors: ErrorKind,
): Comparisons {
  const rows = group.index.length;
  const values = new Float64Array(rows * states.length);
  states.forEach((state, s) => {
    for (let i = 0; i < rows; i++) values[i * states.length + s] = group.values[state]![i]!;
  });
  const cells: number[] = [];
  for (let cell = errors === "process" ? states.length : 0; cell < values.length; cell++)
    if (!Number.isNaN(values[cell]!)) cells.push(cell);
  return {
    count: cells.length,
    state: Int32Array.from(cells, (cell) => cell % states.length),
    row: Int32Array.from(cells, (cell) => Math.floor(cell / states.length)),
    index: Int32Array.from(cells, (cell) => group.index[Math.floor(cell / states.length)]!),
    values,
  };
}
