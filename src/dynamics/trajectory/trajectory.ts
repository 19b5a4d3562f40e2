import { type PeriodAxis, periodWords } from "../../record/index.js";
import {
  compileRule,
  explainFailure,
  quantitiesAt,
  type Rule,
  type StepArguments,
} from "../../rule/index.js";
import type { InputPlans } from "../inputs/input-plan.js";
import { initialFrom, inputsFrom, runStart, type StartOptions } from "../inputs/run-start.js";
import { unreadableOption } from "../refusals.js";
import { type InitialValues, initialVector, parametersBySlot } from "../setting/setting.js";
import { namedValues, refuseOutsideRange } from "../setting/valid-range.js";

export interface TrajectoryOptions extends StartOptions {
  /** By parameter; those the rule holds fixed may be left out. */
  readonly parameters?: Readonly<Record<string, number>>;
  /** By state; those the rule states may be left out. */
  readonly initial?: InitialValues;
  readonly periods: number;
  /** By input: what it will be, from the first period on. */
  readonly inputs?: InputPlans;
}

/** Why a path ends where it does. */
export type TrajectoryStop =
  | { readonly kind: "complete" }
  /** The step into this absolute period has no finite value; the path ends one period before. */
  | { readonly kind: "left-finite-range"; readonly period: number; readonly reason: string }
  /** The value in this absolute period lies outside the rule's bounds; the path ends with it. */
  | { readonly kind: "left-bounds"; readonly period: number; readonly reason: string };

/** One path of a rule. */
export interface Trajectory {
  readonly kind: "trajectory";
  readonly rule: Rule;
  readonly parameters: Readonly<Record<string, number>>;
  /** The index of the first period, `t` in the rule. */
  readonly startsAt: number;
  /** The axis that names the periods: `startsAt` and those after it. */
  readonly axis: PeriodAxis;
  /** Periods that have a value, not counting the first. */
  readonly periods: number;
  /** By state: [periods + 1]. */
  readonly values: Readonly<Record<string, Float64Array>>;
  /** By quantity: [periods + 1]; the value inside the period that ends at that row, NaN in row 0. */
  readonly quantities: Readonly<Record<string, Float64Array>>;
  readonly stop: TrajectoryStop;
}

/** Everything a run needs, by slot. */
interface Run {
  readonly rule: Rule;
  readonly parameters: Float64Array;
  readonly inputs: readonly Float64Array[];
  readonly from: number;
  readonly axis: PeriodAxis;
  readonly width: number;
  /** [periods + 1, width] */
  readonly table: Float64Array;
}

function placeAt(run: Run, row: number): StepArguments {
  const state = run.table.subarray(row * run.width, (row + 1) * run.width);
  return { state, parameters: run.parameters, inputs: run.inputs, t: run.from + row };
}

interface End {
  readonly rows: number;
  readonly stop: TrajectoryStop;
}

/** Where a value first leaves the finite range, if it does; the path ends one row before. */
function leavesFinite(run: Run): End | undefined {
  const bad = run.table.findIndex((value) => !Number.isFinite(value));
  if (bad < 0) return undefined;
  const rows = Math.floor(bad / run.width);
  const period = run.from + rows;
  const failure = explainFailure(run.rule, placeAt(run, rows - 1));
  const cause = failure === undefined ? "" : `: ${failure.reason}`;
  const reason = `The rule leaves the finite range at ${periodWords(run.axis, period)}${cause}.`;
  return { rows, stop: { kind: "left-finite-range", period, reason } };
}

/** Where a state first leaves its bounds among the first rows, if it does; the path ends with that row. */
function leavesBounds(run: Run, rows: number): End | undefined {
  const bounded = run.rule.states.flatMap((name, slot) => {
    const range = run.rule.bounds[name];
    return range === undefined ? [] : [{ name, slot, range }];
  });
  for (let row = 1; row < rows && bounded.length > 0; row++) {
    for (const { name, slot, range } of bounded) {
      const value = run.table[row * run.width + slot]!;
      if (value >= range[0] && value <= range[1]) continue;
      const period = run.from + row;
      const reason = `${name} leaves its bounds ${range[0]} to ${range[1]} at ${periodWords(run.axis, period)}, with ${value}; further values would mean nothing.`;
      return { rows: row + 1, stop: { kind: "left-bounds", period, reason } };
    }
  }
  return undefined;
}

function stopOf(run: Run, periods: number): End {
  const end = leavesFinite(run) ?? { rows: periods + 1, stop: { kind: "complete" } };
  return leavesBounds(run, end.rows) ?? end;
}

function quantityColumns(run: Run, rows: number): Readonly<Record<string, Float64Array>> {
  const { quantities } = run.rule;
  const columns = quantities.map(() => new Float64Array(rows).fill(Number.NaN));
  const at = quantitiesAt(run.rule);
  for (let row = 1; row < rows && quantities.length > 0; row++) {
    at(placeAt(run, row - 1)).forEach((value, k) => {
      columns[k]![row] = value;
    });
  }
  return Object.fromEntries(quantities.map((name, k) => [name, columns[k]!]));
}

/**
 * Runs a rule from its first value, without random change.
 *
 * @param rule - any rule; one with lags needs as many first values as it reads, oldest first.
 * @param options.periods - steps to take, a whole number from 0.
 * @returns the values by state [periods + 1], and why the path ends; it stops before a value that is not finite.
 * @throws {ModelError} `missing-value` | `unknown-name` | `wrong-history` | `missing-input` | `future-input-missing` |
 *   `plan-not-readable` | `start-not-readable` | `unreadable-option`.
 * @example trajectory(recurrence("N[t+1] = R*N"), { parameters: { R: 2 }, initial: { N: 3 }, periods: 2 }).values.N; // 3, 6, 12
 */
export function trajectory(rule: Rule, options: TrajectoryOptions): Trajectory {
  const { periods } = options;
  if (!Number.isSafeInteger(periods) || periods < 0) {
    throw unreadableOption("periods", "a whole number from 0 on", periods);
  }
  const start = runStart(options);
  const { from, axis } = start;
  const parameters = parametersBySlot(rule, options.parameters);
  const initial = initialVector(rule, initialFrom(rule, start, options.initial));
  refuseOutsideRange(rule, namedValues(rule, parameters, initial));
  const inputs = inputsFrom(rule, start, periods, options.inputs ?? {});
  const width = initial.length;
  const table = new Float64Array((periods + 1) * width);
  compileRule(rule).path(initial, parameters, inputs, from, periods, table);
  const run: Run = { rule, parameters, inputs, from, axis, width, table };
  const { rows, stop } = stopOf(run, periods);
  const column = (slot: number): Float64Array =>
    Float64Array.from({ length: rows }, (_, row) => table[row * width + slot]!);
  return {
    kind: "trajectory",
    rule,
    parameters: Object.fromEntries(rule.parameters.map((name, i) => [name, parameters[i]!])),
    startsAt: from,
    axis,
    periods: rows - 1,
    values: Object.fromEntries(rule.states.map((name, slot) => [name, column(slot)])),
    quantities: quantityColumns(run, rows),
    stop,
  };
}
