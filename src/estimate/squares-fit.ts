import type { ObservedGroup } from "../record/index.js";
import type { Rule } from "../rule/index.js";
import { criteria } from "./criteria.js";
import { cutOf } from "./cut.js";
import { describeFit } from "./describe-fit.js";
import type { FitOptions } from "./fit-options.js";
import type { GroupFit } from "./group-fit.js";
import { optimum } from "./optimum.js";
import { prepared } from "./prepared.js";
import { refuseNoStart } from "./refusals.js";
import { squaresObjective } from "./squares-objective.js";
import { startingPoints } from "./starting-points.js";
import { unknownsOf } from "./unknowns.js";

/** Fits a rule to a group by least squares. */
export function squaresFit(rule: Rule, group: ObservedGroup, options: FitOptions): GroupFit {
  const unknowns = unknownsOf(rule, options);
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
  const measures = { criteria: criteria(found.value, whole.rows, options), sigma: undefined, exact: true };
  return describeFit(rule, group, options, unknowns, whole.rows, found, measures);
}
