import { quantile } from "../../numeric/index.js";
import { noChanceError } from "../errors.js";
import type { DecisionContext } from "../setting/decision-context.js";
import type { Choice } from "../setting/set-value.js";
import { type Measure, type PlacedMeasure, placedMeasure } from "./measure.js";
import { type PathReader, type PathValues, pathReader } from "./path-values.js";

/** A measure's value. */
export interface Reading {
  readonly value: number;
  /** Monte-Carlo error; 0 where chance has no part. */
  readonly error: number;
  /** Share of the paths that ended outside the range of a state, without which the value is. */
  readonly left: number;
}

/** Reads a measure, with a choice made or as things stand. */
export interface MeasureReader {
  readonly measure: PlacedMeasure;
  /** Whether chance has a part, so that values carry a Monte-Carlo error. */
  readonly simulated: boolean;
  readonly read: (choice?: Choice) => Reading;
  readonly paths: PathReader;
}

/**
 * The reader of a measure that every decision uses: off the path without random change where nothing is random; else
 * off many paths, as their mean, the share that gets there, or a quantile.
 *
 * @throws {ModelError} `unknown-name` | `outside-projection` | `quantile-outside` | `nothing-random`.
 */
export function measureReader(context: DecisionContext, asked: Measure): MeasureReader {
  const measure = placedMeasure(asked, context.rule, context.ground.periods - context.ground.present);
  const { kind, name } = measure;
  if (kind === "probability" && context.fit === undefined && !context.random)
    throw noChanceError(name, context.rule.states);
  const drawn = context.fit !== undefined && (kind === "probability" || measure.quantile !== undefined);
  const simulated = kind !== "parameter" && (context.random || drawn);
  const paths = pathReader(context, measure, simulated ? "chance" : "estimates");
  return { measure, simulated, paths, read: (choice) => readingOf(measure, paths(choice)) };
}

/** The mean over paths with its error; of a time the median, and a quantile where one is asked for. */
export function readingOf({ kind, quantile: asked }: PlacedMeasure, found: PathValues): Reading {
  const live = found.values.filter((value) => !Number.isNaN(value));
  const { left } = found;
  // The mean of equal numbers may differ from them in the last digit, which is no Monte-Carlo error.
  if (live.every((value) => value === live[0])) return { value: live[0] ?? Number.NaN, error: 0, left };
  const probability = asked ?? (kind === "time" ? 0.5 : undefined);
  if (probability !== undefined) return { ...quantileOf(live, probability), left };
  const mean = live.reduce((sum, value) => sum + value, 0) / live.length;
  if (kind === "probability")
    return { value: mean, error: Math.sqrt((mean * (1 - mean)) / live.length), left };
  const squares = live.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return { value: mean, error: Math.sqrt(squares / (live.length - 1) / live.length), left };
}

/**
 * A quantile, and its error by the order statistics that lie one binomial standard deviation to either side.
 *
 * @see David and Nagaraja (2003), Order Statistics, section 7.1, for the distribution-free interval (from memory).
 */
function quantileOf(values: Float64Array, probability: number): { value: number; error: number } {
  const sorted = values.slice().sort();
  const at = (p: number): number => infiniteSafe(sorted, Math.min(1, Math.max(0, p)));
  const value = at(probability);
  const half = Math.sqrt((probability * (1 - probability)) / sorted.length);
  const [low, high] = [at(probability - half), at(probability + half)];
  if (!Number.isFinite(value)) return { value, error: 0 };
  return { value, error: Number.isFinite(high) ? (high - low) / 2 : value - low };
}

/** A quantile among which "never" stands as infinite: infinite as soon as it reaches those. */
function infiniteSafe(sorted: Float64Array, probability: number): number {
  const last = sorted[Math.ceil(probability * (sorted.length - 1))]!;
  return Number.isFinite(last) ? quantile(sorted, probability) : last;
}
