import { centralPath, levelSide, recordedSignWarnings } from "../../projection/index.js";
import type { Measure } from "../measure/measure.js";
import type { Setting } from "../setting/set-value.js";
import type { Standing } from "../setting/standing.js";
import { amount, plain } from "../words/amount.js";
import type { Target } from "./solution.js";

/** What is past its value at the start already, as a clause; undefined where nothing is, or the start itself is sought. */
export function pastAlready(standing: Standing, target: Target, setting: Setting): string | undefined {
  if (!("time" in target || "probability" in target)) return undefined;
  const state = "time" in target ? target.time : target.probability;
  const place = standing.rule.states.indexOf(state);
  if (place < 0 || setting.role === "initial") return undefined;
  const row = "time" in target ? 0 : standing.present;
  const now = centralPath(standing.ground).values[place]![row]!;
  const { value, sign } = levelSide(target);
  if (!(sign * (now - value) >= 0)) return undefined;
  const unit = standing.unitOf(state);
  return `${state} begins at ${amount(plain(now, 4), unit)}, already at or ${sign < 0 ? "below" : "above"} ${amount(plain(value, 12), unit)}`;
}

/**
 * For a fit: what the rule does below zero with a setting at a value, as far as a measure is read from there.
 *
 * @param achieved - the measure there.
 */
export function signNotes(
  standing: Standing,
  setting: Setting,
  value: number,
  measure: Measure,
  achieved: number,
): string[] {
  const { fitGround, fit } = standing;
  if (fitGround === undefined || fit === undefined) return [];
  const ground = { ...fitGround, ...setting.at(value) };
  const last = lastRead(standing, measure, achieved);
  const period = (row: number): string => standing.timeWords(standing.timeAt(row));
  const central = centralPath(ground);
  const scenario = `${setting.name} ${plain(value, 4)}`;
  return recordedSignWarnings({ central, ground, scenario, period, last }).map(({ message }) => message);
}

/** The last row that a measure reads. */
function lastRead(standing: Standing, target: Measure, achieved: number): number {
  const { present, ground, timeAt } = standing;
  if ("level" in target) return present + target.at;
  if ("time" in target && Number.isFinite(achieved))
    return Math.floor((achieved - timeAt(0)) / (timeAt(1) - timeAt(0)));
  return "to" in target && target.to !== undefined ? present + target.to : ground.periods;
}
