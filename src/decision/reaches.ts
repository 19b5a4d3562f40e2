import { quantile } from "../numeric/index.js";
import type { Forecast, GroupForecast } from "../projection/index.js";
import { type Crossing, crossing, type Direction } from "./crossing.js";
import { reachSentence } from "./reach-sentence.js";
import { refuseStateUnknown, refuseTarget } from "./refusals.js";

/** The question: when does a state get to a value? */
export interface ReachOptions {
  /** Default: the only state. */
  readonly state?: string;
  /** In the state's unit. */
  readonly value: number;
  readonly direction: Direction;
  /** Level of the interval; default 0.95. */
  readonly level?: number;
}

/** The answer for one group. Times are in the unit of the period column. */
export interface GroupReach {
  readonly group: string;
  /** On the path at the estimates; undefined where it does not get there within the forecast. */
  readonly time: number | undefined;
  /** First recorded period at or past the value, on the path at the estimates. */
  readonly firstPeriod: number | undefined;
  /** Across draws; a limit is undefined where that share of draws never gets there. */
  readonly lower: number | undefined;
  readonly upper: number | undefined;
  /** Share of draws that never get there within the forecast, and its Monte-Carlo error. */
  readonly never: number;
  readonly neverError: number;
  /** Last time the forecast covers. */
  readonly horizon: number;
  readonly sentence: string;
}

/** When a state reaches a value, with its margin. */
export interface Reach {
  readonly kind: "reach";
  readonly state: string;
  readonly unit: string;
  readonly periodUnit: string;
  readonly value: number;
  readonly direction: Direction;
  readonly level: number;
  /** What the margin carries. */
  readonly margin: "constants" | "constants and process errors";
  readonly groups: readonly GroupReach[];
  readonly sentence: string;
}

/**
 * When a forecast state first reaches a value: the time on the fitted path, an interval across draws, the first
 * recorded period, and the probability that it never does within the forecast.
 *
 * The interval is for the mean path where the error is one of observation, and carries the process errors
 * where the fit has them. Between two periods a straight line is taken.
 *
 * @throws {ModelError} `unknown-state` | `target-not-finite`.
 * @example reaches(forecast(fitted, { periods: 20 }), { value: 120, direction: "rising" }).sentence;
 */
export function reaches(forecast: Forecast, options: ReachOptions): Reach {
  const { rule } = forecast.fit;
  const state = options.state ?? rule.states[0]!;
  const place = rule.states.indexOf(state);
  if (place < 0) throw refuseStateUnknown(state, rule.states);
  if (!Number.isFinite(options.value)) throw refuseTarget(options.value);
  const { value, direction, level = 0.95 } = options;
  const process = forecast.fit.options.errors === "process";
  const { observations } = forecast.fit;
  const question = {
    state,
    unit: observations.states.find((each) => each.name === state)!.unit,
    periodUnit: observations.period.unit,
    value,
    direction,
    level,
    margin: process ? "constants and process errors" : "constants",
  } as const;
  const groups = forecast.groups.map((group) => groupReach(group, place, question, process));
  const sentence = groups.map((group) => group.sentence).join(" ");
  return Object.freeze({ kind: "reach", ...question, groups: Object.freeze(groups), sentence });
}

type Question = Omit<Reach, "kind" | "groups" | "sentence">;

function groupReach(group: GroupForecast, place: number, question: Question, process: boolean): GroupReach {
  const { value, direction, level } = question;
  const length = group.index.length;
  const draws = process ? group.draws.future[place]! : group.draws.mean[place]!;
  const found = Float64Array.from({ length: group.draws.paths }, (_, path) => {
    const at = crossing(draws, path * length, length, value, direction);
    return at === undefined ? Number.POSITIVE_INFINITY : at.between;
  }).sort();
  const central = crossing(group.states[place]!.central, 0, length, value, direction);
  const never = found.filter((at) => at === Number.POSITIVE_INFINITY).length / found.length;
  const answer = {
    group: group.group,
    time: timeOf(group, central?.between),
    firstPeriod: timeOf(group, central?.period),
    lower: timeOf(group, limit(found, (1 - level) / 2)),
    upper: timeOf(group, limit(found, (1 + level) / 2)),
    never,
    neverError: Math.sqrt((never * (1 - never)) / found.length),
    horizon: group.time[length - 1]!,
  };
  return { ...answer, sentence: reachSentence(answer, question) };
}

/** A quantile of crossings among which "never" stands as infinite; undefined where it falls among those. */
function limit(found: Float64Array, probability: number): number | undefined {
  const upper = found[Math.ceil((found.length - 1) * probability)]!;
  return Number.isFinite(upper) ? quantile(found, probability) : undefined;
}

function timeOf(group: GroupForecast, at: Crossing["between"] | undefined): number | undefined {
  if (at === undefined) return undefined;
  const step = group.time.length > 1 ? group.time[1]! - group.time[0]! : 0;
  return group.time[0]! + at * step;
}
