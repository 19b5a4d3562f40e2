import { quantile } from "../numeric/index.js";
import { type Forecast, fitGround, type GroupForecast, type Simulation } from "../projection/index.js";
import { type Rule, roughness } from "../rule/index.js";
import { acrossUnits } from "./across-units.js";
import { crossing } from "./crossing.js";
import { type DeltaMargin, deltaMargin } from "./delta-margin.js";
import { drawnPassages } from "./drawn-passages.js";
import { levelling } from "./levelling.js";
import type { GroupReach, Reach, ReachOptions, ReachQuestion } from "./reach.js";
import { groupSentence, reachSentence } from "./reach-sentence.js";
import { refuseLevel, refuseStateUnknown, refuseTarget } from "./refusals.js";

/**
 * When a projected state first reaches a value: the time on the path without random change, an interval across
 * draws, the first recorded period, the distribution over periods, and the probability that it never does within the
 * forecast.
 *
 * The interval is for the mean path where the error is one of observation (`meanPath` has it by the delta
 * method as well), and carries the process errors where the fit has them. For several units, a new unit's time
 * has the variance between units added. Between two periods the time lies on the path's own curve: the fractional
 * step of the Moebius map through four neighbouring values, exact for geometric, affine and Beverton-Holt rules; a
 * straight line where the rule has kinks, its path turns, or chance moves it.
 *
 * @throws {ModelError} `unknown-state` | `target-not-finite` | `level-outside` | `paths-not-kept`.
 * @example reaches(forecast(fitted, { periods: 20 }), { value: 120, direction: "rising" }).sentence;
 */
export function reaches(ahead: Forecast | Simulation, options: ReachOptions): Reach {
  const rule = ruleOf(ahead);
  const question = questionOf(ahead, rule, options);
  const smooth = rule.inputs.length === 0 && isSmooth(rule);
  const groups = ahead.groups.map((group) => groupReach(ahead, group, question, smooth));
  const across = ahead.kind === "forecast" ? acrossUnits(groups, question.level) : undefined;
  const sentence = reachSentence(ahead, groups, across, question);
  return Object.freeze({ kind: "reach", ...question, groups: Object.freeze(groups), across, sentence });
}

function ruleOf(ahead: Forecast | Simulation): Rule {
  return ahead.kind === "forecast" ? ahead.fit.rule : ahead.rule;
}

function isSmooth(rule: Rule): boolean {
  const { kinks, jumps } = roughness(rule);
  return kinks.length === 0 && jumps.length === 0;
}

function questionOf(ahead: Forecast | Simulation, rule: Rule, options: ReachOptions): ReachQuestion {
  const { value, direction, level = 0.95, state = rule.states[0]! } = options;
  if (!rule.states.includes(state)) throw refuseStateUnknown(state, rule.states);
  if (!Number.isFinite(value)) throw refuseTarget(value);
  if (!(level > 0 && level < 1)) throw refuseLevel(level);
  const period = ahead.kind === "forecast" ? ahead.fit.observations.period.unit : ahead.options.period;
  return {
    state,
    unit: ahead.groups[0]!.states.find((each) => each.state === state)!.unit,
    periodUnit: period,
    value,
    direction,
    level,
    margin: marginOf(ahead),
  };
}

function marginOf(ahead: Forecast | Simulation): Reach["margin"] {
  if (ahead.kind === "simulation") return "random change";
  return ahead.fit.options.errors === "observation" ? "constants" : "constants and process errors";
}

function groupReach(
  ahead: Forecast | Simulation,
  group: GroupForecast,
  question: ReachQuestion,
  smooth: boolean,
): GroupReach {
  const { value, direction, level, state } = question;
  const length = group.index.length;
  const place = group.states.findIndex((each) => each.state === state);
  const found = drawnPassages(group, place, question, smooth);
  const central = crossing(group.states[place]!.central, 0, length, value, direction, smooth);
  const draws = found.length;
  const never = found.filter((at) => at === Number.POSITIVE_INFINITY).length / draws;
  const answer = {
    group: group.group,
    scenario: group.scenario,
    time: timeOf(group, central?.between),
    firstPeriod: timeOf(group, central?.period),
    lower: timeOf(group, limit(found, (1 - level) / 2)),
    upper: timeOf(group, limit(found, (1 + level) / 2)),
    median: timeOf(group, limit(found, 0.5)),
    meanPath: meanPath(ahead, group, question, smooth),
    never,
    neverError: Math.sqrt((never * (1 - never)) / draws),
    draws,
    distribution: distributionOf(group, found),
    tendsTo: central === undefined ? levelling(group, place, level) : undefined,
    horizon: group.time[length - 1]!,
  };
  return Object.freeze({ ...answer, sentence: groupSentence(ahead, answer, question) });
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
  const ground = fitGround(fit, fitted, options.periods, group.plans);
  const place = fit.rule.states.indexOf(question.state);
  return deltaMargin(fit, ground, question.level, ({ values }) => {
    const path = values[place]!;
    const at = crossing(path, 0, path.length, question.value, question.direction, smooth);
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
