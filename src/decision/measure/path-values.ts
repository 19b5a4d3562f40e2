import {
  type EnsembleRow,
  firstPassage,
  type KeptPaths,
  type PassageQuestion,
  passageLog,
  passageQuestion,
  pastBy,
} from "../../projection/index.js";
import { nonsmoothCalls } from "../../rule/index.js";
import type { DecisionContext } from "../setting/decision-context.js";
import type { Choice } from "../setting/set-value.js";
import type { PlacedMeasure } from "./measure.js";
import { type Course, isMoved, type PathKind, type PathRunner, pathRunner } from "./run-paths.js";

/** What a measure is on every path. */
export interface PathValues {
  /** [paths]; a time that is never reached is infinite, a probability 0 or 1; NaN where the path ended too early. */
  readonly values: Float64Array;
  /** Share of the paths that ended before they had shown what is measured. */
  readonly left: number;
}

/** Reads a measure off all paths, with a choice made or as things stand. */
export type PathReader = (choice?: Choice) => PathValues;

/** A reader of a measure off paths of a kind. */
export function pathReader(context: DecisionContext, measure: PlacedMeasure, kind: PathKind): PathReader {
  const { rule } = context;
  const run = pathRunner(context, kind, measure.place >= rule.states.length);
  if (measure.kind === "parameter") return parameterReader(measure, run);
  if (measure.kind === "time" || measure.kind === "probability")
    return passageReader(context, measure, kind, run);
  return windowReader(context, measure, run);
}

function parameterReader({ place }: PlacedMeasure, run: PathRunner): PathReader {
  return (choice) => {
    let values = new Float64Array(0);
    run(({ levels }) => {
      const { parameters, names } = levels;
      values = parameters.filter((_, at) => at % names.length === place);
      return () => undefined;
    }, choice);
    return { values, left: 0 };
  };
}

/** The values of a measure's state or quantity in a row. */
function columnOf(row: EnsembleRow, place: number): Float64Array {
  return row.values[place] ?? row.quantities[place - row.values.length]!;
}

/** How a path's value of a window is carried along. */
const gathered = {
  level: (_: number, next: number): number => next,
  total: (sum: number, next: number): number => sum + next,
  average: (sum: number, next: number): number => sum + next,
  share: (sum: number, next: number): number => sum + next,
  lowest: (least: number, next: number): number => Math.min(least, next),
  highest: (most: number, next: number): number => Math.max(most, next),
};

/** Where a path's value begins. */
const beginning = {
  level: Number.NaN,
  total: 0,
  average: 0,
  share: 0,
  lowest: Number.POSITIVE_INFINITY,
  highest: Number.NEGATIVE_INFINITY,
};

function windowReader(
  { rule, ground }: DecisionContext,
  measure: PlacedMeasure,
  run: PathRunner,
): PathReader {
  const { place, first, last } = measure;
  const kind = measure.kind as keyof typeof gathered;
  const take = gathered[kind];
  return (choice) => {
    let values = new Float64Array(0);
    run((course) => {
      values = new Float64Array(course.paths).fill(beginning[kind]);
      const shown = shownBy(rule.states.length, measure, course, ground.present);
      return (t, row) => {
        if (t < ground.present + first || t > ground.present + last) return;
        const column = columnOf(row, place);
        for (let path = 0; path < values.length; path++)
          values[path] = take(values[path]!, shown(column[path]!, path));
      };
    }, choice);
    const size = kind === "average" || kind === "share" ? last - first + 1 : 1;
    const each = values.map((value) => value / size);
    return { values: each, left: each.filter(Number.isNaN).length / each.length };
  };
}

/** The value itself; of a share 1 where it is at or past the level, else 0. */
function shownBy(
  states: number,
  { level, place }: PlacedMeasure,
  { levels }: Course,
  present: number,
): (value: number, path: number) => number {
  if (level === undefined) return (value) => value;
  const { sign, levels: own } = passageQuestion(states, place, level, levels, present);
  return (value, path) => {
    const past = pastBy(value, own[own.length === 1 ? 0 : path]!, sign);
    return past >= 0 ? 1 : past * 0;
  };
}

/** Most values of paths that are kept to read a time off their curves. */
const mostKept = 5_000_000;

function passageReader(
  context: DecisionContext,
  measure: PlacedMeasure,
  kind: PathKind,
  run: PathRunner,
): PathReader {
  const { rule, ground, timeAt } = context;
  const { place, first, last, level } = measure;
  const { kinks, jumps } = nonsmoothCalls(rule);
  const smooth =
    !(isMoved(kind) && context.random) && rule.inputs.length === 0 && kinks.length + jumps.length === 0;
  const since = measure.kind === "time" && isPastNow(context, measure) ? 0 : ground.present;
  return (choice) => {
    const origin = choice?.setting.role === "initial" ? 0 : since;
    let found: () => Float64Array = () => new Float64Array(0);
    let ended = new Uint8Array(0);
    run((course) => {
      const asked = passageQuestion(rule.states.length, place, level!, course.levels, origin);
      const question = {
        ...asked,
        from: first === 1 ? asked.from : ground.present + first,
        to: ground.present + last,
        curveFrom: course.changedFrom,
      };
      const follow = follower(question, place, course.paths, ground.periods + 1, smooth);
      found = follow.at;
      return (t, row) => {
        follow.add(t, row);
        if (t === question.to)
          ended = Uint8Array.from(row.values[0]!, (value) => Number(Number.isNaN(value)));
      };
    }, choice);
    const at = found();
    const left = at.reduce(
      (sum, row, path) => sum + (row === Number.POSITIVE_INFINITY ? ended[path]! : 0),
      0,
    );
    const values = at.map((row) => {
      if (measure.kind === "probability") return Number.isFinite(row) ? 1 : 0;
      return Number.isFinite(row) ? timeAt(row) : row;
    });
    return { values, left: left / at.length };
  };
}

/** Whether a fit's record ends past the level: then the time at which it got there lies within the record. */
function isPastNow(context: DecisionContext, { place, level }: PlacedMeasure): boolean {
  const { rule, ground } = context;
  if (ground.present === 0) return false;
  let past = false;
  pathRunner(
    context,
    "estimates",
    place >= rule.states.length,
  )(({ levels }) => {
    const { sign, levels: own } = passageQuestion(rule.states.length, place, level!, levels, ground.present);
    return (t, row) => {
      if (t === ground.present) past = pastBy(columnOf(row, place)[0]!, own[0]!, sign) >= 0;
    };
  });
  return past;
}

/** Follows first passages: row by row, or on the curves of paths that are kept whole. */
function follower(
  question: PassageQuestion,
  place: number,
  paths: number,
  rows: number,
  smooth: boolean,
): { readonly add: (t: number, row: EnsembleRow) => void; readonly at: () => Float64Array } {
  if (!smooth || paths * rows > mostKept) {
    const log = passageLog(paths, question);
    return {
      add: (t, row) =>
        log.add(
          t,
          columnOf(row, place),
          row.passed.filter(({ state }) => state === place),
        ),
      at: () => log.at,
    };
  }
  const values = new Float64Array(paths * rows);
  const passed = { row: new Int32Array(paths).fill(-1), value: new Float64Array(paths) };
  const kept: KeptPaths = { paths, rows, values, passed };
  return {
    add(t, row) {
      columnOf(row, place).forEach((value, path) => {
        values[path * rows + t] = value;
      });
      for (const each of row.passed) {
        if (each.state !== place || passed.row[each.path]! >= 0) continue;
        passed.row[each.path] = t;
        passed.value[each.path] = each.value;
      }
    },
    at: () =>
      Float64Array.from({ length: paths }, (_, path) => {
        const found = firstPassage(kept, path, question, true);
        return found === undefined ? Number.POSITIVE_INFINITY : found.between;
      }),
  };
}
