import { ModelError, nearestNames } from "../numeric/index.js";
import { type CrossedLevel, crossedLevel } from "../projection/index.js";

const list = (names: readonly string[]): string => (names.length === 0 ? "none" : names.join(", "));

function nearest(name: string, known: readonly string[]): string {
  const [near] = nearestNames(name, known);
  return near === undefined ? "" : ` Did you mean "${near}"?`;
}

export function levelError(level: number): ModelError {
  return new ModelError(
    "level-outside",
    `An interval has a level between 0 and 1, such as 0.95; ${level} was given.`,
    { level },
  );
}

export function fewUnitsError(count: number): ModelError {
  return new ModelError(
    "too-few-units",
    `The time of a new unit needs the scatter between at least 3 recorded ones; there ${count === 1 ? "is 1" : `are ${count}`}. Leave \`newUnit\` out.`,
    { count },
  );
}

export function notWatchedError(state: string, level: CrossedLevel): ModelError {
  const asked = JSON.stringify(crossedLevel(level))
    .replace(/"(\w+)":/g, "$1: ")
    .replace(/^\{|\}$/g, "");
  return new ModelError(
    "paths-not-kept",
    `The paths were too many to keep, and this level of ${state} was not watched. Run it again with watch: [{ state: "${state}", ${asked} }].`,
    { state, ...crossedLevel(level) },
  );
}

export function groupError(group: string | undefined, groups: readonly string[]): ModelError {
  const what = group === undefined ? "The fit has several groups" : `The fit has no group "${group}"`;
  return new ModelError("which-group", `${what}: ${list(groups)}. Name one with \`group\`.`, {
    group,
    groups,
  });
}

export function unknownSettingError(name: string, known: readonly string[]): ModelError {
  return new ModelError(
    "no-such-setting",
    `Nothing called "${name}" can be set. There are: ${list(known)}.${nearest(name, known)}`,
    { name, known },
  );
}

export function measureNameError(name: string, known: readonly string[]): ModelError {
  const what = name === "" ? "The measure names nothing to measure" : `There is no "${name}" to measure`;
  return new ModelError("unknown-name", `${what}. There are: ${list(known)}.${nearest(name, known)}`, {
    name,
    known,
  });
}

export function measureWindowError(from: number, to: number, ahead: number): ModelError {
  if (from < 1)
    return new ModelError(
      "outside-projection",
      `A measure looks ahead, from period 1 on; ${from} was given. Give a period of 1 to ${ahead}; the present value is in the result of \`forecast\` at the record's end, and of \`simulate\` in its first row.`,
      { from, to, ahead },
    );
  const asked = from === to ? `Period ${from} ahead was` : `Periods ${from} to ${to} ahead were`;
  return new ModelError(
    "outside-projection",
    `${asked} asked for, and the projection has whole periods 1 to ${ahead}. Give more \`periods\`, or an earlier one.`,
    { from, to, ahead },
  );
}

export function quantileError(quantile: number): ModelError {
  const hint = quantile > 1 && quantile < 100 ? `: write \`quantile: ${quantile / 100}\`` : "";
  return new ModelError(
    "quantile-outside",
    `The \`quantile\` of a measure must be between 0 and 1; ${quantile} was given${hint}.`,
    { quantile },
  );
}

/** @param states - those of the rule, which alone can have random change. */
export function noChanceError(name: string, states: readonly string[]): ModelError {
  const given = states.includes(name) ? name : states[0]!;
  const which =
    given === name ? "" : ` of a state (${list(states)}; ${name} is a quantity, which follows from them)`;
  return new ModelError(
    "nothing-random",
    `The probability that ${name} gets to a level needs a rule with random change${which}. Give it, as in noise: { ${given}: { distribution: "normal", sd: 1 } }, or ask for a \`time\` instead.`,
    { name, states },
  );
}

export function noEffectError(vary: string, measure: string): ModelError {
  return new ModelError(
    "no-effect",
    `${vary} has no effect on ${measure}: it is the same over the whole range.`,
    { vary, measure },
  );
}

export function noRangeError(vary: string): ModelError {
  return new ModelError(
    "no-range",
    `No range for ${vary}. Give the lowest and the highest value with range: [low, high].`,
    { vary },
  );
}

export function rangeError(vary: string, from: number, to: number, why: string): ModelError {
  return new ModelError(
    "range-contradicts",
    `\`range\` of ${vary}: [${from}, ${to}] cannot be searched, because ${why}.`,
    {
      vary,
      from,
      to,
    },
  );
}

export function multipleError(multiple: number): ModelError {
  return new ModelError(
    "multiple-not-positive",
    `\`multiple\` must be a positive number; ${multiple} was given. Write 1 for whole pieces, 0.01 for cents.`,
    { multiple },
  );
}

export function noTargetError(aim: number | undefined): ModelError {
  return new ModelError(
    "no-target",
    `The target has ${aim === undefined ? "no value" : `the value ${aim}`}. Give one of \`is\`, \`atMost\` and \`atLeast\` with a finite number.`,
    { aim },
  );
}

export function probabilityTargetError(aim: number): ModelError {
  const hint = aim > 1 && aim <= 100 ? `: write ${aim / 100} for ${aim}%` : `; ${aim} was given`;
  return new ModelError("probability-outside", `A probability is from 0 to 1${hint}.`, { aim });
}

/** Periods in words, and as they are typed: so many ahead as the number given, and the last. */
interface AskedTimes {
  readonly asked: string;
  readonly present: string;
  readonly first: string;
  readonly last: string;
  readonly ahead: string | undefined;
  readonly example: string;
}

export function pastTimeError(
  key: string,
  aim: number,
  { asked, present, first, last, ahead, example }: AskedTimes,
): ModelError {
  const hint =
    ahead === undefined
      ? `, as in ${key}: ${example}`
      : `; ${aim} ${aim === 1 ? "period" : "periods"} ahead is ${key}: ${ahead}`;
  return new ModelError(
    "time-past",
    `The time \`${key}\` of the target, ${aim} in the numbers of the record, is ${asked}, before the present, ${present}. A time that can be asked for is from ${first} to ${last}${hint}.`,
    { aim, first, last },
  );
}

/** @param past - what is past, as a clause. */
export function pastAlreadyError(past: string): ModelError {
  return new ModelError(
    "past-already",
    `The target is met from the start, whatever is set: ${past}. Ask for another level, or for the other of \`risesTo\` and \`fallsTo\`.`,
    { past },
  );
}

export function noObjectiveError(): ModelError {
  return new ModelError(
    "no-objective",
    'Give one of `maximize` and `minimize`, with a measure, such as maximize: { total: "yield" }.',
  );
}

export function probabilityAnswerError(): ModelError {
  return new ModelError(
    "probability-not-narrowed",
    "A further reading narrows the interval of a number, and a probability has none. Ask for the `time` or the `level` behind it.",
  );
}

export function noValuesError(): ModelError {
  return new ModelError(
    "no-values",
    "A table of choices needs at least one setting in `values` and one measure in `answers`.",
  );
}

export function noPurposeError(): ModelError {
  return new ModelError(
    "no-purpose",
    "Give several rival fits to tell apart, or one fit and the `answer` to be narrowed.",
  );
}

export function noCandidateError(from: string, to: string): ModelError {
  return new ModelError(
    "no-candidate",
    `No reading can be taken at the times asked for; the rules know times from ${from} to ${to}, and with errors in the process only those after the record.`,
    { from, to },
  );
}

export function periodError(period: string, first: string, second: string): ModelError {
  return new ModelError(
    "unknown-period",
    `"${period}" names no single period of the projection; its periods are ${first}, ${second} and so on.`,
    { period },
  );
}
