import {
  optimize as bestSetting,
  type OptimizeOptions,
  type Optimum,
  type Sensitivity,
  type SensitivityOptions,
  sensitivity as sensitivityOf,
  type Tradeoff,
  type TradeoffOptions,
  tradeoff as tradeoffOf,
} from "../../src/decision/index.js";
import type { Fit } from "../../src/estimate/index.js";
import type { Rule } from "../../src/rule/index.js";
import { checkCall } from "../options/index.js";
import { showing } from "../tables/index.js";
import { caseLog } from "./case-log.js";
import { seededRun } from "./seeded-run.js";
import { showBest, showSensitivity, showTradeoff } from "./show-choices.js";
import { shownTogether } from "./shown-together.js";

/**
 * The setting at which a measure is largest or smallest; the result shows the measure against the setting and how
 * flat it is around the best.
 *
 * @example
 * const stock = recurrence("catch = h*B\nB[t+1] = B + B*(1 - B/100) - catch");
 * optimize(stock, { vary: "h", range: [0.01, 0.99], parameters: { h: 0.1 }, initial: { B: 50 }, periods: 100,
 *   maximize: { level: "catch", at: 100 } }).atEnd // false
 */
export function optimize(subject: Fit | Rule, options: OptimizeOptions): Optimum {
  checkCall("optimize", arguments);
  const found = seededRun("Optimum", options, (own) => bestSetting(subject, own));
  caseLog.noteStep(`asked which ${found.vary} is best for ${found.measure}`);
  return showing(found, () => shownTogether(showBest(found)));
}

/**
 * What an answer is sensitive to: its change for one standard error and for ten per cent of each parameter, in two charts,
 * and the elasticities.
 *
 * @example sensitivity(fitted, { periods: 12, answer: { time: "N", risesTo: 600 } }).rows.length // 3
 */
export function sensitivity(subject: Fit | Rule, options: SensitivityOptions): Sensitivity {
  checkCall("sensitivity", arguments);
  const found = seededRun("Sensitivity", options, (own) => sensitivityOf(subject, own));
  caseLog.noteStep(`asked how sensitive ${found.measure} is`);
  return showing(found, () => shownTogether(showSensitivity(found)));
}

/**
 * Time, level, cost and probability of several settings, side by side; the result shows a table and a curve for each answer.
 *
 * @example
 * const stock = recurrence("stock[t+1] = stock + ordered - 10");
 * tradeoff(stock, { vary: "ordered", values: [9, 10, 11], parameters: { ordered: 10 }, initial: { stock: 20 }, periods: 8,
 *   answers: { lowest: { lowest: "stock" } } }).rows[0].answers.lowest // 12
 */
export function tradeoff(subject: Fit | Rule, options: TradeoffOptions): Tradeoff {
  checkCall("tradeoff", arguments);
  const found = seededRun("Choices", options, (own) => tradeoffOf(subject, own));
  caseLog.noteStep(`set ${found.rows.length} choices of ${found.vary} side by side`);
  return showing(found, () => shownTogether(showTradeoff(found)));
}
