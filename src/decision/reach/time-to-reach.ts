import { problemOf } from "../../estimate/index.js";
import { crossedLevel, type Forecast, levelSide, type Simulation } from "../../projection/index.js";
import { nonsmoothCalls, type Rule, ruleLabel } from "../../rule/index.js";
import { refuseFewUnits, refuseLevel, refuseStateUnknown, refuseTarget } from "../refusals.js";
import { acrossUnits } from "./across-units.js";
import { groupReach } from "./group-reach.js";
import type { ReachQuestion, TimeToReach, TimeToReachOptions } from "./reach.js";
import { groupSentence, reachSentence } from "./reach-sentence.js";

/**
 * When a projected state first reaches a value: the time on the path without random change, an interval across
 * draws, the first period, the distribution over periods, and the probability that it never does within the
 * forecast.
 *
 * The interval is for the mean path where the error is one of observation (`meanPath` has it by the delta
 * method as well), and carries the process errors where the fit has them. With `newUnit`, a new
 * unit's time has the variance between units added. A value that the record has passed already is said to be. Between two periods the time lies on the path's own curve: the fractional
 * step of the Moebius map through four neighbouring values, exact for geometric, affine and Beverton-Holt rules; a
 * straight line where the rule has kinks, its path turns, or chance moves it.
 *
 * @throws {ModelError} `unknown-state` | `target-not-finite` | `level-outside` | `paths-not-kept` | `too-few-units`.
 * @example timeToReach(forecast(fitted, { periods: 20 }), { risesTo: 120 }).sentence;
 */
export function timeToReach(ahead: Forecast | Simulation, options: TimeToReachOptions): TimeToReach {
  const rule = ruleOf(ahead);
  const question = questionOf(ahead, rule, options);
  const smooth = rule.inputs.length === 0 && isSmooth(rule);
  const groups = ahead.groups.map((group) => {
    const answer = groupReach(ahead, group, question, smooth);
    return { ...answer, sentence: groupSentence(ahead, answer, question) };
  });
  const asked = options.newUnit === true && ahead.kind === "forecast";
  if (asked && groups.length < 3) throw refuseFewUnits(groups.length);
  const across = asked ? acrossUnits(groups, question.level) : undefined;
  const sentence = reachSentence(ahead, groups, across, question);
  return {
    kind: "time-to-reach",
    ...question,
    groups,
    across,
    sentence,
  };
}

function ruleOf(ahead: Forecast | Simulation): Rule {
  return ahead.kind === "forecast" ? ahead.fit.rule : ahead.rule;
}

function isSmooth(rule: Rule): boolean {
  const { kinks, jumps } = nonsmoothCalls(rule);
  return kinks.length === 0 && jumps.length === 0;
}

function questionOf(ahead: Forecast | Simulation, rule: Rule, options: TimeToReachOptions): ReachQuestion {
  const { level = 0.95, state = rule.states[0]! } = options;
  const { value } = levelSide(options);
  if (!rule.states.includes(state)) throw refuseStateUnknown(state, rule.states);
  if (!Number.isFinite(value)) throw refuseTarget(value);
  if (!(level > 0 && level < 1)) throw refuseLevel(level);
  const period = ahead.kind === "forecast" ? ahead.fit.observations.axis.unit : ahead.options.period;
  return {
    rule: ruleLabel(rule),
    state,
    unit: ahead.groups[0]!.states.find((each) => each.state === state)!.unit,
    periodUnit: period,
    ...crossedLevel(options),
    level,
    margin: marginOf(ahead),
  };
}

function marginOf(ahead: Forecast | Simulation): TimeToReach["margin"] {
  if (ahead.kind === "simulation") return "random change";
  const { change } = problemOf(ahead.fit).group(ahead.groups[0]!.group).noise;
  return change.every((noise) => noise === undefined) ? "parameters" : "parameters and process errors";
}
