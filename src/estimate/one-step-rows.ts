import type { ObservedGroup } from "../record/index.js";
import type { CompiledRule, Rule } from "../rule/index.js";
import type { Spread } from "./fit-options.js";
import { inputsByPeriod } from "./inputs-by-period.js";
import type { ResidualRows } from "./residual-rows.js";
import { place, type Unknowns } from "./unknowns.js";

/**
 * Residuals of single steps: the rule is started afresh at every recorded value and compared with the next
 * one; over a gap of k periods it is iterated k times. This blames the process: each step has its own error.
 */
export function oneStepRows(
  rule: Rule,
  compiled: CompiledRule,
  group: ObservedGroup,
  unknowns: Unknowns,
  spread: Spread,
): ResidualRows {
  const states = rule.states.length;
  const width = rule.constants.length + states;
  const pairs = group.index.length - 1;
  let longest = 1;
  for (let i = 0; i < pairs; i++) longest = Math.max(longest, group.index[i + 1]! - group.index[i]!);
  const values = new Float64Array((longest + 1) * states);
  const sensitivities = new Float64Array((longest + 1) * states * width);
  const observed = rule.states.map((state) => group.values[state]!);
  const from = new Float64Array(states);
  const { columns, constants } = unknowns;
  const size = columns.length;
  const row = new Float64Array(size);
  const inputs = inputsByPeriod(rule, group);
  const log = spread === "proportional";
  let withRows = false;
  let fitted = 0;
  /** Runs the rule over pair number `pair`; gives the row of the path where the next value stands. */
  const run = (pair: number): number => {
    const period = group.index[pair]!;
    const span = group.index[pair + 1]! - period;
    for (let s = 0; s < states; s++) from[s] = observed[s]![pair]!;
    if (withRows)
      compiled.pathWithSensitivities(from, constants, inputs, period, span, values, sensitivities);
    else compiled.path(from, constants, inputs, period, span, values);
    return span;
  };
  let span = 0;
  return {
    size,
    count: pairs * states,
    row,
    prepare(at, needRows) {
      place(unknowns, at);
      withRows = needRows;
    },
    residualAt(i) {
      const state = i % states;
      const pair = (i - state) / states;
      if (state === 0) span = run(pair);
      const cell = span * states + state;
      fitted = values[cell]!;
      const weight = log ? -1 / fitted : -1;
      if (withRows)
        for (let a = 0; a < size; a++) row[a] = weight * sensitivities[cell * width + columns[a]!]!;
      const next = observed[state]![pair + 1]!;
      return log ? Math.log(next) - Math.log(fitted) : next - fitted;
    },
    fitted: () => fitted,
  };
}
