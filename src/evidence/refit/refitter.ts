import {
  type Fit,
  type FitRows,
  type GroupFit,
  normalEquations,
  prepared,
  type Unknowns,
  unknownsOf,
} from "../../estimate/index.js";
import { type Minimum, minimiseSquares, squaresWorkspace } from "../../numeric/index.js";

/** A group's least-squares fit made ready to be done many times: to other values, to part of the record. */
export interface Refitter {
  readonly unknowns: Unknowns;
  readonly rows: FitRows;
  /** [rows of the group, states]: the record. */
  readonly recorded: Float64Array;
  /** The fit's estimates. */
  readonly at: Float64Array;
  /** Puts other values [rows of the group, states] in the record's place. */
  take(values: Float64Array): void;
  minimise(start: Float64Array): Minimum;
  /** The same with unknown i held at a value. */
  minimiseHeld(start: Float64Array, i: number, value: number): Minimum;
  /** The least sum over compared values `from` to `end` - 1 only. */
  minimiseWindow(start: Float64Array, from: number, end: number): Minimum;
}

/**
 * Makes a group's fit ready to be done again; undefined where the fit is not one of least squares (counts, censored values,
 * both kinds of error at once, groups fitted together).
 */
export function refitter(fit: Fit, group: GroupFit): Refitter | undefined {
  const { rule, options } = fit;
  const { distribution: spread } = options;
  const counted = spread === "poisson" || spread === "negative-binomial";
  const recordedGroup = fit.observations.groups.find((each) => each.name === group.group);
  const censored = Object.values(recordedGroup?.censoring ?? {}).some((marks) =>
    marks.some((mark) => mark !== 0),
  );
  const together = (options.groups ?? "separate") !== "separate" && fit.groups.length > 1;
  if (options.errors === "both" || counted || censored || together || recordedGroup === undefined)
    return undefined;
  const unknowns = unknownsOf(rule, options);
  const { rows, system } = prepared(rule, recordedGroup, unknowns, options);
  const { lower, upper } = unknowns;
  const workspace = squaresWorkspace(rows.size);
  const window = windowOf(rows);
  const partial = normalEquations(window.rows);
  return {
    unknowns,
    rows,
    recorded: Float64Array.from(
      { length: recordedGroup.index.length * rule.states.length },
      (_, cell) =>
        recordedGroup.values[rule.states[cell % rule.states.length]!]![
          Math.floor(cell / rule.states.length)
        ]!,
    ),
    at: Float64Array.from(group.estimates, (estimate) => estimate.value),
    take: (values) => rows.take(values),
    minimise: (start) => minimiseSquares(system, start, { lower, upper, workspace }),
    minimiseHeld(start, i, value) {
      const low = lower.slice();
      const high = upper.slice();
      const from = start.slice();
      low[i] = value;
      high[i] = value;
      from[i] = value;
      return minimiseSquares(system, from, { lower: low, upper: high, workspace });
    },
    minimiseWindow(start, from, end) {
      window.set(from, end);
      return minimiseSquares(partial, start, { lower, upper, workspace });
    },
  };
}

/** The rows of a fit seen through a window that can be moved. */
function windowOf(rows: FitRows): { readonly rows: FitRows; set(from: number, end: number): void } {
  let first = 0;
  const seen = { ...rows, residualAt: (i: number): number => rows.residualAt(first + i) };
  return {
    rows: seen,
    set(from, end) {
      first = from;
      seen.count = end - from;
    },
  };
}
