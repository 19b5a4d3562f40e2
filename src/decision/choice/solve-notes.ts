import {
  centralPath,
  type FitGround,
  levelSide,
  pastBy,
  recordedSignWarnings,
} from "../../projection/index.js";
import { isOfLevel, type Measure, measureOf } from "../measure/measure.js";
import { levelWords, measureWords } from "../measure/measure-words.js";
import type { Reading } from "../measure/read-measure.js";
import type { DecisionContext } from "../setting/decision-context.js";
import { groundAt, type Setting } from "../setting/set-value.js";
import { amount, opened, percent, plain } from "../words/amount.js";

/** What is past its level at the present already, as a clause; undefined where nothing is, or the start itself is sought. */
export function pastAlready(context: DecisionContext, target: Measure, setting: Setting): string | undefined {
  const { kind, name } = measureOf(target);
  const { rule, ground } = context;
  const place = rule.states.indexOf(name);
  if (!isOfLevel(target) || kind === "share" || place < 0 || setting.role === "initial") return undefined;
  const now = centralPath(ground).values[place]![ground.present]!;
  const { sign } = levelSide(target);
  if (!(pastBy(now, context.levelAt(target), sign) >= 0)) return undefined;
  const begins = ground.present === 0 ? "begins" : "stands";
  return `${name} ${begins} at ${amount(plain(now, 4), context.unitOf(name))}, already at or ${sign < 0 ? "below" : "above"} ${levelWords(target, name, context)}`;
}

/** What a reader of an answer must know besides: that chance has no part in it, and what the rule does below zero. */
export function readingNotes(
  context: DecisionContext,
  setting: Setting,
  value: number,
  measure: Measure,
  reading: Pick<Reading, "value" | "error">,
): string[] {
  return [...stillNotes(context, measure, reading), ...signNotes(context, setting, value, measure, reading)];
}

/** Where the rule has random change: that a measure is the same on every path, and for a quantity why. */
export function stillNotes(
  context: DecisionContext,
  measure: Measure,
  { value, error }: Pick<Reading, "value" | "error">,
): string[] {
  const { kind, name } = measureOf(measure);
  if (!context.random || error > 0 || !Number.isFinite(value)) return [];
  // A share, a time or a quantile may come out the same by chance.
  const mayAgree = isOfLevel(measure) || ("quantile" in measure && measure.quantile !== undefined);
  if (kind === "parameter" || mayAgree) return [];
  const same = `${opened(measureWords(measure, context))} is the same on every path, so it does not depend on chance there`;
  if (context.rule.states.includes(name)) return [`${same}.`];
  return [
    `${same}: a quantity of period k is worked out from the states at the end of period k-1, before the chance of period k.`,
  ];
}

/**
 * For a fit: what the rule does below zero with a setting at a value, as far as a measure is read from there.
 *
 * @param reading - the measure there; what lies below zero by less than two of its errors is chance.
 */
function signNotes(
  context: DecisionContext,
  setting: Setting,
  value: number,
  measure: Measure,
  { value: achieved, error }: Pick<Reading, "value" | "error">,
): string[] {
  const { fitGround, fit, timeAt, timeWords } = context;
  if (fitGround === undefined || fit === undefined) return [];
  const ground: FitGround = { ...fitGround, ...groundAt(context, { setting, value }) };
  const last = lastRead(context, measure, achieved);
  const period = (row: number): string => timeWords(timeAt(row));
  const scenario = `${setting.name} ${plain(value, 4)}`;
  return recordedSignWarnings({
    central: centralPath(ground),
    ground,
    scenario,
    period,
    last,
    slack: 2 * error,
  }).map(({ message }) => message);
}

/** The last row that a measure reads. */
function lastRead({ ground, timeAt }: DecisionContext, target: Measure, achieved: number): number {
  const { present, periods } = ground;
  if ("at" in target) return present + target.at;
  if ("time" in target && Number.isFinite(achieved))
    return Math.floor((achieved - timeAt(0)) / (timeAt(1) - timeAt(0)));
  return "to" in target && target.to !== undefined ? present + target.to : periods;
}

/**
 * That a number does without the paths that ended outside the range of a state; "" where none did.
 *
 * @param where - of which setting, as " with d at 16".
 */
export function leftWords(left: number, paths: number, where: string = ""): string {
  if (!(left > 0)) return "";
  const share = percent(left, Math.sqrt((left * (1 - left)) / paths));
  return ` ${share} of the paths${where} leave the range of a state: a mean is that of the others, and they count as not getting to a level.`;
}
