import {
  rules as namedRules,
  type RecurrenceOptions,
  type Rule,
  type RuleCatalogue,
  recurrence as readRule,
} from "../../src/rule/index.js";
import { checkCall } from "../options/index.js";
import { showing } from "../tables/index.js";
import { catalogueTable } from "./catalogue-table.js";
import { presentRule } from "./show-rule.js";
import { shownTogether } from "./shown-together.js";

export type { RecurrenceOptions, Rule, RuleCatalogue } from "../../src/rule/index.js";

/**
 * Reads a rule of change from text, one line a quantity in the order of events; the result shows its lines, its
 * names with their roles and units, and whatever was found.
 *
 * @throws {ModelError} with the place in the text and the nearest names.
 * @example recurrence("ΔN = r*N*(1 - N/K)").parameters; // ["r", "K"]
 */
export function recurrence(text: string, options: RecurrenceOptions = {}): Rule {
  checkCall("recurrence", arguments);
  return presentRule(readRule(text, options));
}

/** Wraps one maker of the catalogue: its options are checked, and its rule shows itself. */
const presented =
  <Options extends readonly unknown[]>(name: string, make: (...options: Options) => Rule) =>
  (...options: Options): Rule => {
    checkCall(`rules.${name}`, options);
    return presentRule(make(...options));
  };

/**
 * The catalogue: rules that have a name. Each is called for its rule, which shows its range, rest levels, slopes,
 * closed form, source and remarks; the catalogue itself shows its rules as a table.
 *
 * @example rules.bevertonHolt().parameters; // ["R", "K"]
 */
export const rules: RuleCatalogue = showing(
  // Every maker keeps its own options: only what it gives is wrapped.
  Object.fromEntries(
    Object.entries(namedRules).map(([name, make]) => [
      name,
      presented(name, make as (options?: never) => Rule),
    ]),
  ) as unknown as RuleCatalogue,
  () => shownTogether([catalogueTable()]),
);
