import { centralPath, recordedSignWarnings } from "../../projection/index.js";
import type { Setting } from "../setting/set-value.js";
import type { Standing } from "../setting/standing.js";
import { amount, plain } from "../words/amount.js";
import type { Solved, Target } from "./solution.js";

/** What is past its value at the start already, as a clause; undefined where nothing is, or the start itself is sought. */
export function pastAlready(standing: Standing, target: Target, setting: Setting): string | undefined {
  if (!("time" in target || "risk" in target)) return undefined;
  const state = "time" in target ? target.time : target.risk;
  const place = standing.rule.states.indexOf(state);
  if (place < 0 || setting.role === "initial") return undefined;
  const row = "time" in target ? 0 : standing.present;
  const now = centralPath(standing.ground).values[place]![row]!;
  const falling = target.direction === "falling";
  if (!(falling ? now <= target.value : now >= target.value)) return undefined;
  const unit = standing.unitOf(state);
  return `${state} begins at ${amount(plain(now, 4), unit)}, already at or ${falling ? "below" : "above"} ${amount(plain(target.value, 12), unit)}`;
}

type Answer = Pick<Solved, "solutions" | "target">;

/** For a fit: what the rule does below zero at the first setting found, as far as the answer is read from there. */
export function signNotes(standing: Standing, setting: Setting, { solutions, target }: Answer): string[] {
  const [solution] = solutions;
  const { fitGround, fit } = standing;
  if (solution === undefined || fitGround === undefined || fit === undefined) return [];
  const ground = { ...fitGround, ...setting.at(solution.value) };
  const last = lastRead(standing, target, solution.achieved);
  const { unit } = fit.observations.period;
  const period = (row: number): string => `${unit} ${plain(standing.timeAt(row), 6)}`;
  const central = centralPath(ground);
  return recordedSignWarnings({ central, ground, scenario: "", period, last }).map(({ message }) => message);
}

/** The last row that a measure reads. */
function lastRead(standing: Standing, target: Target, achieved: number): number {
  const { present, ground, timeAt } = standing;
  if ("level" in target) return present + target.at;
  if ("time" in target && Number.isFinite(achieved))
    return Math.floor((achieved - timeAt(0)) / (timeAt(1) - timeAt(0)));
  return "to" in target && target.to !== undefined ? present + target.to : ground.periods;
}
