import { type Fit, fit as fitRule } from "../../estimate/index.js";
import { ModelError } from "../../numeric/index.js";
import { type Prediction, predictAhead } from "./predict-ahead.js";
import { recordUntil } from "./record-until.js";

/**
 * Fits a rule afresh to a group's rows up to `origin` and predicts the periods after it.
 *
 * @returns [periods][states]; undefined where it cannot be fitted there.
 */
export function predictFrom(
  fit: Fit,
  name: string,
  origin: number,
  horizon: number,
): readonly (readonly Prediction[])[] | undefined {
  const group = fit.observations.groups.find((each) => each.name === name)!;
  const periods = Math.min(horizon, group.index[group.index.length - 1]! - group.index[origin]!);
  try {
    const refitted = fitRule(fit.rule, recordUntil(fit.observations, group, origin), {
      ...fit.options,
      start: { ...startOf(fit, name), ...fit.options.start },
      intervals: "none",
    });
    return predictAhead(refitted, refitted.groups[0]!, group, periods);
  } catch (cause) {
    // Too few rows yet, for instance: then this origin is passed over for all rivals.
    if ((cause as Error).name === ModelError.name) return undefined;
    throw cause;
  }
}

/** The whole record's estimates only tell where to look first; the search ends at the optimum of what was known. */
function startOf(fit: Fit, name: string): Record<string, number> {
  const estimates = fit.groups.find((each) => each.group === name)?.estimates ?? [];
  const constants = estimates.filter((estimate) => estimate.role === "constant");
  return Object.fromEntries(constants.map((estimate) => [estimate.name, estimate.value]));
}
