import { boundedPath, type PathRun } from "../dynamics/index.js";
import { type CompiledRule, quantitiesAt, type Rule, stateBounds } from "../rule/index.js";
import type { KeptPaths } from "./first-passage.js";

/** By slot, what a run of a rule needs. */
export interface Ground {
  readonly rule: Rule;
  readonly compiled: CompiledRule;
  readonly parameters: Float64Array;
  /** Other parameters that hold from a row on. */
  readonly ahead?: PathRun["ahead"];
  /** The state vector at `from`, past values included. */
  readonly initial: Float64Array;
  /** What each place of that vector is called, as in "N[0]"; empty where the path begins later than the record. */
  readonly startNames: readonly string[];
  /** First recorded values by such names, where the path begins later. */
  readonly firstValues: Readonly<Record<string, number>>;
  /** One column an input, by absolute period. */
  readonly inputs: readonly Float64Array[];
  /** Absolute period of the first value. */
  readonly from: number;
  readonly periods: number;
  /** Row of the present: what is ahead begins one row later. */
  readonly present: number;
}

/** The path without random change. */
export interface CentralPath {
  /** [states][periods + 1]; NaN from where the path ends. */
  readonly values: readonly (readonly number[])[];
  /** By state and then by quantity, as a single kept path. */
  readonly kept: readonly KeptPaths[];
  /** Row at which a state leaves its range, and the value it would have had. */
  readonly stop: { readonly row: number; readonly state: string; readonly value: number } | undefined;
  /** States that pass a bound and stay there: from which row, and at what. */
  readonly absorbed: readonly { readonly row: number; readonly state: string; readonly bound: number }[];
}

/** Runs the rule once, up to where it leaves its range. */
export function centralPath(ground: Ground): CentralPath {
  const { rule, compiled, periods, initial, parameters, inputs, from } = ground;
  const width = initial.length;
  const { table, rows, reached } = boundedPath(compiled, stateBounds(rule), ground);
  const length = periods + 1;
  const column = (s: number): Float64Array =>
    Float64Array.from({ length }, (_, row) => (row < rows ? table[row * width + s]! : Number.NaN));
  const values = rule.states.map((_, s) => column(s));
  const inside = rule.quantities.map(() => new Float64Array(length).fill(Number.NaN));
  const at = quantitiesAt(rule);
  for (let row = 1; row < rows && inside.length > 0; row++) {
    const holding =
      ground.ahead !== undefined && row > ground.ahead.row ? ground.ahead.parameters : parameters;
    const state = table.subarray((row - 1) * width, row * width);
    at({ state, parameters: holding, inputs, t: from + row - 1 }).forEach((value, q) => {
      inside[q]![row] = value;
    });
  }
  const end = reached.find(({ absorbed }) => !absorbed);
  const passedBy = (s: number): KeptPaths["passed"] => {
    // Where the path ends, the other states have a value of that row too.
    const own =
      reached.find(({ state }) => state === s) ?? (end && { ...end, value: table[end.row * width + s]! });
    return own && { row: Int32Array.of(own.row), value: Float64Array.of(own.value) };
  };
  return {
    values: values.map((each) => Array.from(each)),
    kept: [
      ...values.map((each, s) => ({ paths: 1, rows: length, values: each, passed: passedBy(s) })),
      ...inside.map((each) => ({ paths: 1, rows: length, values: each })),
    ],
    stop: end && { row: end.row, state: rule.states[end.state]!, value: end.value },
    absorbed: reached.flatMap(({ absorbed, row, state }) =>
      absorbed ? [{ row, state: rule.states[state]!, bound: table[row * width + state]! }] : [],
    ),
  };
}
