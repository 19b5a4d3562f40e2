import { ModelError, nearestNames } from "../numeric/index.js";
import { type CrossedLevel, crossedLevel, levelSide } from "../projection/index.js";

export function refuseStateUnknown(state: string, states: readonly string[]): ModelError {
  return new ModelError(
    "unknown-state",
    `The forecast has no state "${state}". It has: ${states.join(", ")}.`,
    { state, states },
  );
}

export function refuseTarget(value: number): ModelError {
  return new ModelError(
    "target-not-finite",
    `The value to reach must be a finite number; ${value} was given.`,
    { value },
  );
}

export function refuseLevel(level: number): ModelError {
  return new ModelError(
    "level-outside",
    `An interval has a level between 0 and 1, such as 0.95; ${level} was given.`,
    {
      level,
    },
  );
}

export function refuseFewUnits(count: number): ModelError {
  return new ModelError(
    "too-few-units",
    `The time of a new unit needs the scatter between at least 3 recorded ones; there ${count === 1 ? "is 1" : `are ${count}`}. Leave newUnit out.`,
    { count },
  );
}

export function refuseNotWatched(state: string, level: CrossedLevel): ModelError {
  const { value, sign } = levelSide(level);
  const side = sign < 0 ? "fallsTo" : "risesTo";
  return new ModelError(
    "paths-not-kept",
    `The paths were too many to keep, and ${state} at ${value} was not watched. Run it again with watch: [{ state: "${state}", ${side}: ${value} }].`,
    { state, ...crossedLevel(level) },
  );
}

const list = (names: readonly string[]): string => (names.length === 0 ? "none" : names.join(", "));

function nearest(name: string, known: readonly string[]): string {
  const [near] = nearestNames(name, known);
  return near === undefined ? "" : ` Did you mean "${near}"?`;
}

export function refuseGroup(group: string | undefined, groups: readonly string[]): ModelError {
  const what = group === undefined ? "The fit has several groups" : `The fit has no group "${group}"`;
  return new ModelError("which-group", `${what}: ${list(groups)}. Name one with { group }.`, {
    group,
    groups,
  });
}

export function refuseNoSuchSetting(name: string, known: readonly string[]): ModelError {
  return new ModelError(
    "no-such-setting",
    `Nothing called "${name}" can be set. There are: ${list(known)}.${nearest(name, known)}`,
    { name, known },
  );
}

export function refuseMeasureName(name: string, known: readonly string[]): ModelError {
  return new ModelError(
    "unknown-name",
    `The projection has nothing called "${name}" to measure. It has: ${list(known)}.${nearest(name, known)}`,
    { name, known },
  );
}

export function refuseMeasureWindow(from: number, to: number, ahead: number): ModelError {
  return new ModelError(
    "outside-projection",
    `Periods ${from} to ${to} ahead were asked for, and the projection has 1 to ${ahead}. Give more { periods }, or an earlier one.`,
    { from, to, ahead },
  );
}

export function refuseNoChance(state: string): ModelError {
  return new ModelError(
    "nothing-random",
    `The probability that ${state} gets to a level needs a rule with random change. Give it: noise: { ${state}: { distribution: "normal", sd: 1 } }, or ask for a time instead.`,
    { state },
  );
}

export function refuseNoEffect(unknown: string, measure: string): ModelError {
  return new ModelError(
    "no-effect",
    `${unknown} has no effect on ${measure}: it is the same over the whole range.`,
    {
      unknown,
      measure,
    },
  );
}

export function refuseNoRange(unknown: string): ModelError {
  return new ModelError(
    "no-range",
    `Nothing says where ${unknown} may lie. Give the lowest and the highest value with { range: [low, high] }.`,
    { unknown },
  );
}

export function refuseBounds(unknown: string, from: number, to: number, why: string): ModelError {
  return new ModelError(
    "bounds-contradict",
    `${unknown} cannot be sought between ${from} and ${to}: ${why}.`,
    { unknown, from, to },
  );
}

export function refuseNoTarget(aim: number | undefined): ModelError {
  return new ModelError(
    "no-target",
    `The target has ${aim === undefined ? "no value" : `the value ${aim}`}. Say { is }, { atMost } or { atLeast } with a finite number.`,
    { aim },
  );
}

export function refuseProbabilityTarget(aim: number): ModelError {
  const hint = aim > 1 && aim <= 100 ? `: write ${aim / 100} for ${aim}%` : `; ${aim} was given`;
  return new ModelError("probability-outside", `A probability is from 0 to 1${hint}.`, { aim });
}

/** @param past - what is past, as a clause. */
export function refusePastAlready(past: string): ModelError {
  return new ModelError(
    "past-already",
    `No setting changes when it gets there: ${past}. Ask for another level, or for the other of \`risesTo\` and \`fallsTo\`.`,
    { past },
  );
}

export function refuseNoObjective(): ModelError {
  return new ModelError(
    "no-objective",
    'Say what is to be best: either { maximize } or { minimize }, with one measure, such as maximize: { total: "yield" }.',
  );
}

export function refuseProbabilityObjective(): ModelError {
  return new ModelError(
    "probability-not-smooth",
    "A probability moves in the steps of its paths, so it has neither a slope nor a sharp optimum. Use tradeoff to see it against the setting, or solveFor with { atMost }.",
  );
}

export function refuseNoValues(): ModelError {
  return new ModelError(
    "no-values",
    "A table of choices needs at least one setting in { values } and one measure in { answers }.",
  );
}

export function refuseNoPurpose(): ModelError {
  return new ModelError(
    "no-purpose",
    "Say what the reading is for: several rival fits to tell apart, or one fit with the { answer } to be narrowed.",
  );
}

export function refuseNoCandidate(from: string, to: string): ModelError {
  return new ModelError(
    "no-candidate",
    `No reading can be taken at the times asked for; the rules know times from ${from} to ${to}, and with errors in the process only those after the record.`,
    { from, to },
  );
}

export function refusePeriod(period: string, first: string, second: string): ModelError {
  return new ModelError(
    "unknown-period",
    `"${period}" names no single period of the projection; its periods are ${first}, ${second} and so on.`,
    { period },
  );
}
