import { makeRule } from "./make-rule.js";
import type { RecurrenceOptions } from "./recurrence-options.js";
import type { Rule } from "./rule.js";

/**
 * Reads a rule (a recurrence) from text: one line per equation, in the order of events within the period.
 *
 * `N[t+1] = ...` sets the next value of a state, `ΔN = ...` or `change(N) = ...` its change, and `q = ...` a
 * quantity within the period. `N` is the present value, `N[t-2]` a past one, `t` the period index. Every other name
 * is a parameter, unless `parameters` or `inputs` say otherwise.
 *
 * Operators: + - * / ^ < <= > >= == != and or not. Functions: exp(x), log(x) (natural), log10(x), sqrt(x), abs(x),
 * sign(x), min(a, b, ...), max(a, b, ...), floor(x), ceil(x), round(x, decimals), mod(x, m), sin(x), cos(x), tan(x),
 * asin(x), if(condition, a, b). `ruleLanguage()` lists them with their meaning.
 *
 * @param text - the lines; `#` begins a comment.
 * @param options - inputs, units, bounds, starting values, fixed values, initial states, noise.
 * @returns a frozen plain object; `compileRule` runs it.
 * @throws {ModelError} with a code for each kind of mistake, and `facts.start` and `facts.end`, UTF-16
 *   offsets into `facts.text`, which is the normalised text.
 * @example recurrence("ΔN = r*N*(1 - N/K)").parameters; // ["r", "K"]
 */
export function recurrence(text: string, options: RecurrenceOptions = {}): Rule {
  return makeRule(text, options);
}
