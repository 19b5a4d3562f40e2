import type { ObservedGroup } from "../record/index.js";
import type { CompiledRule, Rule } from "../rule/index.js";
import type { Spread } from "./fit-options.js";
import { inputsByPeriod } from "./inputs-by-period.js";
import type { ResidualRows } from "./residual-rows.js";
import { place, type Unknowns } from "./unknowns.js";

/**
 * Residuals of a whole trajectory: the rule is run from its initial state and read where the record has a value.
 * This blames the observation: an early error does not carry on.
 */
export function trajectoryRows(
  rule: Rule,
  compiled: CompiledRule,
  group: ObservedGroup,
  unknowns: Unknowns,
  spread: Spread,
): ResidualRows {
  const states = rule.states.length;
  const width = rule.constants.length + states;
  const periods = group.index[group.index.length - 1]!;
  const values = new Float64Array((periods + 1) * states);
  const sensitivities = new Float64Array((periods + 1) * states * width);
  const { place: places, observed } = observedPlaces(rule, group, spread);
  const { columns, constants, initial } = unknowns;
  const size = columns.length;
  const row = new Float64Array(size);
  const inputs = inputsByPeriod(rule, group);
  const log = spread === "proportional";
  let withRows = false;
  let fitted = 0;
  return {
    size,
    count: observed.length,
    row,
    prepare(at, needRows) {
      place(unknowns, at);
      withRows = needRows;
      if (needRows)
        compiled.pathWithSensitivities(initial, constants, inputs, 0, periods, values, sensitivities);
      else compiled.path(initial, constants, inputs, 0, periods, values);
    },
    residualAt(i) {
      const cell = places[i]!;
      fitted = values[cell]!;
      if (withRows) {
        const weight = log ? -1 / fitted : -1;
        const base = cell * width;
        for (let a = 0; a < size; a++) row[a] = weight * sensitivities[base + columns[a]!]!;
      }
      return observed[i]! - (log ? Math.log(fitted) : fitted);
    },
    fitted: () => fitted,
  };
}

/** Where in a path [periods + 1, states] each observed value stands, and the value on the fitting scale. */
function observedPlaces(
  rule: Rule,
  group: ObservedGroup,
  spread: Spread,
): { place: Int32Array; observed: Float64Array } {
  const places: number[] = [];
  const observed: number[] = [];
  group.index.forEach((period, i) => {
    rule.states.forEach((state, s) => {
      const value = group.values[state]?.[i];
      if (value === undefined || Number.isNaN(value)) return;
      places.push(period * rule.states.length + s);
      observed.push(spread === "proportional" ? Math.log(value) : value);
    });
  });
  return { place: Int32Array.from(places), observed: Float64Array.from(observed) };
}
