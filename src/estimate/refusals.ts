import { ModelError } from "../numeric/index.js";
import type { ObservedGroup } from "../record/index.js";

const named = (group: ObservedGroup): string => (group.name === "" ? "" : ` of "${group.name}"`);

export function refuseMissingErrors(): ModelError {
  return new ModelError(
    "errors-not-stated",
    'A fit states where it puts the error. Give { errors: "observation" } when the scatter lies in the reading, or ' +
      '{ errors: "process" } when it lies in the change itself, { errors: "both" } when neither can be left out.',
  );
}

export function refuseUnknownName(name: string, known: readonly string[], role: string): ModelError {
  return new ModelError(
    "unknown-name",
    `The rule has no ${role} "${name}". It has: ${known.join(", ") || "none"}.`,
    { name, known },
  );
}

export function refuseStartOutsideBounds(
  name: string,
  value: number,
  bounds: readonly [number, number],
): ModelError {
  return new ModelError(
    "start-outside-bounds",
    `The start ${value} of "${name}" lies outside its bounds, ${bounds[0]} to ${bounds[1]}. Move the start or the bounds.`,
    { name, value, bounds },
  );
}

export function refuseUnmatchedStates(states: readonly string[], recorded: readonly string[]): ModelError {
  return new ModelError(
    "states-not-recorded",
    `The rule moves ${states.join(", ")}, but the record holds ${recorded.join(", ")}. Name the columns with ` +
      `{ values: { ${states.map((s) => `${s}: "column"`).join(", ")} } } in observations(...).`,
    { states, recorded },
  );
}

export function refuseMissingInput(input: string, group: ObservedGroup): ModelError {
  return new ModelError(
    "input-not-recorded",
    `The rule reads the input "${input}", which the record${named(group)} does not hold. Name it in observations(..., { inputs }).`,
    { input, group: group.name },
  );
}

export function refuseTooFew(
  group: ObservedGroup,
  usable: number,
  unknowns: readonly string[],
  what: "values" | "pairs",
): ModelError {
  return new ModelError(
    "too-few-observations",
    `${usable} usable ${what}${named(group)} for ${unknowns.length} unknowns (${unknowns.join(", ")}): not fitted. ` +
      `At least ${unknowns.length + 3} are needed; use a rule with fewer constants, fix some with { fixed }, or wait for more rows.`,
    { group: group.name, usable, unknowns },
  );
}

export function refuseNoChange(group: ObservedGroup, value: number): ModelError {
  return new ModelError(
    "no-change",
    `The value${named(group)} never changes (it is ${value} in every row): a multiplier of 1 cannot be separated from ` +
      "no process at all. Check the column, or wait for a record that moves.",
    { group: group.name, value },
  );
}

export function refuseNoLogarithm(group: ObservedGroup, row: number, value: number): ModelError {
  return new ModelError(
    "no-logarithm",
    `Row ${row}${named(group)}: level ${value} has no logarithm, which proportional spread needs. Choose ` +
      '{ spread: "constant" }, or leave the row out with a reason.',
    { group: group.name, row, value },
  );
}

export function refuseNoStart(group: ObservedGroup, ruleText: string): ModelError {
  return new ModelError(
    "no-finite-start",
    `No constants were found at which "${ruleText}" stays finite over the record${named(group)}. Give ` +
      "{ start: { ... } } near plausible values, or { bounds: { ... } } that keep the rule in its range.",
    { group: group.name, rule: ruleText },
  );
}
