import { ModelError, nearestNames } from "../numeric/index.js";

export function refusePeriods(periods: number): ModelError {
  return new ModelError(
    "periods-not-whole",
    `A projection runs over a whole number of periods, at least 1; ${periods} was given.`,
    { periods },
  );
}

export function refusePaths(paths: number): ModelError {
  return new ModelError(
    "paths-not-whole",
    `A projection draws a whole number of paths, at least 1; ${paths} was given.`,
    { paths },
  );
}

export function refuseLevel(level: number): ModelError {
  return new ModelError(
    "level-outside",
    `A band has a level between 0 and 1, such as 0.95; ${level} was given.`,
    {
      level,
    },
  );
}

export function refuseSharedPlan(input: string, last: ReadonlyMap<string, number>): ModelError {
  const told = [...last].slice(0, 4);
  const more = last.size > told.length ? ", ..." : "";
  return new ModelError(
    "plan-not-by-group",
    `One plan for \`${input}\` would hold for groups whose last recorded values differ: ${told.map(([name, value]) => `${name} ${value}`).join(", ")}${more}. ` +
      `Give each its own: inputs: { ${input}: { byGroup: { ${told.map(([name, value]) => `${JSON.stringify(name)}: ${value}`).join(", ")}${more} } } }.`,
    { input, last: Object.fromEntries(last) },
  );
}

export function refuseStrangeGroup(where: string, group: string, groups: readonly string[]): ModelError {
  const [near] = nearestNames(group, groups);
  const hint = near === undefined ? "" : ` Did you mean "${near}"?`;
  return new ModelError(
    "plan-not-readable",
    `${where}: the fit has no group "${group}". It has: ${groups.map((name) => name || "a single group without a name").join(", ")}.${hint}`,
    { group, groups },
  );
}

export function refuseFrom(from: string | number, first: string, last: string): ModelError {
  return new ModelError(
    "start-not-readable",
    `Option \`from\`: ${from} is no recorded period to start after; the record runs from ${first} to ${last}.`,
    { from, first, last },
  );
}

export function refuseFilteredStart(from: string | number): ModelError {
  return new ModelError(
    "start-not-readable",
    `Option \`from\`: with errors: "both" the present state is known after the last recorded period only, not after ${from}. ` +
      "Fit the record up to there (option `where` or `rows` of `observations`) and forecast that fit.",
    { from },
  );
}

export function refuseNoScenario(): ModelError {
  return new ModelError(
    "no-scenario",
    "The scenarios are empty. Name at least one, such as scenarios: { usual: { payment: 300 } }, or leave them out.",
  );
}

export function refuseTwoPlans(): ModelError {
  return new ModelError(
    "two-plans",
    "Both inputs and scenarios were given. Put what all scenarios share into each of them, and leave inputs out.",
  );
}

/** @param twoErrors - whether the fit looks for an observation error as well, which can be given. */
export function refuseUndetermined(group: string, names: readonly string[], twoErrors: boolean): ModelError {
  const who = names.length === 0 ? "The parameters" : names.join(" and ");
  const held = `Hold one, as \`fixed: { ${names[0] ?? "r"}: 0.5 }\`, ${twoErrors ? "give the observation error where it is known, as `sd: 0.15`, " : ""}or use a rule with fewer parameters.`;
  return new ModelError(
    "parameters-not-separated",
    `${who}${group === "" ? "" : ` of "${group}"`} cannot be separated by this record, so no margin can be put on a ` +
      `projection. ${held}`,
    { group, names },
  );
}

export function refuseNoPath(group: string, rule: string): ModelError {
  return new ModelError(
    "no-finite-path",
    `"${rule}" leaves the finite range at the fitted parameters${group === "" ? "" : ` of "${group}"`}: nothing can be projected.`,
    { group, rule },
  );
}

export function refuseNoDraws(group: string): ModelError {
  return new ModelError(
    "no-draw-in-bounds",
    `No drawn parameters${group === "" ? "" : ` of "${group}"`} lie within their bounds: the bounds contradict the estimates. Widen { bounds } and fit again.`,
    { group },
  );
}

export function refuseGap(state: string, period: string): ModelError {
  return new ModelError(
    "history-missing",
    `The rule reads ${state} at ${period}, which the record does not hold; a projection cannot begin. Fit with errors: "observation", or supply the value.`,
    { state, period },
  );
}

export function refuseNoise(state: string, why: string): ModelError {
  return new ModelError("noise-not-readable", `The random change of ${state} cannot be drawn: ${why}.`, {
    state,
  });
}

export function refuseProjectedName(name: string, known: readonly string[]): ModelError {
  const [near] = nearestNames(name, known);
  const hint = near === undefined ? "" : ` Did you mean "${near}"?`;
  return new ModelError(
    "unknown-name",
    `The projection has no state or quantity "${name}". It has: ${known.join(", ")}.${hint}`,
    { name, known },
  );
}

export function refuseNoLevel(name: string): ModelError {
  return new ModelError(
    "level-missing",
    `Which level of ${name}? Give one of \`risesTo\` and \`fallsTo\`, as in { risesTo: 120 } or { fallsTo: 0 }.`,
    { name },
  );
}

export function refuseLevelValue(name: string, value: unknown): ModelError {
  return new ModelError(
    "level-not-finite",
    `The level of ${name} must be a finite number; ${String(value)} was given.`,
    { name, value },
  );
}

export function refuseLevelBeyond(name: string, level: number, low: number, high: number): ModelError {
  return new ModelError(
    "level-beyond-bounds",
    `${name} cannot reach ${level}: the rule bounds it to ${low} to ${high}. Ask for a level within them, or give the rule other \`bounds\`.`,
    { name, level, low, high },
  );
}

export function refuseLevelName(name: string, known: readonly string[]): ModelError {
  const [near] = nearestNames(name, known);
  const hint = near === undefined ? "" : ` Did you mean "${near}"?`;
  return new ModelError(
    "unknown-name",
    `A level is taken of a parameter or a first value, and there is no "${name}". There are: ${known.join(", ")}.${hint}`,
    { name, known },
  );
}
