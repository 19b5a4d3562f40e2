import { type PeriodAxis, periodWords } from "../../record/index.js";
import {
  compileRule,
  explainFailure,
  quantitiesAt,
  type Rule,
  type StepArguments,
  stateBounds,
} from "../../rule/index.js";
import type { InputPlans } from "../inputs/input-plan.js";
import { initialFrom, inputsFrom, runStart, type StartOptions } from "../inputs/run-start.js";
import { unreadableOption } from "../refusals.js";
import { type InitialValues, initialVector, parametersBySlot } from "../setting/setting.js";
import { namedValues, refuseOutsideRange } from "../setting/valid-range.js";
import { type BoundedPath, boundedPath, type PathRun } from "./bounded-path.js";

export interface TrajectoryOptions extends StartOptions {
  /**
   * Parameters by name; those that the rule holds fixed may be left out, and those of a fit are its
   * estimates.
   */
  readonly parameters?: Readonly<Record<string, number>>;
  /**
   * First values by state, with lags a list, oldest first; those that the rule states or the fit estimates
   * may be left out.
   */
  readonly initial?: InitialValues;
  /** Whole periods to run. */
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
  /** States that passed a bound and have stayed there since. */
  readonly absorbed: readonly Absorption[];
}

/** A state that passed a bound, in this absolute period, and has stayed there since. */
export interface Absorption {
  readonly state: string;
  readonly period: number;
  readonly bound: number;
}

/** A run with its path, by slot. */
interface Run extends PathRun {
  readonly rule: Rule;
  readonly axis: PeriodAxis;
  readonly width: number;
  readonly path: BoundedPath;
}

function placeAt({ path, width, parameters, inputs, from }: Run, row: number): StepArguments {
  return { state: path.table.subarray(row * width, (row + 1) * width), parameters, inputs, t: from + row };
}

interface End {
  readonly rows: number;
  readonly stop: TrajectoryStop;
}

/** Where a value leaves the finite range the path ends one row before; where it leaves its bounds, with that row. */
function endOf(run: Run): End {
  const { rule, path, from, width, periods } = run;
  const end = path.reached.find(({ absorbed }) => !absorbed);
  if (end === undefined) return { rows: periods + 1, stop: { kind: "complete" } };
  const { row, state, value } = end;
  const period = from + row;
  if (!Number.isFinite(value)) {
    const failure = row === 0 ? undefined : explainFailure(rule, placeAt(run, row - 1));
    const cause = failure === undefined ? "" : `: ${failure.reason}`;
    const reason = `The rule leaves the finite range at ${periodWords(run.axis, period)}${cause}.`;
    return { rows: row, stop: { kind: "left-finite-range", period, reason } };
  }
  path.table[row * width + state] = value;
  const name = rule.states[state]!;
  const [low, high] = rule.bounds[name]!;
  const reason = `${name} leaves its bounds ${low} to ${high} at ${periodWords(run.axis, period)}, with ${value}; further values would mean nothing.`;
  return { rows: row + 1, stop: { kind: "left-bounds", period, reason } };
}

function absorptionsOf({ rule, path, from, width }: Run): readonly Absorption[] {
  const found = path.reached.filter(({ absorbed }) => absorbed);
  return found.map(({ row, state }) => ({
    state: rule.states[state]!,
    period: from + row,
    bound: path.table[row * width + state]!,
  }));
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
 * @returns the values by state [periods + 1], and why the path ends: it stops before a value that is not finite, and
 *   with one beyond a bound that does not absorb.
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
  const own = { initial, parameters, inputs, from, periods };
  const path = boundedPath(compileRule(rule), stateBounds(rule), own);
  const run: Run = { ...own, rule, axis, width: initial.length, path };
  const { rows, stop } = endOf(run);
  const column = (slot: number): Float64Array =>
    Float64Array.from({ length: rows }, (_, row) => path.table[row * run.width + slot]!);
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
    absorbed: absorptionsOf(run),
  };
}
