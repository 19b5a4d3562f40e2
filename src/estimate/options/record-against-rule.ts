import type { Warning } from "../../numeric/index.js";
import type { Observations } from "../../record/index.js";
import { type Rule, unitClash } from "../../rule/index.js";
import { unitScaleError } from "../errors.js";
import type { FitOptions } from "./fit-options.js";

/**
 * Units of the states where record and rule state different ones. A record that reads a state up to a factor has a unit
 * of its own.
 *
 * @throws {ModelError} `unit-scales-differ` where one counts in multiples of the other: every estimate in that unit
 *   would be off by a known factor.
 */
export function unitWarnings(
  rule: Rule,
  { states }: Observations,
  { factor = {} }: Pick<FitOptions, "factor">,
): readonly Warning[] {
  return states.flatMap(({ name, column, unit }): Warning[] => {
    const stated = rule.units[name] ?? "";
    const clash = Object.hasOwn(factor, name) ? undefined : unitClash(unit, stated);
    if (clash === undefined) return [];
    if (clash !== "kind") throw unitScaleError(name, column, unit, stated, clash);
    return [
      {
        code: "units-disagree",
        message:
          `The record gives "${column}" in ${unit}, and the rule states ${stated} for ${name}. If both are one unit, ` +
          `write it alike: \`units: { ${name}: "${unit}" }\` with the rule, or \`unit: "${stated}"\` in observations(...). ` +
          "If not, convert the column first.",
      },
    ];
  });
}

/** That a state was fitted to a column of another name, which nobody chose: both were the only one. */
export function matchNotes(rule: Rule, { states }: Observations): readonly string[] {
  const [only] = states;
  const [state] = rule.states;
  if (only === undefined || state === undefined || rule.states.length > 1) return [];
  if (states.some(({ name }) => name === state)) return [];
  return [
    `${state} of the rule is fitted to the column "${only.column}", the only one of the record; to say so yourself, write \`values: { ${state}: "${only.column}" }\` in observations(...).`,
  ];
}
