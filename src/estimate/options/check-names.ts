import type { Rule } from "../../rule/index.js";
import { startOutsideBoundsError, unknownNameError } from "../errors.js";
import type { Slot } from "../unknowns/slots.js";
import type { FitOptions } from "./fit-options.js";

/** Refuses options that name what the rule does not have, and starts outside their bounds. */
export function checkNames(rule: Rule, options: FitOptions, slots: readonly Slot[]): void {
  const initials = slots.map(({ name }) => name);
  const factors = Object.values(options.factor ?? {});
  checkKnown(options.fixed, rule.parameters, "parameter");
  checkKnown(options.start, [...rule.parameters, ...initials, ...factors], "parameter or initial state");
  checkKnown(options.initial, rule.states, "state");
  checkKnown(options.factor, rule.states, "state");
  checkKnown(
    options.bounds,
    [...rule.parameters, ...rule.states, ...initials, ...factors],
    "parameter or initial state",
  );
  for (const [name, value] of Object.entries(options.start ?? {})) {
    const limit = options.bounds?.[name] ?? rule.bounds[name];
    if (limit && (value < limit[0] || value > limit[1])) throw startOutsideBoundsError(name, value, limit);
  }
}

function checkKnown(given: object | undefined, known: readonly string[], role: string): void {
  for (const name of Object.keys(given ?? {}))
    if (!known.includes(name)) throw unknownNameError(name, known, role);
}
