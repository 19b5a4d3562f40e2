import { labelAt, type ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitRows } from "../rows/fit-rows.js";
import type { Optimum } from "../search/optimum.js";

/** One compared value of a fit. */
export interface FitPoint {
  readonly state: string;
  /** Step index of the value that was compared. */
  readonly index: number;
  /** The period column's value there. */
  readonly time: number;
  /** The label of the period, where periods are not mere numbers. */
  readonly label?: string;
  readonly row: number;
  readonly observed: number;
  readonly fitted: number;
  /** Observed minus fitted, on the fitting scale. */
  readonly residual: number;
  /**
   * The record's weight or the number of replicates averaged, over the square of a known standard deviation, and over
   * the variance that the steps of a gap add up to.
   */
  readonly weight: number;
  /** 0 exact; -1 where the value is only known to lie at or below `observed`, 1 at or above it. */
  readonly censoring: number;
  /** Share of its own fitted value that this value decides: 0 to 1; NaN where a parameter is not determined. */
  readonly leverage: number;
}

/** The values of a fit at its optimum, with leverage J (J'J)^-1 J'. */
export function fitPoints(
  rule: Rule,
  group: ObservedGroup,
  rows: FitRows,
  found: Pick<Optimum, "at" | "covariance" | "cut">,
): readonly FitPoint[] {
  rows.prepare(found.at, true);
  return Array.from({ length: rows.count }, (_, i) => {
    const residual = rows.residualAt(i) / rows.roots[i]!;
    const entry = rows.entries[i]!;
    const state = rule.states[rows.states[i]!]!;
    return {
      state,
      index: group.index[entry]!,
      time: group.time[entry]!,
      ...(group.axis.counts !== "numbers" && { label: labelAt(group.axis, group.index[entry]!) }),
      row: group.rows[entry]!,
      observed: rows.observed[i]!,
      fitted: rows.fitted(),
      residual,
      weight: rows.roots[i]! ** 2,
      censoring: group.censoring?.[state]?.[entry] ?? 0,
      leverage: leverage(rows.row, found.covariance) / found.cut.variance,
    };
  });
}

function leverage(row: Float64Array, covariance: Float64Array): number {
  let sum = 0;
  for (let a = 0; a < row.length; a++)
    for (let b = 0; b < row.length; b++) sum += row[a]! * covariance[a * row.length + b]! * row[b]!;
  return sum;
}
