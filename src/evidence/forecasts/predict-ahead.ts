import { type Fit, type FittedScatter, type GroupFit, problemOf } from "../../estimate/index.js";
import { inputByPeriod, type ObservedGroup } from "../../record/index.js";
import { compileRule, type Rule } from "../../rule/index.js";
import { carryVariance, spreadOf } from "./carry-variance.js";

/** What a fit says of one future value: normal with this mean and deviation, on the fitting scale. */
export interface Prediction {
  readonly mean: number;
  readonly deviation: number;
}

/**
 * Predicts every state over the periods after a row of the record, with the uncertainty of the parameters and the errors
 * of single values, both carried along the trajectory by their slopes.
 *
 * @param whole - the group with all its rows, whose inputs are taken as known.
 * @param origin - the last row whose value is known, at or after the last one that was fitted.
 * @returns [periods][states]; undefined where the fit is not one of least squares with errors of one kind, or the
 *   trajectory leaves the range of numbers.
 */
export function predictAhead(
  fit: Fit,
  group: GroupFit,
  whole: ObservedGroup,
  origin: number,
  periods: number,
): readonly (readonly Prediction[])[] | undefined {
  const { rule } = fit;
  const { scale, factors, group: problemOfGroup } = problemOf(fit);
  const { kind, unknowns, beginning: beginningOf, noise } = problemOfGroup(group.group);
  if (kind !== "least-squares" || Object.keys(factors).length > 0) return undefined;
  const last = whole.index[origin]!;
  const parameters = Float64Array.from(rule.parameters, (name) => group.parameters[name]!);
  const beginning = beginningOf();
  const slots = beginning.initial.length;
  const start = beginning.fromStart ? beginning.initial : valuesAt(rule, whole, last);
  if (start === undefined) return undefined;
  const from = beginning.fromStart ? beginning.period : last;
  const length = last + periods - from;
  const inputs = inputColumns(rule, whole, last + periods);
  const path = new Float64Array((length + 1) * slots);
  const slopes = new Float64Array(path.length * (rule.parameters.length + slots));
  compileRule(rule).pathWithSensitivities(start, parameters, inputs, from, length, path, slopes);
  const carried = beginning.fromStart
    ? undefined
    : carryVariance(rule, scale, noise.change.map(sdOf), start, parameters, inputs, from, periods);
  const predicted = Array.from({ length: periods }, (_, h) =>
    rule.states.map((_, s) => {
      const cell = (length - periods + h + 1) * slots + s;
      const value = path[cell]!;
      const unit = scale.log ? value : 1;
      const ofParameters =
        spreadOf(group, unknowns.columns, slopes, cell, parameters.length + slots) / unit ** 2;
      const ofErrors = carried?.[h]?.[s] ?? sdOf(noise.reading[s]) ** 2;
      return { mean: scale.to(value), deviation: Math.sqrt(ofParameters + ofErrors) };
    }),
  );
  const usable = predicted.every((row) =>
    row.every((p) => Number.isFinite(p.mean) && Number.isFinite(p.deviation)),
  );
  return usable ? predicted : undefined;
}

/** The standard deviation of normal errors. */
const sdOf = (noise: FittedScatter | undefined): number =>
  noise !== undefined && "sd" in noise ? noise.sd : Number.NaN;

/** The state vector at a period, past values included; undefined where one of them is not recorded. */
function valuesAt(rule: Rule, group: ObservedGroup, period: number): Float64Array | undefined {
  const wanted = [...rule.states.map((state) => ({ state, lag: 0 })), ...rule.lags];
  const values = wanted.map(
    ({ state, lag }) => group.values[state]![group.index.indexOf(period - lag)] ?? Number.NaN,
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
