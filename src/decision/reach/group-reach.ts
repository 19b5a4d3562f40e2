import { problemOf } from "../../estimate/index.js";
import { quantile } from "../../numeric/index.js";
import {
  centralLevels,
  centralPath,
  type Forecast,
  firstPassage,
  fitGround,
  type GroupForecast,
  levelValues,
  pastBy,
  type Simulation,
} from "../../projection/index.js";
import { periodWords } from "../../record/index.js";
import { type DeltaMargin, deltaMargin } from "./delta-margin.js";
import {
  counted,
  distributionOf,
  drawnPassages,
  type GroupQuestion,
  groupQuestion,
  leftShare,
  share,
} from "./group-passages.js";
import { levelling } from "./levelling.js";
import type { GroupReach, ReachQuestion } from "./reach.js";
import { likeliestWords, timeWords } from "./time-words.js";

/** The answer for one group, but for its sentence. */
export function groupReach(
  ahead: Forecast | Simulation,
  group: GroupForecast,
  asked: ReachQuestion,
): Omit<GroupReach, "sentence"> {
  const question = groupQuestion(ahead, group, asked);
  const { level, present, from, place } = question;
  const { paths, central: kept, levels } = group.ensemble;
  const length = group.index.length;
  const central = firstPassage(kept[place]!, 0, counted(question, levels.central, from), question.smooth);
  const coming = drawnPassages(group, question, present);
  const found = (from === present ? coming : drawnPassages(group, question, from)).slice().sort();
  const recorded = recordedPast(group, question);
  const never = share(coming, (at) => at === Number.POSITIVE_INFINITY);
  const beginsPast = central?.row === from && place < question.of.states.length;
  const rows: Rows = beginsPast
    ? { time: undefined, firstPeriod: undefined, lower: undefined, upper: undefined }
    : {
        time: central?.between,
        firstPeriod: central?.row,
        lower: limit(found, (1 - level) / 2),
        upper: limit(found, (1 + level) / 2),
      };
  const distribution = beginsPast ? [] : distributionOf(found);
  return {
    group: group.group,
    scenario: group.scenario,
    time: timeOf(group, rows.time),
    firstPeriod: timeOf(group, rows.firstPeriod),
    recorded: recorded?.time,
    beginsPast,
    withinRecord: rows.time !== undefined && rows.time <= present && present > 0,
    levelAt: levelValues(asked, levels.central)[0]!,
    lower: timeOf(group, rows.lower),
    upper: timeOf(group, rows.upper),
    median: beginsPast ? undefined : timeOf(group, limit(found, 0.5)),
    meanPath: beginsPast ? undefined : meanPath(group, question, ahead.options.periods),
    never,
    neverError: Math.sqrt((never * (1 - never)) / paths),
    left: leftShare(group, place, coming),
    paths,
    distribution: distribution.map(({ row, ...each }) => ({ time: timeOf(group, row)!, ...each })),
    tendsTo: central === undefined ? levelling(group, place, level) : undefined,
    lastPeriod: group.time[length - 1]!,
    words: {
      ...wordsOf(group, question, rows),
      likeliest: likeliestWords(group, question.periodUnit, distribution, rows.firstPeriod),
      recorded: recorded?.words,
    },
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
): Omit<GroupReach["words"], "recorded" | "likeliest"> {
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

/** When the record itself first shows the level passed; undefined where it does so from its first row on. */
function recordedPast(
  group: GroupForecast,
  question: GroupQuestion,
): { readonly time: number; readonly words: string } | undefined {
  const { fit, state } = question;
  const recorded = fit?.observations.groups.find((each) => each.name === group.group);
  const values = recorded?.values[state];
  // A record that reads the state through a factor is on another scale.
  if (recorded === undefined || values === undefined || problemOf(fit!).factors[state] !== undefined)
    return undefined;
  const { sign, levels } = counted(question, group.ensemble.levels.central, 0);
  const at = values.findIndex((each) => pastBy(each, levels[0]!, sign) >= 0);
  if (at <= 0) return undefined;
  return { time: recorded.time[at]!, words: periodWords(recorded.axis, recorded.index[at]!) };
}

function meanPath(group: GroupForecast, question: GroupQuestion, periods: number): DeltaMargin | undefined {
  const { fit, place, from, smooth } = question;
  const fitted = fit?.groups.find((each) => each.group === group.group);
  if (fit === undefined || fitted === undefined) return undefined;
  const ground = fitGround(fit, fitted, periods, group.plans, group.recordEnd);
  return deltaMargin(fit, ground, question.level, (own) => {
    const asked = counted(question, centralLevels(own), from);
    const at = firstPassage(centralPath(own).kept[place]!, 0, asked, smooth);
    return timeOf(group, at?.between);
  });
}

/** A quantile of passages among which "never" stands as infinite; undefined where it falls among those. */
function limit(found: Float64Array, probability: number): number | undefined {
  const last = found[Math.ceil(probability * (found.length - 1))]!;
  return Number.isFinite(last) ? quantile(found, probability) : undefined;
}

function timeOf(group: GroupForecast, at: number | undefined): number | undefined {
  if (at === undefined) return undefined;
  const step = group.time.length > 1 ? group.time[1]! - group.time[0]! : 0;
  return group.time[0]! + at * step;
}
