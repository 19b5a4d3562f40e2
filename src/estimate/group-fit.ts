import type { StopReason, Warning } from "../numeric/index.js";
import type { ObservedGroup } from "../record/index.js";
import type { Rule } from "../rule/index.js";
import { checkGroup } from "./check-group.js";
import { type Criteria, criteria } from "./criteria.js";
import { cutOf } from "./cut.js";
import { type Estimate, estimatesOf } from "./estimate-of.js";
import type { FitOptions } from "./fit-options.js";
import { type FitPoint, fitPoints } from "./fit-points.js";
import type { FitRows } from "./fit-rows.js";
import { fitWarnings } from "./fit-warnings.js";
import { type Optimum, optimum } from "./optimum.js";
import { prepared } from "./prepared.js";
import { refuseNoStart } from "./refusals.js";
import { squaresObjective } from "./squares-objective.js";
import { startingPoints } from "./starting-points.js";
import { place, type Unknowns, unknownsOf } from "./unknowns.js";

/** The fit of one group of a record. */
export interface GroupFit {
  readonly group: string;
  readonly estimates: readonly Estimate[];
  /** [unknowns, unknowns], row-major, by sigma^2 = RSS/(n - p); NaN where not determined. */
  readonly covariance: readonly number[];
  /** Every constant of the rule at its estimate or its given value. */
  readonly constants: Readonly<Record<string, number>>;
  /** Initial states of a trajectory fit (period 0); of a one-step fit the first recorded values. */
  readonly initial: Readonly<Record<string, number>>;
  readonly sumOfSquares: number;
  /** n: values compared. */
  readonly count: number;
  /** n - p. */
  readonly degreesOfFreedom: number;
  /** sqrt(RSS/(n - p)), on the fitting scale. */
  readonly sigma: number;
  readonly criteria: Criteria;
  /** Critical value of the profile's increase. */
  readonly cut: number;
  readonly stop: StopReason;
  readonly points: readonly FitPoint[];
  /** Other optima within 2 log-likelihood units: their estimates, and by how much they lie behind. */
  readonly rivals: readonly { readonly estimates: readonly number[]; readonly behind: number }[];
  readonly warnings: readonly Warning[];
}

/** Fits a rule to one group of a record. */
export function fitGroup(rule: Rule, group: ObservedGroup, options: FitOptions): GroupFit {
  const unknowns = unknownsOf(rule, options);
  checkGroup(rule, group, options, unknowns);
  const whole = prepared(rule, group, unknowns, options);
  const starts = startingPoints(rule, group, options, unknowns, whole);
  if (starts.length === 0) throw refuseNoStart(group, rule.text);
  const { count, size } = whole.rows;
  const found = optimum(
    squaresObjective(whole.system),
    unknowns,
    starts,
    (sum) => cutOf(sum, count, size, options),
    options.intervals !== "none",
  );
  return describeFit(rule, group, options, unknowns, whole.rows, found);
}

/** A group's optimum as a result to be read. */
function describeFit(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  unknowns: Unknowns,
  rows: FitRows,
  found: Optimum,
): GroupFit {
  const degreesOfFreedom = rows.count - rows.size;
  const { variance } = found.cut;
  place(unknowns, found.at);
  const initial = rule.states.map((state, s) => [
    state,
    options.errors === "process" ? group.values[state]![0]! : unknowns.initial[s]!,
  ]);
  const fitted = {
    group: group.name,
    estimates: estimatesOf(rule, unknowns, found, options.level ?? 0.95, degreesOfFreedom),
    covariance: Array.from(found.covariance),
    constants: Object.fromEntries(rule.constants.map((name, c) => [name, unknowns.constants[c]!])),
    initial: Object.fromEntries(initial) as Record<string, number>,
    sumOfSquares: found.value,
    count: rows.count,
    degreesOfFreedom,
    sigma: Math.sqrt(found.value / degreesOfFreedom),
    criteria: criteria(found.value, rows, options),
    cut: found.cut.cut,
    stop: found.stop,
    points: fitPoints(rule, group, rows, found),
    rivals: found.rivals.map(({ estimates, value }) => ({
      estimates: Array.from(estimates),
      behind: (value - found.value) / variance / 2,
    })),
  };
  return Object.freeze({ ...fitted, warnings: fitWarnings(fitted, unknowns) });
}
