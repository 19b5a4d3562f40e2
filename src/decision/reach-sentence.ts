import type { Forecast, Simulation } from "../projection/index.js";
import type { AcrossUnits } from "./across-units.js";
import { amount, levelWords, plain, rounded, shareOfDraws } from "./amount.js";
import type { GroupReach, ReachQuestion } from "./reach.js";
import { conditionWords, groupWords } from "./record-words.js";

type Answer = Omit<GroupReach, "sentence">;
type Ahead = Forecast | Simulation;

/** The answer for one group: number, unit, interval, what the margin carries, and on what it stands. */
export function groupSentence(ahead: Ahead, answer: Answer, question: ReachQuestion): string {
  const body =
    answer.time === undefined || answer.firstPeriod === undefined
      ? notReached(ahead, answer, question)
      : `${subject(ahead, answer, question)} reaches ${target(question)} ${when(answer, question)}` +
        `${firstWords(answer, question)}${neverWords(answer, question)}`;
  return `${body}, provided ${condition(ahead)}.${marginWords(question, answer)}`;
}

/** One sentence for all groups: the first and the last to get there, and when all are there. */
export function reachSentence(
  ahead: Ahead,
  groups: readonly GroupReach[],
  across: AcrossUnits | undefined,
  question: ReachQuestion,
): string {
  if (groups.length === 1) return groups[0]!.sentence;
  if (groups.some((group) => group.scenario !== "")) return byScenario(ahead, groups, question);
  const there = groups.filter((group) => group.time !== undefined).sort((a, b) => a.time! - b.time!);
  const missing = groups.filter((group) => group.time === undefined);
  const [first] = there;
  const last = there[there.length - 1];
  const who = (group: GroupReach): string => groupWords(fitOf(ahead), group.group);
  if (first === undefined || last === undefined)
    return `${question.state} reaches ${target(question)} in none of ${groups.length} groups by ${question.periodUnit} ${plain(groups[0]!.horizon, 6)}, provided ${condition(ahead)}.`;
  const span =
    first === last
      ? `${question.state} reaches ${target(question)} in ${who(first)} ${when(first, question)}`
      : `${question.state} reaches ${target(question)} first in ${who(first)}, ${when(first, question)}, and last in ${who(last)}, ${when(last, question, true)}`;
  const all = Math.max(...there.map((group) => group.firstPeriod!));
  const rest =
    missing.length > 0
      ? `; ${missing.map(who).join(" and ")} ${missing.length === 1 ? "does" : "do"} not get there by ${question.periodUnit} ${plain(missing[0]!.horizon, 6)}`
      : `; the first recorded ${question.periodUnit} at which all ${groups.length} are at or past it is ${plain(all, 6)}`;
  return `${span}${rest}${newUnit(across, question)}, provided ${condition(ahead)}.${marginWords(question, first)}`;
}

function byScenario(ahead: Ahead, groups: readonly GroupReach[], question: ReachQuestion): string {
  const each = groups.map((group) => {
    const who = group.group === "" ? "" : ` (${groupWords(fitOf(ahead), group.group)})`;
    const said =
      group.time === undefined
        ? `not by ${question.periodUnit} ${plain(group.horizon, 6)}`
        : `${when(group, question, true)}${firstWords(group, question)}`;
    return `under "${group.scenario}"${who} ${said}`;
  });
  return `${question.state} reaches ${target(question)} ${each.join("; ")}, provided ${condition(ahead)}.${marginWords(question, groups[0]!)}`;
}

function notReached(ahead: Ahead, answer: Answer, question: ReachQuestion): string {
  const { tendsTo, horizon, draws } = answer;
  const by = `by ${question.periodUnit} ${plain(horizon, 6)}`;
  const levels = tendsTo === undefined ? "" : `; the path levels off near ${levelledAt(tendsTo, question)}`;
  const some =
    answer.never === 1 || draws === 1
      ? ""
      : `; ${shareOfDraws(1 - answer.never, answer.neverError, draws)} it does`;
  return `${subject(ahead, answer, question)} does not reach ${target(question)} ${by}${levels}${some}`;
}

function levelledAt(tends: NonNullable<Answer["tendsTo"]>, question: ReachQuestion): string {
  const spread = (tends.upper - tends.lower) / 4;
  const value = amount(rounded(tends.value, spread), question.unit);
  if (!(spread > 0)) return value;
  return `${value} (${levelWords(question.level)} interval ${rounded(tends.lower, spread)} to ${rounded(tends.upper, spread)})`;
}

function subject(ahead: Ahead, { group, scenario }: Answer, { state }: ReachQuestion): string {
  const under = scenario === "" ? "" : `Under "${scenario}" `;
  return group === "" ? `${under}${state}` : `${under}${state} in ${groupWords(fitOf(ahead), group)}`;
}

function target({ value, unit }: ReachQuestion): string {
  return amount(plain(value, 12), unit);
}

/** "at hour 129 (95% interval 125 to 146)". */
function when(answer: Answer, question: ReachQuestion, short = false): string {
  const { periodUnit, level } = question;
  const { lower, upper, horizon } = answer;
  const spread = lower === undefined || upper === undefined ? undefined : (upper - lower) / 4;
  const at = `at ${periodUnit} ${rounded(answer.time!, spread)}`;
  if (answer.draws === 1) return at;
  const name = short ? "" : `${levelWords(level)} interval `;
  if (lower === undefined)
    return `${at} (${name}from ${periodUnit} ${plain(answer.time!, 3)} on, with no limit by ${plain(horizon, 6)})`;
  if (upper === undefined)
    return `${at} (${name}from ${rounded(lower)}, with no upper limit by ${periodUnit} ${plain(horizon, 6)})`;
  return `${at} (${name}${rounded(lower, spread)} to ${rounded(upper, spread)})`;
}

/** The first recorded period, where the time lies between two. */
function firstWords({ time, firstPeriod }: Answer, { periodUnit }: ReachQuestion): string {
  if (firstPeriod === undefined || time === firstPeriod) return "";
  return `; the first recorded ${periodUnit} at or past it is ${plain(firstPeriod, 6)}`;
}

function neverWords(answer: Answer, { periodUnit }: ReachQuestion): string {
  if (answer.never === 0) return "";
  const share = shareOfDraws(answer.never, answer.neverError, answer.draws);
  return `; ${share} it does not get there by ${periodUnit} ${plain(answer.horizon, 6)}`;
}

function newUnit(across: AcrossUnits | undefined, { level, periodUnit }: ReachQuestion): string {
  if (across === undefined) return "";
  const spread = across.standardDeviation;
  const few = across.count === 2 ? ", from two only" : "";
  return `; for a new one, with the scatter between ${across.count} added, the ${levelWords(level)} interval is ${periodUnit} ${rounded(across.newLower, spread)} to ${rounded(across.newUpper, spread)}${few}`;
}

function condition(ahead: Ahead): string {
  return conditionWords(ahead.kind === "simulation" ? ahead.rule : ahead.fit.rule, fitOf(ahead));
}

function marginWords({ margin }: ReachQuestion, { draws }: Answer): string {
  if (draws === 1) return "";
  if (margin === "constants")
    return " The margin is that of the fitted constants, not of a further reading's error.";
  if (margin === "random change") return " The margin is that of the random change, at the given constants.";
  return " The margin is that of the fitted constants and of chance from period to period.";
}

function fitOf(ahead: Ahead): Forecast["fit"] | undefined {
  return ahead.kind === "forecast" ? ahead.fit : undefined;
}
