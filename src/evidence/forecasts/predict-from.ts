import { type Fit, problemOf } from "../../estimate/index.js";
import { ModelError } from "../../numeric/index.js";
import { type Prediction, predictAhead } from "./predict-ahead.js";
import { recordUntil } from "./record-until.js";

/** Fits a rule afresh to a group's rows up to `origin`; undefined where it cannot be fitted there. */
export function fitUntil(fit: Fit, name: string, origin: number): Fit | undefined {
  const group = fit.observations.groups.find((each) => each.name === name)!;
  try {
    return problemOf(fit).refit({
      observations: recordUntil(fit.observations, group, origin),
      start: startOf(fit, name),
      intervals: "none",
    });
  } catch (cause) {
    // Too few rows yet, for instance: then this origin is passed over for all rivals.
    if ((cause as Error).name === ModelError.name) return undefined;
    throw cause;
  }
}

/** The whole record's estimates only tell where to look first; the search ends at the optimum of what was known. */
function startOf(fit: Fit, name: string): Record<string, number> {
  const estimates = fit.groups.find((each) => each.group === name)?.estimates ?? [];
  const parameters = estimates.filter((estimate) => estimate.role === "parameter");
  return Object.fromEntries(parameters.map((estimate) => [estimate.name, estimate.value]));
}

/**
 * Predicts the periods after row `origin` with the parameters of a fit to that row or an earlier one.
 *
 * @param whole - the fit to the whole record, whose rows up to the origin are known.
 * @returns [periods][states]; undefined where the fit allows no prediction.
 */
export function predictFrom(
  trained: Fit,
  whole: Fit,
  name: string,
  origin: number,
  horizon: number,
): readonly (readonly Prediction[])[] | undefined {
  const group = whole.observations.groups.find((each) => each.name === name)!;
  const periods = Math.min(horizon, group.index[group.index.length - 1]! - group.index[origin]!);
  return predictAhead(trained, trained.groups[0]!, group, origin, periods);
}
