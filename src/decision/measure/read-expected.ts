import { quantitiesAt } from "../../rule/index.js";
import { refuseMeasureName } from "../refusals.js";
import type { Standing } from "../setting/standing.js";
import { chanceRun } from "./chance-run.js";
import { type Measure, measureOf } from "./measure.js";
import { windowOf } from "./read-measure.js";
import type { Estimated, EstimatedReader } from "./read-probability.js";

/** How a path's value of a window is carried along. */
const gathered = {
  level: (_: number, next: number): number => next,
  total: (sum: number, next: number): number => sum + next,
  average: (sum: number, next: number): number => sum + next,
  lowest: (least: number, next: number): number => Math.min(least, next),
  highest: (most: number, next: number): number => Math.max(most, next),
};

/** Where a path's value begins. */
const beginning = {
  level: Number.NaN,
  total: 0,
  average: 0,
  lowest: Number.POSITIVE_INFINITY,
  highest: Number.NEGATIVE_INFINITY,
};

/**
 * Reads a level, total, average, lowest or highest value under random change: its mean over the paths, with the
 * Monte-Carlo error of that mean. Paths that leave the range of a state are left out.
 */
export function expectedReader(standing: Standing, measure: Measure): EstimatedReader {
  const { present, paths, ground } = standing;
  const kind = measureOf(measure).kind as keyof typeof gathered;
  const [first, last] = windowOf(measure, ground.periods - present);
  const run = chanceRun(standing);
  const follow = follower(standing, measureOf(measure).name);
  const take = gathered[kind];
  return (setting, value) => {
    const values = new Float64Array(paths).fill(beginning[kind]);
    const each = (row: number, path: number, next: number): void => {
      if (row >= present + first && row <= present + last) values[path] = take(values[path]!, next);
    };
    run(follow(each), setting, value);
    const size = kind === "average" ? last - first + 1 : 1;
    return meanOf(values.map((total) => total / size));
  };
}

type Each = (row: number, path: number, value: number) => void;

/** Tells of every value of a state or quantity, by row and path. */
function follower(
  { rule, ground }: Standing,
  name: string,
): (each: Each) => Parameters<ReturnType<typeof chanceRun>>[0] {
  const state = rule.states.indexOf(name);
  if (state >= 0)
    return (each) => ({
      onRow: (t, values) => {
        values[state]!.forEach((value, path) => {
          each(t, path, value);
        });
      },
    });
  const place = rule.quantities.indexOf(name);
  if (place < 0) throw refuseMeasureName(name, [...rule.states, ...rule.quantities]);
  const quantities = quantitiesAt(rule);
  const { inputs, from } = ground;
  return (each) => ({
    onRow: () => undefined,
    onStep: (path, present, parameters, t) => {
      each(t - from + 1, path, quantities({ state: present, parameters, inputs, t })[place]!);
    },
  });
}

function meanOf(values: Float64Array): Estimated {
  const live = values.filter(Number.isFinite);
  const mean = live.reduce((sum, value) => sum + value, 0) / live.length;
  const squares = live.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return { value: mean, error: Math.sqrt(squares / Math.max(1, live.length - 1) / live.length) };
}
