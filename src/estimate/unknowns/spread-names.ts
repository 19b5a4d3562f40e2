import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";

/** The spreads that a state-space fit finds: process errors, then observation errors unless they are given. */
export function spreadNames(rule: Rule, options: FitOptions): readonly string[] {
  const named = (what: string, state: string): string =>
    rule.states.length === 1 ? what : `${what} of ${state}`;
  const process = rule.states.map((state) => named("process error", state));
  const known = options.sd !== undefined;
  return [...process, ...(known ? [] : rule.states.map((state) => named("observation error", state)))];
}
