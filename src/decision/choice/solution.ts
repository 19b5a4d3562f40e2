import type { Measure } from "../measure/measure.js";
import type { DecisionOptions } from "../setting/decision-context.js";

/** An interval for a setting, from what the record leaves uncertain. */
export interface SettingMargin {
  readonly lower: number | undefined;
  readonly upper: number | undefined;
  /** Share of draws that have no solution near by. */
  readonly without: number;
}

/**
 * What a setting is to bring about: a measure that is a value, at most it, or at least it. A time is in the numbers of
 * the period column, which on a dated record count from its first period; there a label says it better.
 */
export type Target = Measure &
  (
    | { readonly is: number; readonly atMost?: never; readonly atLeast?: never }
    | { readonly atMost: number; readonly is?: never; readonly atLeast?: never }
    | { readonly atLeast: number; readonly is?: never; readonly atMost?: never }
  );

/** A time by which something is to happen, or before which it is not, as a label of the record's periods. */
export type DatedTarget = Extract<Measure, { readonly time: string }> &
  (
    | { readonly is: string; readonly atMost?: never; readonly atLeast?: never }
    | { readonly atMost: string; readonly is?: never; readonly atLeast?: never }
    | { readonly atLeast: string; readonly is?: never; readonly atMost?: never }
  );

/** Options of `solveFor`. */
export interface SolveOptions extends DecisionOptions {
  /** What is varied: a parameter, a first value such as "N[0]", or an input, whose usual level is set. */
  readonly vary: string;
  /** What is to be met: a measure that `is` a value, is `atMost` it or `atLeast` it. */
  readonly until: Target | DatedTarget;
  /** Lowest and highest value looked at; default a hundredth to a hundred times the present one, within its bounds. */
  readonly range?: readonly [number, number];
  /**
   * The value comes in multiples of this (0.01 for money, 1 for pieces); with `atMost` and `atLeast` only
   * they are tried, with `is` the nearest is given.
   */
  readonly multiple?: number;
  /** Confidence level of the interval, between 0 and 1; default 0.95. */
  readonly level?: number;
}

/** A setting with the measure there. */
export interface Tried {
  readonly value: number;
  readonly achieved: number;
}

/** One setting that meets the target. */
export interface Solution extends Tried {
  /** Rounded to the multiple asked for. */
  readonly value: number;
  /** Before it was rounded to a multiple: where the target begins to be met; of a simulation to a 64th of it. */
  readonly exact: number;
  /** The measure at `value`, with its Monte-Carlo error where it is simulated. */
  readonly achieved: number;
  readonly achievedError: number;
  /** Share of the paths that ended outside the range of a state, without which the measure is. */
  readonly left: number;
  /** Which side of the setting meets an `atMost` or `atLeast`. */
  readonly meets: "this value only" | "this value and above" | "this value and below";
  /** Of the setting before rounding, from the uncertainty of a fit's parameters; absent for a rule, and where the measure is a probability, which carries it. */
  readonly margin: SettingMargin | undefined;
}

/** A place at which the measure jumps over the value that it is to be: the settings on either side of it. */
export interface Jump {
  readonly below: Tried;
  readonly above: Tried;
}

/** Settings that meet a target. */
export interface Solved {
  readonly kind: "solution";
  readonly vary: string;
  readonly unit: string;
  readonly target: Target;
  /** The measure in words. */
  readonly measure: string;
  /** What the measure is counted in. */
  readonly measureUnit: string;
  /** Whether the measure is simulated, so that it has a Monte-Carlo error. */
  readonly simulated: boolean;
  readonly range: readonly [number, number];
  /** The setting comes in multiples of this; undefined where any value will do. */
  readonly multiple: number | undefined;
  /** By increasing value; empty where nothing in the range meets the target, or everything does. */
  readonly solutions: readonly Solution[];
  /** Where the measure jumps over an `is`, which no setting there meets. */
  readonly jumps: readonly Jump[];
  /** Whether every setting looked at meets the target; then the smallest and the largest measure found. */
  readonly everywhere: readonly [number, number] | undefined;
  /** The nearest miss. */
  readonly nearest: Tried;
  readonly level: number;
  readonly sentence: string;
}
