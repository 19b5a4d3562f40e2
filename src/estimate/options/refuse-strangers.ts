import type { Rule } from "../../rule/index.js";
import { refuseStartOutsideBounds, refuseUnknownName } from "../refusals.js";
import type { Slot } from "../unknowns/slots.js";
import type { FitOptions } from "./fit-options.js";

/** Refuses options that name what the rule does not have, and starts outside their bounds. */
export function refuseStrangers(rule: Rule, options: FitOptions, slots: readonly Slot[]): void {
  const initials = slots.map(({ name }) => name);
  const factors = Object.values(options.factor ?? {});
  refuseOthers(options.fixed, rule.parameters, "parameter");
  refuseOthers(options.start, [...rule.parameters, ...initials, ...factors], "parameter or initial state");
  refuseOthers(options.initial, rule.states, "state");
  refuseOthers(options.factor, rule.states, "state");
  refuseOthers(
    options.bounds,
    [...rule.parameters, ...rule.states, ...initials, ...factors],
    "parameter or initial state",
  );
  for (const [name, value] of Object.entries(options.start ?? {})) {
    const limit = options.bounds?.[name] ?? rule.bounds[name];
    if (limit && (value < limit[0] || value > limit[1])) throw refuseStartOutsideBounds(name, value, limit);
  }
}

function refuseOthers(given: object | undefined, known: readonly string[], role: string): void {
  for (const name of Object.keys(given ?? {}))
    if (!known.includes(name)) throw refuseUnknownName(name, known, role);
}
