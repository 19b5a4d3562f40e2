import type { ObservedGroup } from "../record/index.js";
import type { Rule } from "../rule/index.js";
import type { FitOptions } from "./fit-options.js";
import type { ResidualRows } from "./residual-rows.js";

/** One residual of a fit. */
export interface FitPoint {
  readonly state: string;
  /** Step index of the value that was compared. */
  readonly index: number;
  /** The period column's value there. */
  readonly time: number;
  readonly row: number;
  readonly observed: number;
  readonly fitted: number;
  /** Observed minus fitted, on the fitting scale. */
  readonly residual: number;
  /** Share of its own fitted value that this value decides: 0 to 1. */
  readonly leverage: number;
}

/** The residuals of a fit at its optimum, with leverage J (J'J)^-1 J'. */
export function fitPoints(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  rows: ResidualRows,
  at: Float64Array,
  covariance: Float64Array,
): readonly FitPoint[] {
  const skipped = options.errors === "process" ? 1 : 0;
  const states = rule.states.length;
  rows.prepare(at, true);
  return Array.from({ length: rows.count }, (_, i) => {
    const residual = rows.residualAt(i);
    const entry = Math.floor(i / states) + skipped;
    const state = rule.states[i % states]!;
    return {
      state,
      index: group.index[entry]!,
      time: group.time[entry]!,
      row: group.rows[entry]!,
      observed: group.values[state]![entry]!,
      fitted: rows.fitted(),
      residual,
      leverage: leverage(rows.row, covariance),
    };
  });
}

function leverage(row: Float64Array, covariance: Float64Array): number {
  let sum = 0;
  for (let a = 0; a < row.length; a++)
    for (let b = 0; b < row.length; b++) sum += row[a]! * covariance[a * row.length + b]! * row[b]!;
  return sum;
}
