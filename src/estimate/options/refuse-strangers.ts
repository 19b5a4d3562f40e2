import type { Rule } from "../../rule/index.js";
import {
  refuseReversedBounds,
  refuseStartOutsideBounds,
  refuseTakenFactor,
  refuseUnknownName,
} from "../refusals.js";
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
  refuseReversed(options.bounds ?? {});
  refuseTakenNames(rule, options.factor ?? {}, initials);
  for (const [name, value] of Object.entries(options.start ?? {})) {
    const limit = options.bounds?.[name] ?? rule.bounds[name];
    if (limit && (value < limit[0] || value > limit[1])) throw refuseStartOutsideBounds(name, value, limit);
  }
}

function refuseReversed(bounds: Readonly<Record<string, readonly [number, number]>>): void {
  for (const [name, limits] of Object.entries(bounds))
    if (limits[0] > limits[1]) throw refuseReversedBounds(name, limits);
}

/** A factor is an unknown of its own, so its name stands for nothing else. */
function refuseTakenNames(
  rule: Rule,
  factor: Readonly<Record<string, string>>,
  initials: readonly string[],
): void {
  const taken = new Map<string, string>([
    ...rule.parameters.map((name) => [name, "a parameter of the rule"] as const),
    ...[...rule.states, ...initials].map((name) => [name, "a state of the rule"] as const),
    ...rule.inputs.map((name) => [name, "an input of the rule"] as const),
  ]);
  for (const [state, name] of Object.entries(factor)) {
    const role = taken.get(name);
    if (role !== undefined) throw refuseTakenFactor(state, name, role, freeName(`q_${state}`, taken));
    taken.set(name, "the factor of another state");
  }
}

function freeName(name: string, taken: ReadonlyMap<string, string>): string {
  return taken.has(name) ? freeName(`${name}_`, taken) : name;
}

function refuseOthers(given: object | undefined, known: readonly string[], role: string): void {
  for (const name of Object.keys(given ?? {}))
    if (!known.includes(name)) throw refuseUnknownName(name, known, role);
}
