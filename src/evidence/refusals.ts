import { ModelError } from "../numeric/index.js";

export function refuseOneFit(given: number): ModelError {
  return new ModelError(
    "too-few-fits",
    `A comparison needs at least two fits; ${given} given. Pass them as a list: compare([first, second]).`,
    { given },
  );
}

export function refuseUnlikeRecords(first: string, second: string): ModelError {
  return new ModelError(
    "unlike-records",
    `"${first}" and "${second}" were fitted to different records. Fit every rival to the same observations.`,
    { first, second },
  );
}

export function refuseUnlikeStarts(first: number, second: number): ModelError {
  return new ModelError(
    "unlike-starts",
    `One rule compares ${first} steps and the other ${second}: a rule that reads past values begins later. Fit the rule ` +
      "without them to the record without its first rows, so that both explain the same steps.",
    { first, second },
  );
}

/** @param counts - of the readings that each of the two fits explains. */
export function refuseUnlikeFilters(
  [first, second]: readonly [string, string],
  [one, two]: readonly [number, number],
  states: readonly string[],
): ModelError {
  const known = states.map((state) => `${state}: ...`).join(", ");
  return new ModelError(
    "unlike-starts",
    `"${first}" counts ${one} readings and "${second}" ${two}, of the same record: one of them takes the first reading from the ` +
      "rule's long-run distribution, the other begins at it. Give both fits the same first state, " +
      `\`initial: { ${known} }\`, so that both count the readings after it.`,
    { first, second, counts: [one, two] },
  );
}

export function refuseUnlikeErrors(): ModelError {
  return new ModelError(
    "unlike-errors",
    "Fits that put the error in the process and in the observation explain different numbers (steps and values), so " +
      "their likelihoods cannot be set side by side. Fit every rival with the same { errors }; check(fit) tells which kind " +
      "of error the record speaks for.",
  );
}

export function refuseFewRefits(given: number, least: number): ModelError {
  return new ModelError(
    "refits-too-few",
    `Recovery needs at least ${least} refits to tell a share of intervals; ${given} given. Leave { refits } out for 200.`,
    { given, least },
  );
}

export function refuseNoDates(group: string, count: number): ModelError {
  const who = group === "" ? "" : ` of "${group}"`;
  return new ModelError(
    "too-short-for-a-break",
    `${count} steps${who} leave no date with enough of them on either side to fit the rule twice. Use a rule with ` +
      "fewer parameters, hold some with { fixed }, or wait for more rows.",
    { group, count },
  );
}

export function notSeveralGroups(count: number): ModelError {
  return new ModelError(
    "not-several-groups",
    `Whether groups have the same parameters is asked of a fit with several groups, with \`groups: "separate"\` or "combined"; this one has ${count}${count > 1 ? ", mixed" : ""}. Name the column that tells them apart with \`by\` in observations(...).`,
    { count },
  );
}

/** Fits whose record is not searched for a break. */
export function refuseUnsearched(
  what: "counts" | "censored" | "together",
  distribution?: string,
): ModelError {
  const said = {
    counts: `A break is searched for by least squares, and \`distribution: "${distribution}"\` is fitted by another likelihood. Write \`distribution: "normal"\`, or "lognormal" where no count is 0; the probability is then rough, because the scatter of counts changes with their level.`,
    censored:
      "A break is searched for by least squares, and this record has censored values. Leave the censored rows out with a reason, or fit the parts of the record before and after a date with `fit` and compare their intervals.",
    together:
      'A break is searched for in each group by itself, every reading counting in full. Leave `groups` and `robust` out, or write `groups: "separate"`.',
  }[what];
  return new ModelError("break-not-searched", said, { what, distribution });
}

export function refuseNoDensity(group: string, state: string): ModelError {
  const who = group === "" ? "" : ` of "${group}"`;
  return new ModelError(
    "no-density-test",
    `The test needs at least four steps of one period between positive levels of ${state}${who}. Leave out levels of ` +
      "zero with a reason, name the state with { state }, or wait for more rows.",
    { group, state },
  );
}

export function refuseSeveralStates(states: readonly string[], given: string | undefined): ModelError {
  const wrong =
    given === undefined
      ? `The record holds ${states.length} states (${states.join(", ")}), and rules are proposed for one.`
      : `The record holds no state "${given}".`;
  return new ModelError("several-states", `${wrong} Name one with { state: "${states[0]}" }.`, {
    states,
    given,
  });
}

export function refuseNothingFits(reason: string): ModelError {
  return new ModelError(
    "nothing-fits",
    `No rule of the catalogue could be fitted to the record. The first said: ${reason}`,
    { reason },
  );
}

export function refuseExactFit(rule: string, group: string): ModelError {
  const who = group === "" ? "the record" : `the record of "${group}"`;
  return new ModelError(
    "exact-fit",
    `"${rule}" reproduces ${who} exactly, so there is no scatter to judge it by. Where values are exact but for rounding, ` +
      "count the rows that a rule reproduces; where they should scatter, look whether the column was computed.",
    { rule, group },
  );
}
