import { freezeDeep } from "../../numeric/index.js";
import { makeRule } from "../make-rule.js";
import type { RecurrenceOptions } from "../recurrence-options.js";
import type { Rule } from "../rule.js";
import type { CatalogueEntry } from "./named-rule.js";

/** Options of a catalogue rule; its text and parameters are given. */
export type NamedRuleOptions = Omit<RecurrenceOptions, "parameters">;

/** Units of all names, derived from the unit of the first state: with cells/mL, "1/level" becomes "mL/cells". */
function unitsFromState(
  entry: CatalogueEntry,
  given: Readonly<Record<string, string>>,
): Record<string, string> {
  const states = Object.keys(entry.quantities);
  const level = given[states[0]!];
  if (level === undefined) return { ...given };
  const inverse = level.includes("/") ? level.split("/").reverse().join("/") : `1/${level}`;
  const derived = Object.entries(entry.quantities).map(([name, { unit }]) => [
    name,
    unit.replace("1/level", inverse).replace("level", level),
  ]);
  return { ...Object.fromEntries(derived), ...given };
}

/** Makes the rule of a catalogue entry; options override the entry. */
export function catalogueRule(entry: CatalogueEntry, options: NamedRuleOptions = {}): Rule {
  const { text, inputs = [], bounds = {}, start = {}, ...about } = entry;
  const allInputs = [...new Set([...inputs, ...(options.inputs ?? [])])];
  const free = <T>(record: Readonly<Record<string, T>>): Record<string, T> =>
    Object.fromEntries(Object.entries(record).filter(([name]) => !allInputs.includes(name)));
  const full: RecurrenceOptions = {
    ...options,
    inputs: allInputs,
    units: unitsFromState(entry, options.units ?? {}),
    bounds: { ...free(bounds), ...options.bounds },
    start: { ...free(start), ...options.start },
  };
  return makeRule(text, full, freezeDeep(about));
}
