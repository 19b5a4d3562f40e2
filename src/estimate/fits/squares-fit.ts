import type { Warning } from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import { refuseNoStart } from "../refusals.js";
import { criteria } from "../result/criteria.js";
import { describeFit } from "../result/describe-fit.js";
import type { GroupFit } from "../result/group-fit.js";
import { cutOf } from "../search/cut.js";
import { optimum } from "../search/optimum.js";
import { robustWeights } from "../search/robust-weights.js";
import { squaresObjective } from "../search/squares-objective.js";
import { startingPoints } from "../search/starting-points.js";
import { prepared } from "../systems/prepared.js";
import { unknownsOf } from "../unknowns/unknowns.js";

/** Fits a rule to a group by least squares. */
export function squaresFit(rule: Rule, recorded: ObservedGroup, options: FitOptions): GroupFit {
  const unknowns = unknownsOf(rule, options);
  const first = prepared(rule, recorded, unknowns, options);
  const starts = startingPoints(rule, recorded, options, unknowns, first);
  if (starts.length === 0) throw refuseNoStart(recorded, rule.text);
  const robust = options.robust === true ? robustWeights(rule, recorded, options, starts[0]!) : undefined;
  const group = robust?.group ?? recorded;
  const whole = robust === undefined ? first : prepared(rule, group, unknowns, options);
  const { count, size } = whole.rows;
  const found = optimum(
    squaresObjective(whole.system, whole.rows),
    unknowns,
    starts,
    (sum) => cutOf(sum, count, size, options),
    options.intervals !== "none",
  );
  const measures = { criteria: criteria(found.value, whole.rows, options), sigma: undefined, exact: true };
  const fitted = describeFit(rule, group, options, unknowns, whole.rows, found, measures);
  if (robust === undefined) return fitted;
  return Object.freeze({
    ...fitted,
    warnings: [...fitted.warnings, ...downweighted(recorded, robust.weights)],
  });
}

/** Names the rows that a robust fit lets count for less than half. */
function downweighted(group: ObservedGroup, weights: Float64Array): Warning[] {
  const rows = Array.from(weights, (weight, entry) => ({ weight, row: group.rows[entry]! })).filter(
    ({ weight }) => weight < 0.5,
  );
  if (rows.length === 0) return [];
  const told = rows.map(({ weight, row }) => `row ${row} (weight ${weight.toFixed(2)})`).join(", ");
  return [
    {
      code: "rows-count-less",
      message: `Far off the rule, and so counted for less than half: ${told}. Look at what happened there.`,
    },
  ];
}
