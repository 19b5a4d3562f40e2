import { ModelError, nearestNames } from "../numeric/index.js";

const list = (names: readonly string[]): string => (names.length === 0 ? "none" : names.join(", "));

export function missingValue(role: string, name: string, given: readonly string[]): ModelError {
  return new ModelError(
    "missing-value",
    `The rule needs a value for the ${role} "${name}", and none was given. Given: ${list(given)}.`,
    { role, name, given },
  );
}

export function strangeName(role: string, name: string, known: readonly string[]): ModelError {
  const near = nearestNames(name, known);
  const hint = near.length === 0 ? "" : ` Did you mean "${near.join('" or "')}"?`;
  return new ModelError(
    "unknown-name",
    `The rule has no ${role} called "${name}". It has: ${list(known)}.${hint}`,
    { role, name, known },
  );
}

export function notFinite(role: string, name: string, value: unknown): ModelError {
  return new ModelError(
    "not-a-number",
    `The ${role} "${name}" is ${String(value)}, which is no finite number. Give a number.`,
    { role, name, value },
  );
}

export function beyondBounds(state: string, value: number, low: number, high: number): ModelError {
  return new ModelError(
    "beyond-bounds",
    `The initial value of "${state}" is ${value}, and the rule bounds ${state} to ${low} to ${high}. Give an \`initial\` within them, or the rule other \`bounds\`.`,
    { state, value, low, high },
  );
}

export function wrongHistory(state: string, wanted: number, given: number): ModelError {
  return new ModelError(
    "wrong-history",
    `The rule reads "${state}" up to ${wanted - 1} periods back, so it needs ${wanted} first values, oldest first; ${given} were given. Give initial: { ${state}: [ ... ] } with ${wanted} numbers.`,
    { state, wanted, given },
  );
}

export function missingInput(input: string, period: number, given: number): ModelError {
  return new ModelError(
    "missing-input",
    `The input "${input}" is needed at period ${period}, and the values given reach from period 0 to ${given - 1}. Give values for every period of the path, or shorten it.`,
    { input, period, given },
  );
}

/** @param recorded - how many of the first steps read what is recorded. */
export function futureInputMissing(inputs: readonly string[], periods: number, recorded: number): ModelError {
  const why =
    recorded <= 0
      ? ""
      : ` (the first ${recorded === 1 ? "step reads the last recorded value" : `${recorded} steps read recorded values`})`;
  return new ModelError(
    "future-input-missing",
    `The rule needs ${inputs.join(", ")} for the next ${periods} ${periods === 1 ? "period" : "periods"}${why}; supply a scenario, such as inputs: { ${inputs[0]}: { usual: 0 } }.`,
    { inputs, periods },
  );
}

export function unknownInput(name: string, inputs: readonly string[]): ModelError {
  const [near] = nearestNames(name, inputs);
  const hint = near === undefined ? "" : ` Did you mean "${near}"?`;
  return new ModelError(
    "unknown-input",
    `The rule has no input "${name}". It has: ${inputs.length === 0 ? "none" : inputs.join(", ")}.${hint}`,
    { name, inputs },
  );
}

export function shortPlan(name: string, given: number, needed: number): ModelError {
  return new ModelError(
    "future-input-missing",
    `Invalid plan for \`${name}\`: it has ${given} values and the projection needs ${needed}. Give one for each period, or { usual, from, at }.`,
    { name, given, needed },
  );
}

export function badPlan(name: string, why: string): ModelError {
  return new ModelError("plan-not-readable", `Invalid plan for \`${name}\`: ${why}.`, { name });
}

export function unreadableOption(option: string, wanted: string, given: unknown): ModelError {
  return new ModelError("unreadable-option", `The option ${option} is ${String(given)}. Give ${wanted}.`, {
    option,
    given,
  });
}

export function missingPeriod(): ModelError {
  return new ModelError(
    "period-missing",
    "Which period? Give { period: 2 } for cycles of two values, { period: 3 } for cycles of three.",
  );
}

export function oneStateOnly(what: string, states: readonly string[]): ModelError {
  return new ModelError(
    "one-state-only",
    `${what} is worked out for rules of one state without past values; this rule has the state vector ${states.join(", ")}. Use simulate or equilibria for systems.`,
    { states },
  );
}

export function changesWithTime(what: string): ModelError {
  return new ModelError(
    "rule-changes-with-time",
    `The rule reads the period index t, so it has no ${what} that stays. Hold t by writing its value as a parameter.`,
  );
}

export function noRationalValue(what: string): ModelError {
  return new ModelError(
    "no-rational-value",
    `The rule needs ${what}, which has no exact fraction. Use path instead, which works in computer numbers.`,
    { what },
  );
}

export function tooManyDigits(period: number, limit: number): ModelError {
  return new ModelError(
    "too-many-digits",
    `At period ${period} the exact value has more than ${limit} digits. Ask for fewer periods, or use path.`,
    { period, limit },
  );
}

export function outsideRange(title: string, condition: string, values: string): ModelError {
  return new ModelError(
    "outside-range",
    `${title} means what it says only where ${condition}; given were ${values}. Choose values inside the range, or write the rule out with recurrence to run it regardless.`,
    { condition },
  );
}

export function noClosedForm(title: string): ModelError {
  return new ModelError(
    "no-closed-form",
    `${title} has no closed form that is known here for these parameters. Step it with path; equilibria and cycles say where it goes in the long run.`,
    { title },
  );
}

export function notAMatrixRule(): ModelError {
  return new ModelError(
    "not-a-matrix-rule",
    "The long run of a matrix is asked for, and this rule is no matrix with a positive dominant root: each line must be a sum of parameters times states, as in n1[t+1] = f1*n1 + f2*n2. Use equilibria for other systems.",
  );
}

export function pathLeaves(what: string): ModelError {
  return new ModelError(
    "path-leaves",
    `${what} is a matter of the long run, and this path leaves the finite range. Use path to see in which period and why.`,
  );
}

export function earlierInputMissing(input: string, label: string): ModelError {
  return new ModelError(
    "missing-input",
    `The rule reads the input "${input}" at ${label}, before the first planned period, and no value is recorded there. ` +
      "Record it (0 where nothing happened), or begin later.",
    { input, label },
  );
}

export function startUnreadable(startsAt: unknown, why: string): ModelError {
  return new ModelError("start-not-readable", `Option \`startsAt\`: ${String(startsAt)} ${why}.`, {
    startsAt,
  });
}

export function periodMissing(startsAt: string): ModelError {
  return new ModelError(
    "start-not-readable",
    `Option \`startsAt\`: "${startsAt}" is a label, and \`period\` does not say what a period is. Write period: "month", or a step such as { every: 12, of: "hour" }.`,
    { startsAt },
  );
}

export function groupUnknown(name: string | undefined, groups: readonly string[]): ModelError {
  const [near] = nearestNames(name ?? "", groups);
  const hint = near === undefined ? "" : ` Did you mean "${near}"?`;
  const what =
    name === undefined ? "names none of the groups of the record" : `"${name}" is no group of the record`;
  return new ModelError("unknown-name", `Option \`group\`: ${what}. It has: ${list(groups)}.${hint}`, {
    name,
    groups,
  });
}
