import { type CrossedLevel, type Forecast, levelSide, type Simulation } from "../../projection/index.js";
import { levelWords } from "../measure/measure-words.js";
import { amount, opened, percent, percentWords, rounded, shareOfPaths } from "../words/amount.js";
import { conditionWords, firstPeriodLabel, groupWords } from "../words/record-words.js";
import type { AcrossUnits } from "./across-units.js";
import type { GroupReach, ReachQuestion } from "./reach.js";

type Answer = Omit<GroupReach, "sentence">;
type Ahead = Forecast | Simulation;
type TargetQuestion = CrossedLevel & Pick<ReachQuestion, "state" | "unit">;

/** The answer for one group: number, unit, interval, what the margin carries, and on what it stands. */
export function groupSentence(ahead: Ahead, answer: Answer, question: ReachQuestion): string {
  const notes = [marginWords(question, answer), recordedNote(answer, question), leftNote(answer)];
  return `${opened(groupBody(ahead, answer, question))}, provided ${condition(ahead)}.${notes.join("")}${signWords(ahead, [answer], question)}`;
}

/** What the forecast says of paths below zero, where an answer is read from beyond that place. */
function signWords(ahead: Ahead, answers: readonly Answer[], { state }: ReachQuestion): string {
  const said = answers.flatMap(({ group, scenario, time, beginsPast }) => {
    const projected = ahead.groups.find((each) => each.group === group && each.scenario === scenario)!;
    const central = projected.states.find((each) => each.state === state)?.central ?? [];
    const below = central.findIndex((value, t) => projected.index[t]! > projected.recordEnd && value < 0);
    const before = beginsPast || below < 0 || (time !== undefined && time <= projected.time[below]!);
    return before ? [] : projected.warnings.filter((warning) => warning.code === "leaves-recorded-sign");
  });
  return said.map(({ message }) => ` ${message}`).join("");
}

function groupBody(ahead: Ahead, answer: Answer, question: ReachQuestion): string {
  if (answer.beginsPast) return alreadyThere(ahead, answer, question);
  if (answer.time === undefined) return notReached(ahead, answer, question);
  const within = answer.withinRecord ? ", within the record" : "";
  return `${subject(ahead, answer, question)} reaches ${target(question, answer)} ${when(answer, question)}${within}${firstWords(answer)}${neverWords(answer)}`;
}

/** A single observation past the level, beside the time on the fitted path. */
function recordedNote({ words, beginsPast }: Answer, { state }: ReachQuestion): string {
  if (words.recorded === undefined || beginsPast) return "";
  return ` A recorded value of ${state} is at or past the level already at ${words.recorded}.`;
}

/** Paths that ended outside the range of a state before they got there. */
function leftNote({ left, paths, words }: Answer): string {
  if (!(left > 0) || paths === 1) return "";
  const share = percent(left, Math.sqrt((left * (1 - left)) / paths));
  return ` ${share} of the paths leave the range of a state before they get there, and count as not getting there by ${words.lastPeriod}.`;
}

/** One sentence for all groups: the first and the last to get there, and when all are there. */
export function reachSentence(
  ahead: Ahead,
  groups: readonly GroupReach[],
  across: AcrossUnits | undefined,
  question: ReachQuestion,
): string {
  if (groups.length === 1) return groups[0]!.sentence;
  const body = groups.some((group) => group.scenario !== "")
    ? byScenario(ahead, groups, question)
    : byGroup(ahead, groups, question) + newUnit(ahead, across, question);
  const margin = groups.find((group) => group.time !== undefined);
  return `${opened(body)}, provided ${condition(ahead)}.${margin === undefined ? "" : marginWords(question, margin)}${signWords(ahead, groups, question)}`;
}

function byGroup(ahead: Ahead, groups: readonly GroupReach[], question: ReachQuestion): string {
  const who = (group: GroupReach): string => groupWords(fitOf(ahead), group.group);
  const there = groups.filter((group) => group.time !== undefined).sort((a, b) => a.time! - b.time!);
  const [first] = there;
  const last = there[there.length - 1];
  const { state } = question;
  if (first === undefined || last === undefined)
    return `${state} reaches ${target(question, groups[0]!)} in none of ${groups.length} groups by ${groups[0]!.words.lastPeriod}`;
  const level = target(question, first);
  const span =
    first === last
      ? `${state} reaches ${level} in ${who(first)}, ${when(first, question)}`
      : `${state} reaches ${level} first in ${who(first)}, ${when(first, question)}, and last in ${who(last)}, ${when(last, question, true)}`;
  const passed = groups.filter((group) => group.beginsPast);
  const missing = groups.filter((group) => group.time === undefined && !group.beginsPast);
  const named = (some: readonly GroupReach[]): string =>
    some.length <= mostNamed ? some.map(who).join(" and ") : `${some.length} of ${groups.length} groups`;
  const began = passed.length > 0 ? `; ${named(passed)} began past it` : "";
  if (missing.length > 0)
    return `${span}${began}; ${named(missing)} ${missing.length === 1 ? "does" : "do"} not get there by ${missing[0]!.words.lastPeriod}`;
  if (began !== "") return `${span}${began}`;
  const latest = there.reduce((late, next) => (next.firstPeriod! > late.firstPeriod! ? next : late));
  return `${span}; the first period at which all ${groups.length} are at or past it is ${latest.words.firstPeriod}`;
}

/** Most groups that are named one by one. */
const mostNamed = 3;

function byScenario(ahead: Ahead, groups: readonly GroupReach[], question: ReachQuestion): string {
  const each = groups.map((group) => {
    const who = group.group === "" ? "" : ` (${groupWords(fitOf(ahead), group.group)})`;
    return `under "${group.scenario}"${who} ${scenarioWords(group, question)}`;
  });
  return `${question.state} reaches ${target(question, groups[0]!)} ${each.join("; ")}`;
}

function scenarioWords(group: GroupReach, question: ReachQuestion): string {
  if (group.beginsPast) return "not at all, as it begins past it";
  const { never, neverError, paths, words } = group;
  if (group.time === undefined && paths > 1 && never < 1)
    return `by ${words.lastPeriod} ${shareOfPaths(1 - never, neverError, paths)} only`;
  if (group.time === undefined) return `not by ${words.lastPeriod}`;
  return `${when(group, question, true)}${firstWords(group)}`;
}

function alreadyThere(ahead: Ahead, answer: Answer, question: ReachQuestion): string {
  const who = subject(ahead, answer, question);
  const level = target(question, answer);
  if (answer.words.recorded !== undefined)
    return `${who} is already recorded at or past ${level}, at ${answer.words.recorded}`;
  const [side, other] = levelSide(question).sign < 0 ? ["below", "risesTo"] : ["above", "fallsTo"];
  return `${who} is at or ${side} ${level} from the first row on, so there is no time at which it gets there (was \`${other}\` meant?)`;
}

function notReached(ahead: Ahead, answer: Answer, question: ReachQuestion): string {
  const { tendsTo, paths, words, never, neverError } = answer;
  const level = target(question, answer);
  if (question.margin === "random change" && paths > 1 && never < 1)
    return `the chance that ${subject(ahead, answer, question)} reaches ${level} by ${words.lastPeriod} is ${percent(1 - never, neverError)} (Monte-Carlo error ${percent(neverError, neverError / 3)}); without random change it does not`;
  const levels = tendsTo === undefined ? "" : `; the path levels off near ${levelledAt(tendsTo, question)}`;
  const some = never === 1 || paths === 1 ? "" : `; ${shareOfPaths(1 - never, neverError, paths)} it does`;
  return `${subject(ahead, answer, question)} does not reach ${level} by ${words.lastPeriod}${levels}${some}`;
}

function levelledAt(tends: NonNullable<Answer["tendsTo"]>, question: ReachQuestion): string {
  const spread = (tends.upper - tends.lower) / 4;
  const value = amount(rounded(tends.value, spread), question.unit);
  if (!(spread > 0)) return value;
  return `${value} (${percentWords(question.level)} interval ${rounded(tends.lower, spread)} to ${rounded(tends.upper, spread)})`;
}

function subject(ahead: Ahead, { group, scenario }: Answer, { state }: ReachQuestion): string {
  const under = scenario === "" ? "" : `Under "${scenario}" `;
  return group === "" ? `${under}${state}` : `${under}${state} in ${groupWords(fitOf(ahead), group)}`;
}

/** The level with its unit: "0 EUR", "90% of K (1404 t)". */
export function target(question: TargetQuestion, { levelAt }: Pick<Answer, "levelAt">): string {
  const units = { unitOf: () => question.unit, levelAt: () => levelAt };
  return levelWords(question, question.state, units);
}

/** "at hour 129 (95% interval 125 to 146)". */
function when({ words, paths }: Answer, { level }: ReachQuestion, short = false): string {
  const { time, lower, upper, lastPeriod } = words;
  if (paths === 1) return `${time}`;
  const name = short ? "" : `${percentWords(level)} interval `;
  if (lower === undefined) return `${time} (${name}with no limit by ${lastPeriod})`;
  if (upper === undefined) return `${time} (${name}from ${lower}, with no upper limit by ${lastPeriod})`;
  return `${time} (${name}${lower} to ${upper})`;
}

/** The first whole period, where the time lies between two; with its rivals where it has any. */
function firstWords({ time, firstPeriod, words }: Answer): string {
  if (words.likeliest !== undefined)
    return `; the first period at or past it is most likely ${words.likeliest}`;
  if (firstPeriod === undefined || time === firstPeriod) return "";
  return `; the first period at or past it is ${words.firstPeriod}`;
}

function neverWords(answer: Answer): string {
  if (answer.never === 0) return "";
  const share = shareOfPaths(answer.never, answer.neverError, answer.paths);
  return `; ${share} it does not get there by ${answer.words.lastPeriod}`;
}

/** For a new unit, within what the forecast covers. */
function newUnit(
  ahead: Ahead,
  across: AcrossUnits | undefined,
  { level, periodUnit }: ReachQuestion,
): string {
  const fit = fitOf(ahead);
  if (across === undefined || fit === undefined) return "";
  const [column = "unit"] = fit.observations.by ?? [];
  const { axis, index, time } = ahead.groups[0]!;
  const [begin, end] = [time[0]!, time[time.length - 1]!];
  const said = (at: number): string =>
    axis.counts === "numbers"
      ? `${periodUnit} ${rounded(at, across.standardDeviation)}`
      : firstPeriodLabel(axis, index[0]! + (at - begin) / axis.step.every);
  const lower = across.newLower < begin ? "the start" : said(across.newLower);
  const upper = across.newUpper > end ? "beyond the forecast" : said(across.newUpper);
  return `; for a new ${column}, with the scatter between the ${across.count} added, the ${percentWords(level)} interval is ${lower} to ${upper}`;
}

function condition(ahead: Ahead): string {
  return conditionWords(ahead.kind === "simulation" ? ahead.rule : ahead.fit.rule, fitOf(ahead));
}

function marginWords({ margin }: ReachQuestion, { paths, time }: Answer): string {
  if (paths === 1 || time === undefined) return "";
  if (margin === "parameters")
    return " The margin is that of the fitted parameters, not of a further reading's error.";
  if (margin === "random change") return " The margin is that of the random change, at the given parameters.";
  return " The margin is that of the fitted parameters and of chance from period to period.";
}

function fitOf(ahead: Ahead): Forecast["fit"] | undefined {
  return ahead.kind === "forecast" ? ahead.fit : undefined;
}
