import { type Fit, type GroupFit, unknownsOf } from "../../estimate/index.js";
import { inputByPeriod, type ObservedGroup } from "../../record/index.js";
import { compileRule, type Rule } from "../../rule/index.js";
import { carryVariance, spreadOf } from "./carry-variance.js";

/** What a fit says of one future value: normal with this mean and deviation, on the fitting scale. */
export interface Prediction {
  readonly mean: number;
  readonly deviation: number;
}

/**
 * Predicts every state over the periods after the fitted record, with the uncertainty of the parameters and the errors
 * of single values, both carried along the path by their slopes.
 *
 * @param whole - the group with all its rows, whose inputs are taken as known.
 * @returns [periods][states]; undefined where the fit is not one of least squares with errors of one kind, or the path
 *   leaves the range of numbers.
 */
export function predictAhead(
  fit: Fit,
  group: GroupFit,
  whole: ObservedGroup,
  periods: number,
): readonly (readonly Prediction[])[] | undefined {
  const { rule, options } = fit;
  const plain = [undefined, "normal", "lognormal"].includes(options.distribution as string | undefined);
  if (options.errors === "both" || options.factor !== undefined || !plain) return undefined;
  const trained = fit.observations.groups.find((each) => each.name === group.group)!;
  const last = trained.index[trained.index.length - 1]!;
  const unknowns = unknownsOf(rule, options);
  const parameters = Float64Array.from(rule.parameters, (name) => group.parameters[name]!);
  const slots = rule.states.length + rule.lags.length;
  const steps = options.errors === "process";
  const longest = rule.lags.reduce((most, { lag }) => Math.max(most, lag), 0);
  const start = steps ? lastValues(rule, trained) : unknowns.initial.slice();
  if (start === undefined) return undefined;
  group.estimates.forEach((estimate, i) => {
    const slot = unknowns.columns[i]! - rule.parameters.length;
    if (estimate.role === "initial") start[slot] = estimate.value;
  });
  const from = steps ? last : longest;
  const length = last + periods - from;
  const inputs = inputColumns(rule, whole, last + periods);
  const path = new Float64Array((length + 1) * slots);
  const slopes = new Float64Array(path.length * (rule.parameters.length + slots));
  compileRule(rule).pathWithSensitivities(start, parameters, inputs, from, length, path, slopes);
  const noise = steps ? carryVariance(fit, group, start, parameters, inputs, from, periods) : undefined;
  const log = options.distribution === "lognormal";
  const predicted = Array.from({ length: periods }, (_, h) =>
    rule.states.map((_, s) => {
      const cell = (length - periods + h + 1) * slots + s;
      const value = path[cell]!;
      const scale = log ? value : 1;
      const ofParameters =
        spreadOf(group, unknowns.columns, slopes, cell, parameters.length + slots) / scale ** 2;
      const ofErrors = noise === undefined ? group.sigma ** 2 : noise[h]![s]!;
      return { mean: log ? Math.log(value) : value, deviation: Math.sqrt(ofParameters + ofErrors) };
    }),
  );
  const usable = predicted.every((row) =>
    row.every((p) => Number.isFinite(p.mean) && Number.isFinite(p.deviation)),
  );
  return usable ? predicted : undefined;
}

/** The state vector at the last row, past values included; undefined where one of them is not recorded. */
function lastValues(rule: Rule, group: ObservedGroup): Float64Array | undefined {
  const last = group.index[group.index.length - 1]!;
  const wanted = [...rule.states.map((state) => ({ state, lag: 0 })), ...rule.lags];
  const values = wanted.map(
    ({ state, lag }) => group.values[state]![group.index.indexOf(last - lag)] ?? Number.NaN,
  );
  return values.every(Number.isFinite) ? Float64Array.from(values) : undefined;
}

/** One column an input, indexed by period, up to `last`; NaN where nothing is recorded. */
function inputColumns(rule: Rule, group: ObservedGroup, last: number): readonly Float64Array[] {
  return rule.inputs.map((name) => {
    const column = new Float64Array(last + 1).fill(Number.NaN);
    column.set(inputByPeriod(group, name).subarray(0, last + 1));
    return column;
  });
}
