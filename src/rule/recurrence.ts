import { makeRule } from "./make-rule.js";
import type { RecurrenceOptions } from "./recurrence-options.js";
import type { Rule } from "./rule.js";

/**
 * Reads a rule of change from text: one line a quantity, in the order of events inside the period.
 *
 * `N[t+1] = ...` sets the next value of a state, `ΔN = ...` or `change(N) = ...` its change, and `q = ...` a
 * quantity inside the period. `N` is the present value, `N[t-2]` a past one, `t` the period index.
 *
 * @param text - the lines; `#` begins a comment. Signs: + - * / ^, comparison, and, or, not, and the functions
 *   of `ruleLanguage()`.
 * @param options - what the names are, their units, bounds, starts and fixed values.
 * @returns a frozen plain object; `compileRule` runs it.
 * @throws {ModelError} a kebab-case code for each kind of mistake, with `facts.start` and `facts.end`, UTF-16
 *   offsets into `facts.text`, which is the normalised text.
 * @example recurrence("ΔN = r*N*(1 - N/K)").parameters; // ["r", "K"]
 */
export function recurrence(text: string, options: RecurrenceOptions = {}): Rule {
  return makeRule(text, options);
}
