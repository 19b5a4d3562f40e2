import type { ObservedGroup } from "../../record/index.js";
import type { CompiledRule, Rule } from "../../rule/index.js";
import { type FitOptions, onLogScale } from "../options/fit-options.js";
import type { RecordedSteps } from "../systems/one-step-system.js";
import { slotsOf } from "../unknowns/slots.js";
import { place, type Unknowns } from "../unknowns/unknowns.js";
import type { FitRows } from "./fit-rows.js";
import { gapCovariance } from "./gap-errors.js";
import { gapWeights } from "./gap-weights.js";
import { inputsByPeriod } from "./inputs-by-period.js";
import { recordedPairs } from "./recorded-pairs.js";
import { steppedCells } from "./stepped-cells.js";
import { rootWeight, valueTable } from "./value-table.js";

const none = new Float64Array(0);

/** The pairs of a group as rows, and laid out for generated sums where every pair is one step apart. */
export interface OneStepRows {
  readonly rows: FitRows;
  readonly steps: RecordedSteps | undefined;
}

/**
 * The rule is started afresh at every recorded value and compared with the next one. The error lies in the process: each
 * step has its own. Over a gap of k periods the rule is iterated k times, and the value weighs less as the errors of the
 * k steps add up; of several values reached from the same row each is compared with what the rule and those before it
 * lead one to expect.
 */
export function oneStepRows(
  rule: Rule,
  compiled: CompiledRule,
  group: ObservedGroup,
  unknowns: Unknowns,
  options: FitOptions,
): OneStepRows {
  const pairs = recordedPairs(rule, group);
  const slots = slotsOf(rule);
  const slotStates = Int32Array.from(slots, ({ state }) => rule.states.indexOf(state));
  const states = rule.states.length;
  const values = valueTable(rule, group);
  const cells = steppedCells(pairs, states, values);
  const { entries, spans, origins, firsts, longest } = cells;
  const observed = Float64Array.from(entries, (entry, i) => values[entry * states + cells.states[i]!]!);
  const roots = Float64Array.from(entries, (entry, i) =>
    rootWeight(group, rule.states[cells.states[i]!]!, entry, options.sd),
  );
  const { columns, parameters } = unknowns;
  const size = columns.length;
  const row = new Float64Array(size);
  const inputs = inputsByPeriod(rule, group);
  const log = onLogScale(options);
  const steps = longest === 1 ? emptySteps(pairs.from, group, slots.length, inputs) : undefined;
  const layOut = (): void => {
    if (steps === undefined) return;
    for (let k = 0; k < pairs.sources.length; k++)
      steps.from[k] = values[pairs.sources[k]! * states + slotStates[k % slots.length]!]!;
    for (let i = 0; i < observed.length; i++) {
      const place = origins[i]! * slots.length + cells.states[i]!;
      steps.weights[place] = roots[i]!;
      steps.observed[place] = log ? Math.log(observed[i]!) : observed[i]!;
    }
  };
  layOut();
  const start = new Float64Array(slots.length);
  const begin = (pair: number): number => {
    for (let s = 0; s < start.length; s++)
      start[s] = values[pairs.sources[pair * start.length + s]! * states + slotStates[s]!]!;
    return group.index[pairs.from[pair]!]!;
  };
  const width = rule.parameters.length + slots.length;
  const path = new Float64Array((longest + 1) * slots.length);
  const sensitivities = new Float64Array((longest + 1) * slots.length * width);
  let withRows = false;
  let ran = -1;
  const run = (i: number): void => {
    ran = origins[i]!;
    const period = begin(ran);
    const far = cells.reaches[i]!;
    if (withRows) compiled.pathWithSensitivities(start, parameters, inputs, period, far, path, sensitivities);
    else compiled.path(start, parameters, inputs, period, far, path);
  };
  /** The error of value i by itself; its derivatives are added to the row, times a share. */
  const errorOf = (i: number, share: number): number => {
    const cell = spans[i]! * slots.length + cells.states[i]!;
    const reached = path[cell]!;
    if (withRows) {
      const scale = -share / (log ? reached : 1);
      for (let a = 0; a < size; a++) row[a] = row[a]! + scale * sensitivities[cell * width + columns[a]!]!;
    }
    return log ? Math.log(observed[i]!) - Math.log(reached) : observed[i]! - reached;
  };
  const weights = gapWeights(cells, roots, options);
  /** What the values reached from the same row before value i lead one to expect of its error. */
  const expectedOf = (i: number): number => {
    const shares = weights?.shares[i] ?? none;
    let expected = 0;
    for (let j = 0; j < shares.length; j++)
      expected += shares[j]! * errorOf(firsts[i]! + j, -roots[i]! * shares[j]!);
    return expected;
  };
  let fitted = 0;
  const rows: FitRows = {
    size,
    count: entries.length,
    row,
    entries,
    states: cells.states,
    observed,
    roots,
    take(given) {
      values.set(given);
      for (let i = 0; i < observed.length; i++) observed[i] = given[entries[i]! * states + cells.states[i]!]!;
      ran = -1;
      layOut();
    },
    put(i, value) {
      values[entries[i]! * states + cells.states[i]!] = value;
      observed[i] = value;
    },
    prepare(at, needRows) {
      place(unknowns, at);
      withRows = needRows;
      ran = -1;
    },
    residualAt(i) {
      if (origins[i] !== ran) run(i);
      row.fill(0);
      const expected = expectedOf(i);
      const error = errorOf(i, roots[i]!) - expected;
      const reached = path[spans[i]! * slots.length + cells.states[i]!]!;
      fitted = log ? reached * Math.exp(expected) : reached + expected;
      return roots[i]! * error;
    },
    fitted: () => fitted,
  };
  if (weights === undefined) return { rows, steps };
  const covarianceOf = gapCovariance(rule, compiled, log);
  const reweigh = (at: Float64Array): boolean => {
    place(unknowns, at);
    return weights.weigh((origin, reached) =>
      covarianceOf(parameters, inputs, start, begin(origin), reached),
    );
  };
  return { rows: { ...rows, reweigh }, steps };
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
