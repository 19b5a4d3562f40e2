import type { Fit } from "../../estimate/index.js";

/** How well a record is told without any rule, on the values that its fits compare after the first. */
export interface NaiveCriterion {
  readonly name: "no change" | "mean level";
  readonly aicCorrected: number;
}

/**
 * AICc of the naive rules, and of a fit on the same values: those that have a recorded value before them.
 *
 * "No change" carries the last value on (its only parameter is sigma), "mean level" has each value scatter about one
 * level. A trajectory fit also compares its first value, which is left out here.
 *
 * @param from - first step index counted: 1, or more where rivals read past values and begin later.
 */
export function naiveCriteria(
  fit: Fit,
  from = 1,
): {
  readonly naive: readonly NaiveCriterion[];
  readonly own: number;
} {
  const log = fit.options.distribution === "lognormal";
  const scaled = (value: number): number => (log ? Math.log(value) : value);
  const total = { own: 0, change: 0, level: 0 };
  for (const group of fit.groups) {
    const recorded = fit.observations.groups.find((each) => each.name === group.group)!;
    for (const state of fit.rule.states) {
      const points = group.points.filter((point) => point.state === state && point.index >= from);
      const values = points.map((point) => scaled(point.observed));
      const before = points.map((point) => {
        const row = recorded.index.indexOf(point.index);
        return scaled(recorded.values[state]![row - 1]!);
      });
      const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
      const shared = group.estimates.length / fit.rule.states.length;
      total.own += criterion(
        points.map((point) => point.residual),
        shared + 1,
      );
      total.change += criterion(
        values.map((value, i) => value - before[i]!),
        1,
      );
      total.level += criterion(
        values.map((value) => value - mean),
        2,
      );
    }
  }
  return {
    own: total.own,
    naive: [
      { name: "no change", aicCorrected: total.change },
      { name: "mean level", aicCorrected: total.level },
    ],
  };
}

/** AICc of normal errors, `counted` with sigma. */
function criterion(residuals: readonly number[], counted: number): number {
  const count = residuals.length;
  const variance = residuals.reduce((sum, residual) => sum + residual * residual, 0) / count;
  const room = count - counted - 1;
  if (room <= 0) return Number.POSITIVE_INFINITY;
  return count * (Math.log(2 * Math.PI * variance) + 1) + 2 * counted + (2 * counted * (counted + 1)) / room;
}
