import type { ObservedGroup } from "../../record/index.js";
import type { CompiledRule, Rule } from "../../rule/index.js";
import { type FitOptions, onLogScale } from "../options/fit-options.js";
import type { RecordedSteps } from "../systems/one-step-system.js";
import { slotsOf } from "../unknowns/slots.js";
import { place, type Unknowns } from "../unknowns/unknowns.js";
import type { FitRows } from "./fit-rows.js";
import { inputsByPeriod } from "./inputs-by-period.js";
import { recordedPairs } from "./recorded-pairs.js";
import { rootWeight, valueTable } from "./value-table.js";

/** The pairs of a group as rows, and laid out for generated sums where every pair is one step apart. */
export interface OneStepRows {
  readonly rows: FitRows;
  readonly steps: RecordedSteps | undefined;
}

/**
 * The rule is started afresh at every recorded value and compared with the next one; over a gap of k periods it is
 * iterated k times. This blames the process: each step has its own error.
 */
export function oneStepRows(
  rule: Rule,
  compiled: CompiledRule,
  group: ObservedGroup,
  unknowns: Unknowns,
  options: FitOptions,
): OneStepRows {
  const { from, to, spans, sources } = recordedPairs(rule, group);
  const slots = slotsOf(rule);
  const slotStates = Int32Array.from(slots, ({ state }) => rule.states.indexOf(state));
  const states = rule.states.length;
  const width = rule.parameters.length + slots.length;
  const longest = spans.reduce((most, span) => Math.max(most, span), 1);
  const path = new Float64Array((longest + 1) * slots.length);
  const sensitivities = new Float64Array((longest + 1) * slots.length * width);
  const values = valueTable(rule, group);
  const cells = comparedCells(to, states, values);
  const entries = Int32Array.from(cells, ({ pair }) => to[pair]!);
  const cellStates = Int32Array.from(cells, ({ state }) => state);
  const pairs = Int32Array.from(cells, ({ pair }) => pair);
  const observed = Float64Array.from(cells, ({ pair, state }) => values[to[pair]! * states + state]!);
  const roots = Float64Array.from(cells, ({ pair, state }) =>
    rootWeight(group, rule.states[state]!, to[pair]!, options.sd),
  );
  const start = new Float64Array(slots.length);
  const { columns, parameters } = unknowns;
  const size = columns.length;
  const row = new Float64Array(size);
  const inputs = inputsByPeriod(rule, group);
  const log = onLogScale(options);
  let withRows = false;
  let fitted = 0;
  let ran = -1;
  const steps = longest === 1 ? emptySteps(from, group, slots.length, inputs) : undefined;
  const layOut = (): void => {
    if (steps === undefined) return;
    for (let k = 0; k < sources.length; k++)
      steps.from[k] = values[sources[k]! * states + slotStates[k % slots.length]!]!;
    for (let i = 0; i < observed.length; i++) {
      const place = pairs[i]! * slots.length + cellStates[i]!;
      steps.weights[place] = roots[i]!;
      steps.observed[place] = log ? Math.log(observed[i]!) : observed[i]!;
    }
  };
  layOut();
  const run = (pair: number): void => {
    ran = pair;
    for (let s = 0; s < start.length; s++)
      start[s] = values[sources[pair * start.length + s]! * states + slotStates[s]!]!;
    const period = group.index[from[pair]!]!;
    if (withRows)
      compiled.pathWithSensitivities(start, parameters, inputs, period, spans[pair]!, path, sensitivities);
    else compiled.path(start, parameters, inputs, period, spans[pair]!, path);
  };
  const rows: FitRows = {
    size,
    count: cells.length,
    row,
    entries,
    states: cellStates,
    observed,
    roots,
    take(given) {
      values.set(given);
      for (let i = 0; i < observed.length; i++) observed[i] = given[entries[i]! * states + cellStates[i]!]!;
      layOut();
    },
    prepare(at, needRows) {
      place(unknowns, at);
      withRows = needRows;
      ran = -1;
    },
    residualAt(i) {
      const pair = pairs[i]!;
      if (pair !== ran) run(pair);
      const cell = spans[pair]! * slots.length + cellStates[i]!;
      fitted = path[cell]!;
      if (withRows) {
        const scale = -roots[i]! / (log ? fitted : 1);
        for (let a = 0; a < size; a++) row[a] = scale * sensitivities[cell * width + columns[a]!]!;
      }
      return roots[i]! * (log ? Math.log(observed[i]!) - Math.log(fitted) : observed[i]! - fitted);
    },
    fitted: () => fitted,
  };
  return { rows, steps };
}

function emptySteps(
  from: Int32Array,
  group: ObservedGroup,
  slots: number,
  inputs: readonly Float64Array[],
): RecordedSteps {
  const table = (): Float64Array => new Float64Array(from.length * slots);
  const periods = from.map((entry) => group.index[entry]!);
  return { inputs, periods, from: table(), observed: table(), weights: table() };
}

/** The recorded values at the ends of pairs. */
function comparedCells(
  to: Int32Array,
  states: number,
  values: Float64Array,
): readonly { readonly pair: number; readonly state: number }[] {
  return Array.from({ length: to.length * states }, (_, k) => ({
    pair: Math.floor(k / states),
    state: k % states,
  })).filter(({ pair, state }) => !Number.isNaN(values[to[pair]! * states + state]!));
}
