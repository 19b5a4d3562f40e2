import type { CompiledRule, Rule } from "../rule/index.js";

/** By slot, what a run of a rule needs. */
export interface Ground {
  readonly rule: Rule;
  readonly compiled: CompiledRule;
  readonly parameters: Float64Array;
  /** The state vector at `from`, past values included. */
  readonly initial: Float64Array;
  /** One column an input, by absolute period. */
  readonly inputs: readonly Float64Array[];
  /** Absolute period of the first value. */
  readonly from: number;
  readonly periods: number;
}

/** The path without random change. */
export interface CentralPath {
  /** [states][periods + 1]; NaN from where it leaves its range. */
  readonly values: readonly (readonly number[])[];
  /** Row at which a state first leaves its range, and the value it would have had. */
  readonly stop: { readonly row: number; readonly state: string; readonly value: number } | undefined;
}

/** Lowest and highest value that each state may take. */
export function stateLimits(rule: Rule): readonly (readonly [number, number])[] {
  return rule.states.map(
    (state) => rule.bounds[state] ?? [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY],
  );
}

/** Runs the rule once, up to where it leaves its range. */
export function centralPath(ground: Ground): CentralPath {
  const { rule, compiled, periods } = ground;
  const width = ground.initial.length;
  const table = new Float64Array((periods + 1) * width);
  compiled.path(ground.initial, ground.parameters, ground.inputs, ground.from, periods, table);
  const limits = stateLimits(rule);
  const rows = periods + 1;
  const bad = (row: number): number =>
    rule.states.findIndex((_, s) => {
      const value = table[row * width + s]!;
      return !(Number.isFinite(value) && value >= limits[s]![0] && value <= limits[s]![1]);
    });
  let row = 0;
  while (row < rows && bad(row) < 0) row++;
  const stop =
    row === rows ? undefined : { row, state: rule.states[bad(row)]!, value: table[row * width + bad(row)]! };
  return {
    values: rule.states.map((_, s) =>
      Array.from({ length: rows }, (__, t) => (t < row ? table[t * width + s]! : Number.NaN)),
    ),
    stop,
  };
}
