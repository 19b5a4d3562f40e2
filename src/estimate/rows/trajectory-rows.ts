import type { CompiledRule, Rule } from "../../rule/index.js";
import { place, type Unknowns } from "../unknowns/unknowns.js";
import type { FitRows } from "./fit-rows.js";
import type { RecordedPath } from "./recorded-path.js";

/**
 * The rule is run from its initial state and read where the record has a value. This blames the observation: an
 * early error does not carry on.
 */
export function trajectoryRows(
  rule: Rule,
  compiled: CompiledRule,
  unknowns: Unknowns,
  recorded: RecordedPath,
): FitRows {
  const { first, periods, inputs, places, entries, states, observed, roots, log } = recorded;
  const slots = unknowns.initial.length;
  const width = rule.parameters.length + slots;
  const values = new Float64Array((periods + 1) * slots);
  const sensitivities = new Float64Array((periods + 1) * slots * width);
  const { columns, parameters, initial, factors } = unknowns;
  const size = columns.length;
  const row = new Float64Array(size);
  let withRows = false;
  let fitted = 0;
  const fillRow = (i: number): void => {
    const cell = places[i]!;
    const state = states[i]!;
    const scale = -roots[i]! / (log ? fitted : 1);
    for (let a = 0; a < size; a++) {
      const column = columns[a]!;
      if (column < width) row[a] = scale * factors[state]! * sensitivities[cell * width + column]!;
      else row[a] = column === width + state ? scale * values[cell]! : 0;
    }
  };
  return {
    size,
    count: entries.length,
    row,
    entries,
    states,
    observed,
    roots,
    take: recorded.take,
    prepare(at, needRows) {
      place(unknowns, at);
      withRows = needRows;
      if (needRows)
        compiled.pathWithSensitivities(initial, parameters, inputs, first, periods, values, sensitivities);
      else compiled.path(initial, parameters, inputs, first, periods, values);
    },
    residualAt(i) {
      fitted = factors[states[i]!]! * values[places[i]!]!;
      if (withRows) fillRow(i);
      return roots[i]! * (log ? Math.log(observed[i]!) - Math.log(fitted) : observed[i]! - fitted);
    },
    fitted: () => fitted,
  };
}
