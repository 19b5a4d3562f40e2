import { formula, type Rule } from "../../rule/index.js";
import { outsideRange } from "../refusals.js";

/** Values by name as the formulas of the catalogue read them: parameters, and N0 for the first value of N. */
export function namedValues(
  rule: Rule,
  parameters: Float64Array,
  initial: Float64Array | undefined,
): Readonly<Record<string, number>> {
  const own = rule.parameters.map((name, i) => [name, parameters[i]!] as const);
  const first = initial === undefined ? [] : rule.states.map((name, i) => [`${name}0`, initial[i]!] as const);
  return Object.fromEntries([...own, ...first]);
}

/** Refuses values outside the range in which a rule of the catalogue means what it says. */
export function refuseOutsideRange(rule: Rule, values: Readonly<Record<string, number>>): void {
  for (const text of rule.named?.validWhen ?? []) {
    const condition = formula(text, "condition");
    // A condition on an input, or on a first value that is not given, is not judged here.
    if (!condition.names.every((name) => Object.hasOwn(values, name))) continue;
    if (condition.at(values) === 1) continue;
    const given = condition.names.map((name) => `${name} = ${values[name]}`).join(", ");
    throw outsideRange(rule.named!.title, text, given);
  }
}
