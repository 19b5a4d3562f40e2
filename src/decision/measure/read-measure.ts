import { centralPath, type Ground } from "../../projection/index.js";
import { nonsmoothCalls, quantitiesAt } from "../../rule/index.js";
import { crossing } from "../reach/crossing.js";
import { refuseMeasureName, refuseMeasureWindow } from "../refusals.js";
import type { Standing } from "../setting/standing.js";
import { type Measure, measureOf } from "./measure.js";

/** Reads a measure off the path without random change; NaN where the path does not have it. */
export type MeasureReader = (ground: Ground) => number;

/**
 * A reader of a measure other than a probability. A time that is never reached within the projection is infinite.
 *
 * @throws {ModelError} `unknown-name` | `outside-projection`.
 */
export function measureReader(standing: Standing, measure: Measure): MeasureReader {
  const { rule, present, ground } = standing;
  const { kind, name } = measureOf(measure);
  if (kind === "parameter") {
    const place = rule.parameters.indexOf(name);
    if (place < 0) throw refuseMeasureName(name, rule.parameters);
    return (at) => at.parameters[place]!;
  }
  const column = columnReader(standing, name);
  if ("time" in measure) return timeReader(standing, measure, column);
  const [first, last] = windowOf(measure, ground.periods - present);
  return (at) => {
    const values = column(at).slice(present + first, present + last + 1);
    return summaries[kind as keyof typeof summaries](values);
  };
}

const summaries = {
  level: (values: readonly number[]): number => values[0]!,
  total: (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0),
  average: (values: readonly number[]): number =>
    values.reduce((sum, value) => sum + value, 0) / values.length,
  lowest: (values: readonly number[]): number => Math.min(...values),
  highest: (values: readonly number[]): number => Math.max(...values),
};

/** First and last period ahead of a measure's window, refused where the projection does not have them. */
export function windowOf(measure: Measure, ahead: number): readonly [number, number] {
  const window = measure as { readonly from?: number; readonly to?: number };
  const [from, to] = "level" in measure ? [measure.at, measure.at] : [window.from ?? 1, window.to ?? ahead];
  if (!(from >= 1 && to <= ahead && from <= to)) throw refuseMeasureWindow(from, to, ahead);
  return [from, to];
}

/** Values of a state or of a quantity by row; a quantity's row is the period that it belongs to, NaN in row 0. */
function columnReader(standing: Standing, name: string): (ground: Ground) => readonly number[] {
  const { rule } = standing;
  const state = rule.states.indexOf(name);
  if (state >= 0) return (ground) => centralPath(ground).values[state]!;
  const place = rule.quantities.indexOf(name);
  if (place < 0) throw refuseMeasureName(name, [...rule.states, ...rule.quantities]);
  const quantities = quantitiesAt(rule);
  return (ground) => {
    const { parameters, inputs, from } = ground;
    const state = ground.initial.slice();
    const values = [Number.NaN];
    for (let t = 0; t < ground.periods; t++) {
      values.push(quantities({ state, parameters, inputs, t: from + t })[place]!);
      ground.compiled.step(state, parameters, inputs, from + t, state);
    }
    return values;
  };
}

function timeReader(
  standing: Standing,
  measure: Extract<Measure, { time: string }>,
  column: (ground: Ground) => readonly number[],
): MeasureReader {
  const { kinks, jumps } = nonsmoothCalls(standing.rule);
  const smooth = standing.rule.inputs.length === 0 && kinks.length + jumps.length === 0;
  return (ground) => {
    const path = column(ground);
    const at = crossing(path, 0, path.length, measure, smooth);
    if (at === undefined) return Number.POSITIVE_INFINITY;
    return standing.timeAt(smooth ? at.between : at.period);
  };
}
