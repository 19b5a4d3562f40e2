import { type Fit, problemOf } from "../../estimate/index.js";
import { quantile } from "../../numeric/index.js";
import {
  type Forecast,
  fitGround,
  type GroupForecast,
  levelSide,
  type Simulation,
} from "../../projection/index.js";
import { plain } from "../words/amount.js";
import { crossing } from "./crossing.js";
import { type DeltaMargin, deltaMargin } from "./delta-margin.js";
import { drawnPassages } from "./drawn-passages.js";
import { levelling } from "./levelling.js";
import type { GroupReach, ReachQuestion } from "./reach.js";
import { timeWords } from "./time-words.js";

/** The answer for one group, but for its sentence. */
export function groupReach(
  ahead: Forecast | Simulation,
  group: GroupForecast,
  question: ReachQuestion,
  smooth: boolean,
): Omit<GroupReach, "sentence"> {
  const { level, state } = question;
  const length = group.index.length;
  const place = group.states.findIndex((each) => each.state === state);
  const found = drawnPassages(group, place, question, smooth);
  const central = crossing(group.states[place]!.central, 0, length, question, smooth);
  const recorded = ahead.kind === "forecast" ? recordedPast(ahead.fit, group, question) : undefined;
  const beginsPast = central?.period === 0;
  const rows = {
    time: beginsPast ? undefined : central?.between,
    firstPeriod: beginsPast ? undefined : central?.period,
    lower: beginsPast ? undefined : limit(found, (1 - level) / 2),
    upper: beginsPast ? undefined : limit(found, (1 + level) / 2),
  };
  const paths = found.length;
  const never = found.filter((at) => at === Number.POSITIVE_INFINITY).length / paths;
  return {
    group: group.group,
    scenario: group.scenario,
    time: timeOf(group, rows.time),
    firstPeriod: timeOf(group, rows.firstPeriod),
    recorded: recorded?.time,
    beginsPast,
    lower: timeOf(group, rows.lower),
    upper: timeOf(group, rows.upper),
    median: beginsPast ? undefined : timeOf(group, limit(found, 0.5)),
    meanPath: beginsPast ? undefined : meanPath(ahead, group, question, smooth),
    never,
    neverError: Math.sqrt((never * (1 - never)) / paths),
    paths,
    distribution: beginsPast ? [] : distributionOf(group, found),
    tendsTo: central === undefined ? levelling(group, place, level) : undefined,
    lastPeriod: group.time[length - 1]!,
    words: { ...wordsOf(group, question, rows), recorded: recorded?.words },
  };
}

interface Rows {
  readonly time: number | undefined;
  readonly firstPeriod: number | undefined;
  readonly lower: number | undefined;
  readonly upper: number | undefined;
}

function wordsOf(
  group: GroupForecast,
  { periodUnit }: ReachQuestion,
  rows: Rows,
): Omit<GroupReach["words"], "recorded"> {
  const say = timeWords(group, periodUnit);
  const { time, firstPeriod, lower, upper } = rows;
  const spread = spreadOf(rows);
  return {
    time: time === undefined ? undefined : say.at(time, spread),
    firstPeriod: firstPeriod === undefined ? undefined : say.period(firstPeriod),
    lower: lower === undefined ? undefined : say.limit(lower, "lower", spread),
    upper: upper === undefined ? undefined : say.limit(upper, "upper", spread),
    lastPeriod: say.period(group.index.length - 1),
  };
}

/** What stands for a standard error of the time: a quarter of the interval, or half of its known side. */
function spreadOf({ time, lower, upper }: Rows): number | undefined {
  if (lower !== undefined && upper !== undefined) return (upper - lower) / 4;
  return time === undefined || lower === undefined ? undefined : (time - lower) / 2;
}

/** When the record itself first shows the value passed; undefined where it does so from its first row on. */
function recordedPast(
  fit: Fit,
  group: GroupForecast,
  question: ReachQuestion,
): { readonly time: number; readonly words: string } | undefined {
  const { values, time, labels } = fit.observations.groups.find((each) => each.name === group.group)!;
  const { state, periodUnit } = question;
  const { value, sign } = levelSide(question);
  const at = values[state]!.findIndex((each) => sign * (each - value) >= 0);
  // A record that reads the state through an unknown factor is on another scale.
  if (at <= 0 || problemOf(fit).readByFactor.includes(state)) return undefined;
  return { time: time[at]!, words: labels?.[at] ?? `${periodUnit} ${plain(time[at]!, 6)}` };
}

function meanPath(
  ahead: Forecast | Simulation,
  group: GroupForecast,
  question: ReachQuestion,
  smooth: boolean,
): DeltaMargin | undefined {
  if (ahead.kind === "simulation") return undefined;
  const { fit, options } = ahead;
  const fitted = fit.groups.find((each) => each.group === group.group)!;
  const ground = fitGround(fit, fitted, options.periods, group.plans, group.recordEnd);
  const place = fit.rule.states.indexOf(question.state);
  return deltaMargin(fit, ground, question.level, ({ values }) => {
    const path = values[place]!;
    const at = crossing(path, 0, path.length, question, smooth);
    return timeOf(group, at?.between);
  });
}

/** A quantile of crossings among which "never" stands as infinite; undefined where it falls among those. */
function limit(found: Float64Array, probability: number): number | undefined {
  const upper = found[Math.ceil((found.length - 1) * probability)]!;
  return Number.isFinite(upper) ? quantile(found, probability) : undefined;
}

/** Shares of draws by the first whole period at or past the value. */
function distributionOf(group: GroupForecast, found: Float64Array): GroupReach["distribution"] {
  const counts = new Map<number, number>();
  for (const at of found) {
    if (!Number.isFinite(at)) break;
    const period = Math.ceil(at);
    counts.set(period, (counts.get(period) ?? 0) + 1);
  }
  let sum = 0;
  return [...counts].map(([period, count]) => {
    sum += count;
    return { time: timeOf(group, period)!, share: count / found.length, by: sum / found.length };
  });
}

function timeOf(group: GroupForecast, at: number | undefined): number | undefined {
  if (at === undefined) return undefined;
  const step = group.time.length > 1 ? group.time[1]! - group.time[0]! : 0;
  return group.time[0]! + at * step;
}
