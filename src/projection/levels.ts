import type { Rule } from "../rule/index.js";
import type { Ground } from "./central-path.js";
import type { Starts } from "./ensemble/ensemble.js";
import {
  refuseLevelBeyond,
  refuseLevelName,
  refuseLevelValue,
  refuseNoLevel,
  refuseProjectedName,
} from "./refusals.js";

/**
 * A level to be reached: a number in the state's unit; a share of a parameter or of a first value, as
 * `{ share: 0.9, of: "K" }`; or so many powers of ten from one, as `{ logs: 6, of: "N[0]" }`. What is drawn of a
 * parameter counts for its own path.
 */
export type Level =
  | number
  | {
      /** Share of it. */
      readonly share: number;
      /** Parameter or first value that the level is relative to. */
      readonly of: string;
    }
  | {
      /** How many powers of ten from it. */
      readonly logs: number;
      /** Parameter or first value that the level is relative to. */
      readonly of: string;
    };

/** A level that is to be reached from below (`risesTo`) or from above (`fallsTo`). */
export type CrossedLevel =
  | {
      /** Level that is risen to, from below: a number, or relative to a parameter. */
      readonly risesTo: Level;
      /** Level that is fallen to, from above: a number, or relative to a parameter. */
      readonly fallsTo?: never;
    }
  | {
      /** Level that is fallen to, from above: a number, or relative to a parameter. */
      readonly fallsTo: Level;
      /** Level that is risen to, from below: a number, or relative to a parameter. */
      readonly risesTo?: never;
    };

/** A level with the side from which it is reached: 1 where values rise to it, -1 where they fall to it. */
export interface LevelSide {
  readonly level: Level;
  readonly sign: 1 | -1;
}

export function levelSide({ risesTo, fallsTo }: CrossedLevel): LevelSide {
  return risesTo === undefined ? { level: fallsTo, sign: -1 } : { level: risesTo, sign: 1 };
}

/** A level as it was asked for, without what stood beside it. */
export function crossedLevel({ risesTo, fallsTo }: CrossedLevel): CrossedLevel {
  return risesTo === undefined ? { fallsTo } : { risesTo };
}

/** Whether two levels are the same. */
export function sameLevel(a: CrossedLevel, b: CrossedLevel): boolean {
  return JSON.stringify(crossedLevel(a)) === JSON.stringify(crossedLevel(b));
}

/** Where the names that a level may be taken of have their values, for every path of a run. */
export interface LevelSource {
  readonly paths: number;
  /** The rule's parameters in order. */
  readonly names: readonly string[];
  /** [paths, names] or [names]. */
  readonly parameters: Float64Array;
  /** What each place of the first state vector is called, as in "N[0]". */
  readonly startNames: readonly string[];
  /** [paths, startNames] or [startNames]. */
  readonly initial: Float64Array;
  /** First values that are known otherwise, by such names. */
  readonly firstValues: Readonly<Record<string, number>>;
}

/**
 * A level as numbers: one for all paths, or one a path.
 *
 * @throws {ModelError} `unknown-name`.
 */
export function levelValues(asked: CrossedLevel, source: LevelSource): Float64Array {
  const { level, sign } = levelSide(asked);
  if (typeof level === "number") return Float64Array.of(level);
  const factor = "share" in level ? level.share : 10 ** (sign * level.logs);
  return valuesOf(level.of, source).map((value) => factor * value);
}

function valuesOf(name: string, source: LevelSource): Float64Array {
  const { names, parameters, startNames, initial, firstValues } = source;
  const parameter = names.indexOf(name);
  if (parameter >= 0) return columnOf(parameters, parameter, names.length);
  const start = startNames.indexOf(name);
  if (start >= 0) return columnOf(initial, start, startNames.length);
  const known = firstValues[name];
  if (known === undefined)
    throw refuseLevelName(name, [...names, ...startNames, ...Object.keys(firstValues)]);
  return Float64Array.of(known);
}

function columnOf(rows: Float64Array, place: number, width: number): Float64Array {
  return Float64Array.from({ length: rows.length / width }, (_, row) => rows[row * width + place]!);
}

/**
 * The place of a name among the states and then the quantities of a rule.
 *
 * @throws {ModelError} `unknown-name`.
 */
export function placeOf(rule: Rule, name: string): number {
  const names = [...rule.states, ...rule.quantities];
  const place = names.indexOf(name);
  if (place < 0) throw refuseProjectedName(name, names);
  return place;
}

/**
 * Refuses a level that cannot be reached: one that is no number, or beyond what bounds its state.
 *
 * @throws {ModelError} `level-not-finite` | `level-beyond-bounds` | `level-missing`.
 */
export function checkLevel(rule: Rule, name: string, asked: CrossedLevel): void {
  const { level } = levelSide(asked);
  if (level === undefined || ("risesTo" in asked && "fallsTo" in asked && asked.risesTo !== asked.fallsTo))
    throw refuseNoLevel(name);
  const factor = typeof level === "number" ? level : "share" in level ? level.share : level.logs;
  if (typeof factor !== "number" || !Number.isFinite(factor)) throw refuseLevelValue(name, factor);
  const [low, high] = rule.bounds[name] ?? [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];
  if (typeof level === "number" && (level < low || level > high))
    throw refuseLevelBeyond(name, level, low, high);
}

/** What each place of a rule's first state vector is called, as in "N[0]"; with past values the oldest is 0. */
export function startNames(rule: Rule): readonly string[] {
  const reach = Math.max(0, ...rule.lags.map(({ lag }) => lag));
  return [
    ...rule.states.map((state) => `${state}[${reach}]`),
    ...rule.lags.map(({ state, lag }) => `${state}[${reach - lag}]`),
  ];
}

/** What levels are taken of along the path at the estimates, or at the given parameters. */
export function centralLevels(ground: Ground): LevelSource {
  const { parameters, ahead } = ground;
  return levelSource(ground, { ...ground, paths: 1, size: parameters.length }, ahead?.parameters);
}

/** Where a run's levels may be taken of. */
export function levelSource(ground: Ground, starts: Starts, ahead?: Float64Array): LevelSource {
  return {
    paths: starts.paths,
    names: ground.rule.parameters,
    parameters: ahead ?? starts.parameters,
    startNames: ground.startNames,
    initial: starts.initial,
    firstValues: ground.firstValues,
  };
}
