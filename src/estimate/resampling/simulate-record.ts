import type { RandomStream } from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import { compileRule, type Rule } from "../../rule/index.js";
import { type FitOptions, onLogScale } from "../options/fit-options.js";
import type { FitRows } from "../rows/fit-rows.js";
import { inputsByPeriod } from "../rows/inputs-by-period.js";
import { recordedPairs } from "../rows/recorded-pairs.js";
import { valueTable } from "../rows/value-table.js";
import { slotsOf } from "../unknowns/slots.js";
import { place, type Unknowns } from "../unknowns/unknowns.js";

/** Writes a record as the fitted rule could have given it: values [rows of the group, states], own unit. */
export type RecordMaker = (at: Float64Array, errors: Float64Array) => Float64Array;

/**
 * Makes records that a fit could have come from. `errors` [values compared] are on the fitting scale, already divided by
 * the roots of the weights. With errors in the observation they are put on the fitted trajectory; with errors in the
 * process every step starts from the value made before it, so that an error carries on.
 */
export function recordMaker(
  rule: Rule,
  group: ObservedGroup,
  unknowns: Unknowns,
  rows: FitRows,
  options: FitOptions,
): RecordMaker {
  const table = valueTable(rule, group);
  const states = rule.states.length;
  const disturbed = onLogScale(options)
    ? (value: number, error: number): number => value * Math.exp(error)
    : (value: number, error: number): number => value + error;
  if (options.errors === "observation")
    return (at, errors) => {
      const made = table.slice();
      rows.prepare(at, false);
      for (let i = 0; i < rows.count; i++) {
        rows.residualAt(i);
        made[rows.entries[i]! * states + rows.states[i]!] = disturbed(rows.fitted(), errors[i]!);
      }
      return made;
    };
  return stepByStep(rule, group, unknowns, rows, table, disturbed);
}

function stepByStep(
  rule: Rule,
  group: ObservedGroup,
  unknowns: Unknowns,
  rows: FitRows,
  table: Float64Array,
  disturbed: (value: number, error: number) => number,
): RecordMaker {
  const compiled = compileRule(rule);
  const inputs = inputsByPeriod(rule, group);
  const { from, to, spans, sources } = recordedPairs(rule, group);
  const slots = slotsOf(rule);
  const slotStates = slots.map(({ state }) => rule.states.indexOf(state));
  const states = rule.states.length;
  const cellOf = new Map(Array.from(rows.entries, (entry, i) => [entry * states + rows.states[i]!, i]));
  const start = new Float64Array(slots.length);
  const longest = spans.reduce((most, span) => Math.max(most, span), 1);
  const path = new Float64Array((longest + 1) * slots.length);
  return (at, errors) => {
    place(unknowns, at);
    const made = table.slice();
    for (let pair = 0; pair < to.length; pair++) {
      for (let s = 0; s < slots.length; s++)
        start[s] = made[sources[pair * slots.length + s]! * states + slotStates[s]!]!;
      compiled.path(start, unknowns.parameters, inputs, group.index[from[pair]!]!, spans[pair]!, path);
      for (let s = 0; s < states; s++) {
        const place = to[pair]! * states + s;
        const i = cellOf.get(place);
        if (i !== undefined) made[place] = disturbed(path[spans[pair]! * slots.length + s]!, errors[i]!);
      }
    }
    return made;
  };
}

/** Errors of a fit drawn anew, [values compared], on the fitting scale. */
export type ErrorDraw = (stream: RandomStream) => Float64Array;

/** Normal errors of standard deviation sigma. */
export function normalErrors(rows: FitRows, sigma: number): ErrorDraw {
  return (stream) =>
    Float64Array.from({ length: rows.count }, (_, i) => (sigma * stream.normal()) / rows.roots[i]!);
}

/**
 * The fit's own residuals, widened by sqrt(n / (n - p)) and drawn with replacement in runs of `block` neighbours, which
 * keep the dependence of neighbours; a block of 1 draws them one by one.
 */
export function drawnResiduals(rows: FitRows, residuals: Float64Array, block: number): ErrorDraw {
  const { count, size, roots } = rows;
  const widened = Math.sqrt(count / (count - size));
  const length = Math.min(Math.max(1, Math.round(block)), count);
  return (stream) => {
    const drawn = new Float64Array(count);
    for (let i = 0; i < count; i += length) {
      const first = Math.floor(stream.uniform() * (count - length + 1));
      for (let k = 0; k < length && i + k < count; k++)
        drawn[i + k] = (widened * residuals[first + k]!) / roots[i + k]!;
    }
    return drawn;
  };
}
