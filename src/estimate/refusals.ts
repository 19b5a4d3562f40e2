import { ModelError } from "../numeric/index.js";
import { type ObservedGroup, periodWords } from "../record/index.js";

const named = (group: ObservedGroup): string => (group.name === "" ? "" : ` of "${group.name}"`);

export function refuseMissingArgument(what: "rule" | "record"): ModelError {
  const order = "A rule comes first, then the record";
  const made =
    what === "rule" ? "Make a rule with recurrence(...) or rules" : "Make a record with observations(...)";
  return new ModelError("argument-missing", `No ${what} was given where one is needed. ${order}. ${made}.`, {
    argument: what,
  });
}

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

/** @param name - undefined where one of several was to be named. */
export function groupError(name: string | undefined, groups: readonly string[]): ModelError {
  const names = groups.map((group) => `"${group}"`).join(", ");
  const has =
    groups.length === 1 && groups[0] === "" ? "a single group without a name: leave `group` out" : names;
  const said =
    name === undefined ? "name one of the groups of the fit with it" : `the fit has no group "${name}"`;
  return new ModelError("which-group", `Option \`group\`: ${said}. It has ${has}.`, { group: name, groups });
}

export function refuseReversedBounds(name: string, [lower, upper]: readonly [number, number]): ModelError {
  return new ModelError(
    "bounds-reversed",
    `Option \`bounds\`: the lower bound ${lower} of "${name}" lies above the upper bound ${upper}. Write { bounds: { ${keyOf(name)}: [${upper}, ${lower}] } }.`,
    { name, bounds: [lower, upper] },
  );
}

/** @param role - what else the name stands for. */
export function refuseTakenFactor(state: string, name: string, role: string, free: string): ModelError {
  return new ModelError(
    "factor-name-taken",
    `Option \`factor\`: "${name}" is already ${role}, and the factor of ${state} is an unknown of its own. Give it another name, as { factor: { ${state}: "${free}" } }.`,
    { state, name },
  );
}

const keyOf = (name: string): string => (/^\w+$/.test(name) ? name : `"${name}"`);

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

export function refusePartOfStart(
  states: readonly string[],
  open: readonly { readonly name: string }[],
): ModelError {
  const missing = open.map(({ name }) => name);
  return new ModelError(
    "part-of-start",
    `Option \`initial\` gives part of the first state; ${missing.join(", ")} is missing. With \`errors: "both"\` give a value, or ` +
      `a list of them, oldest first, where the rule reads past values, for every one of ${states.join(", ")}, or leave \`initial\` out.`,
    { missing },
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

export function unitScaleError(
  state: string,
  column: string,
  recorded: string,
  stated: string,
  factor: number,
): ModelError {
  const times = Number((factor < 1 ? 1 / factor : factor).toPrecision(6));
  return new ModelError(
    "unit-scales-differ",
    `The record gives "${column}" in ${recorded}, and the rule states ${stated} for ${state}: a factor of ${times} apart. ` +
      `Write \`units: { ${state}: "${recorded}" }\` with the rule, or convert the column and state \`unit: "${stated}"\` in observations(...).`,
    { state, column, recorded, stated, factor },
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
      `At least ${unknowns.length + 3} are needed; use a rule with fewer parameters, fix some with { fixed }, or wait for more rows.`,
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
    `Row ${row}${named(group)}: level ${value} has no logarithm, which a lognormal distribution needs. Choose ` +
      '{ distribution: "normal" }, or leave the row out with a reason.',
    { group: group.name, row, value },
  );
}

export function refuseNoStart(group: ObservedGroup, ruleText: string): ModelError {
  return new ModelError(
    "no-finite-start",
    `No parameters were found at which "${ruleText}" stays finite over the record${named(group)}. Give ` +
      "{ start: { ... } } near plausible values, or { bounds: { ... } } that keep the rule in its range.",
    { group: group.name, rule: ruleText },
  );
}

export function refuseStepsFromZero(group: ObservedGroup, row: number, ruleText: string): ModelError {
  return new ModelError(
    "step-from-zero",
    `Row ${row}${named(group)} is a count of 0 and the next one is not: with \`errors: "process"\` every step starts from the ` +
      `recorded count, and "${ruleText}" stays at 0. Write \`errors: "observation"\`, which fits the whole trajectory.`,
    { group: group.name, row, rule: ruleText },
  );
}

export function refuseNoCount(group: ObservedGroup, row: number, value: number): ModelError {
  return new ModelError(
    "not-a-count",
    `Row ${row}${named(group)}: ${value} is not a count, which a Poisson or negative binomial distribution needs. Give whole ` +
      'numbers from 0, or choose { distribution: "normal" } or { distribution: "lognormal" }.',
    { group: group.name, row, value },
  );
}

export function refuseAllCensored(group: ObservedGroup, state: string, side: "above" | "below"): ModelError {
  return new ModelError(
    "all-censored",
    `Every value of ${state}${named(group)} is only known to lie ${side} its limit: nothing tells how far. At least some exact ` +
      "values are needed; until then only a one-sided statement is possible.",
    { group: group.name, state, side },
  );
}

export function refuseFilteredLimit(group: ObservedGroup, state: string, row: number): ModelError {
  return new ModelError(
    "censored-in-filter",
    `Row ${row}${named(group)}: ${state} is only known up to a limit (a censored value), and \`errors: "both"\` would take the limit for a ` +
      'reading. Write `errors: "observation"` or `errors: "process"`, which count such values as beyond their limit.',
    { group: group.name, state, row },
  );
}

export function refuseInputGap(input: string, group: ObservedGroup, index: number): ModelError {
  const period = periodWords(group.axis, index);
  return new ModelError(
    "input-missing-in-period",
    `The input "${input}" is not recorded at ${period}${named(group)}, which a step of the rule reads. Record it (0 where ` +
      "nothing happened), or fit the part of the record that has it.",
    { input, group: group.name, period },
  );
}

export function refuseJumps(name: string, ruleText: string): ModelError {
  return new ModelError(
    "rule-jumps",
    `"${ruleText}" jumps at ${name}(...), so its parameters have no best value that a search could find: small changes of them change ` +
      "nothing, and then a whole step. Fit the rule without the rounding; keep it for schedules and projections.",
    { function: name, rule: ruleText },
  );
}

export function refuseSd(sd: number | string, distribution: string): ModelError {
  const counts = distribution === "poisson" || distribution === "negative-binomial";
  const remedy = counts
    ? `Leave it out: the variance of "${distribution}" counts follows from their mean.`
    : "Give a positive number, or the name of an input column of them: in the unit of the record for `normal`, on the log scale for `lognormal`.";
  return new ModelError(
    "invalid-sd",
    `Option \`sd\` is ${sd}, with \`distribution: "${distribution}"\`. ${remedy}`,
    { sd, distribution },
  );
}

export function refuseSdColumn(column: string, inputs: readonly string[]): ModelError {
  return new ModelError(
    "sd-not-recorded",
    `Option \`sd\` names the column "${column}", which the record does not hold as an input${inputs.length > 0 ? ` (it has ${inputs.join(", ")})` : ""}. ` +
      `Write observations(..., { inputs: { "${column}": "its column" } }), or give one number, as \`sd: 0.15\`.`,
    { column, inputs },
  );
}

export function refuseSdValue(column: string, group: ObservedGroup, row: number, value: number): ModelError {
  return new ModelError(
    "invalid-sd",
    `Row ${row}${named(group)}: the standard deviation in "${column}" is ${Number.isNaN(value) ? "missing" : value}. Every row with a value needs a ` +
      "positive one; leave the row out with a reason, or give one number for all, as `sd: 0.15`.",
    { column, group: group.name, row, value },
  );
}

export function refuseUnknownDistribution(distribution: unknown): ModelError {
  return new ModelError(
    "unknown-distribution",
    `Option \`distribution\` must be "normal", "lognormal", "poisson" or "negative-binomial"; ${String(distribution)} was given. ` +
      'Counts go with `errors: "process"` or `errors: "observation"`.',
    { distribution },
  );
}

export function refuseFactor(errors: string): ModelError {
  return new ModelError(
    "factor-without-trajectory",
    `A factor of the record is found from whole trajectories, not with errors: "${errors}". Use { errors: "observation" }, or ` +
      "write the factor into the rule.",
    { errors },
  );
}

export function refuseSharedParameters(): ModelError {
  return new ModelError(
    "groups-together",
    "Groups that share parameters cannot be resampled one by one. Read the profile intervals of the fit, or fit them with " +
      '`groups: "separate"`.',
  );
}

export function refuseNoDraws(): ModelError {
  return new ModelError(
    "not-simulated",
    "No records can be simulated from this fit: it has censored values, whose limits are not known for the exact ones, or " +
      "counts with weights, which stand for no single count. Read the profile intervals of the fit.",
  );
}

export function refuseNotBySquares(what: string): ModelError {
  return new ModelError(
    "not-by-least-squares",
    `${what} works on fits by least squares of each group on its own. Counts, censored values, errors in both and groups ` +
      "together have profile intervals instead.",
  );
}

export function refuseFewDraws(draws: number): ModelError {
  return new ModelError(
    "too-few-draws",
    `${draws} draws cannot show the ends of an interval. Give a whole number of at least 20, better 999.`,
    { draws },
  );
}

export function refuseTogether(how: string): ModelError {
  return new ModelError(
    "groups-not-together",
    `Groups are fitted { groups: "${how}" } by least squares only: not counts, not censored values, not errors in both. Fit them ` +
      '{ groups: "separate" }, and compare the estimates.',
    { how },
  );
}

export function refuseFewGroups(count: number): ModelError {
  return new ModelError(
    "too-few-groups",
    `${count} groups do not tell how parameters spread among groups. Give at least 3, better 6, or fit { groups: "combined" }.`,
    { count },
  );
}

export function refuseNoNewRows(): ModelError {
  return new ModelError(
    "no-new-rows",
    "No rows were given to extend the fit with. Give the rows that came in after those of the fit.",
  );
}

export function refuseNoResiduals(): ModelError {
  return new ModelError(
    "no-residuals",
    "Residuals of counts, and predictions of a fit with errors in both, cannot be put on other fitted values. Use " +
      '`errors: "parametric"`, which draws from the fitted distribution.',
  );
}

export function refuseRobust(): ModelError {
  return new ModelError(
    "robust-not-by-squares",
    'Far-off values count for less only in fits by least squares of each group on its own. Drop { robust: true }, or fit with a "normal" ' +
      'or "lognormal" spread and { groups: "separate" }.',
  );
}
