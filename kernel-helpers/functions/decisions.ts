import {
  type NextReading,
  type NextReadingOptions,
  nextReading as nextReadingOf,
  timeToReach as reachesValue,
  type Solved,
  type SolveOptions,
  solveFor as solveForSetting,
  type TimeToReachOptions,
} from "../../src/decision/index.js";
import type { Fit } from "../../src/estimate/index.js";
import { frozenCopy } from "../../src/numeric/index.js";
import type { Forecast, Simulation } from "../../src/projection/index.js";
import type { Rule } from "../../src/rule/index.js";
import { checkCall } from "../options/index.js";
import { type TimeToReach, withSingleReach } from "../results/index.js";
import { showing } from "../tables/index.js";
import { caseLog } from "./case-log.js";
import { seededRun } from "./seeded-run.js";
import { levelWords, showNextReading, showReach, showSolved } from "./show-decisions.js";
import { shownTogether } from "./shown-together.js";

/**
 * When a projected state first reaches a value; the result shows time, margin, first recorded period, the
 * distribution over periods and the probability of never, and says it in a sentence.
 *
 * @example timeToReach(ahead, { state: "N", risesTo: 120 }).sentence;
 */
export function timeToReach(ahead: Forecast | Simulation, options: TimeToReachOptions): TimeToReach {
  checkCall("timeToReach", arguments);
  const found = withSingleReach(reachesValue(ahead, frozenCopy(options)));
  caseLog.noteStep(`asked when ${found.state} ${levelWords(found)}`);
  return showing(found, () => shownTogether(showReach(found, ahead)));
}

/**
 * Finds what a parameter, a first value or the level of an input must be to meet a target; the result shows every
 * solution with its margin, and says it in a sentence.
 *
 * @example
 * const loan = recurrence("owed[t+1] = owed*(1 + i) - payment", { fixed: { i: 0.01 } });
 * solveFor(loan, { vary: "payment", parameters: { payment: 100 }, initial: { owed: 1000 }, periods: 12,
 *   until: { level: "owed", at: 12, is: 0 } }).solutions[0].value // 1000*0.01/(1 - 1.01**-12)
 */
export function solveFor(subject: Fit | Rule, options: SolveOptions): Solved {
  checkCall("solveFor", arguments);
  const found = seededRun("Solving", options, (own) => solveForSetting(subject, own));
  caseLog.noteStep(`asked what ${found.vary} brings ${found.measure} ${aimWords(found)}`);
  return showing(found, () => shownTogether(showSolved(found)));
}

/** "to 0", "to at most 120": the target that was asked for. */
function aimWords({ target }: Solved): string {
  if (target.is !== undefined) return `to ${target.is}`;
  return target.atMost === undefined ? `to at least ${target.atLeast}` : `to at most ${target.atMost}`;
}

/**
 * Which further reading would tell rival rules apart, or narrow a named answer; the result shows the gain of each
 * time, with its Monte-Carlo error.
 *
 * @example nextReading(fitted, { periods: 10, answer: { parameter: "K" } }).sentence;
 */
export function nextReading(fits: Fit | readonly Fit[], options: NextReadingOptions): NextReading {
  checkCall("nextReading", arguments);
  const found = seededRun("Next reading", options, (own) => nextReadingOf(fits, own));
  caseLog.noteStep(`asked which further reading of ${found.state} would ${found.purpose}`);
  return showing(found, () => shownTogether(showNextReading(found)));
}
