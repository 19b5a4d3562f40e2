import { problemOf } from "../../estimate/index.js";
import { checkLevel, crossedLevel, type Forecast, placeOf, type Simulation } from "../../projection/index.js";
import { type Rule, ruleLabel } from "../../rule/index.js";
import { fewUnitsError, levelError } from "../errors.js";
import { acrossUnits } from "./across-units.js";
import { groupReach } from "./group-reach.js";
import type { ReachQuestion, TimeToReach, TimeToReachOptions } from "./reach.js";
import { groupSentence, reachSentence } from "./reach-sentence.js";

/**
 * When a projected state or quantity first rises or falls to a level: the time on the path without random change, an
 * interval across paths, the first period, the distribution over periods, and the probability that it never does
 * within the forecast.
 *
 * What lies ahead of the present counts, the present value with it; only where the fitted path stands at or past the
 * level at the record's end is the answer a time within the record. A level may be relative, as
 * `{ risesTo: { share: 0.9, of: "K" } }`: then each path counts against its own. A jump across the level counts, also
 * one beyond a bound at which the path stays or ends.
 *
 * The interval is for the mean path where the error is one of observation (`meanPath` has it by the delta
 * method as well), and carries the process errors where the fit has them. With `newUnit`, a new unit's time has the
 * variance between units added. Between two periods the time lies on the path's own curve: the fractional step of the
 * Moebius map through four neighbouring values, exact for geometric, affine and Beverton-Holt rules; a straight line
 * where the rule has kinks, its path turns, or chance moves it.
 *
 * @throws {ModelError} `unknown-name` | `level-missing` | `level-not-finite` | `level-beyond-bounds` | `level-outside` | `paths-not-kept` | `too-few-units`.
 * @example timeToReach(forecast(fitted, { periods: 20 }), { risesTo: 120 }).sentence;
 */
export function timeToReach(ahead: Forecast | Simulation, options: TimeToReachOptions): TimeToReach {
  const question = questionOf(ahead, ruleOf(ahead), options);
  const groups = ahead.groups.map((group) => {
    const answer = groupReach(ahead, group, question);
    return { ...answer, sentence: groupSentence(ahead, answer, question) };
  });
  const asked = options.newUnit === true && ahead.kind === "forecast";
  if (asked && groups.length < 3) throw fewUnitsError(groups.length);
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

function questionOf(ahead: Forecast | Simulation, rule: Rule, options: TimeToReachOptions): ReachQuestion {
  const { level = 0.95, state = rule.states[0]! } = options;
  placeOf(rule, state);
  checkLevel(rule, state, options);
  if (!(level > 0 && level < 1)) throw levelError(level);
  const period = ahead.kind === "forecast" ? ahead.fit.observations.axis.unit : ahead.options.period;
  const projected = ahead.groups[0]!.states.find((each) => each.state === state);
  return {
    rule: ruleLabel(rule),
    state,
    unit: projected?.unit ?? rule.units[state] ?? "",
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
