import type { CrossedLevel } from "../../projection/index.js";
import type { AcrossUnits } from "./across-units.js";
import type { DeltaMargin } from "./delta-margin.js";

/** The question: when does a state rise or fall to a level? */
export type TimeToReachOptions = CrossedLevel & {
  /** Name of a state or quantity; default the first state. */
  readonly state?: string;
  /** Confidence level of the interval, between 0 and 1; default 0.95. */
  readonly level?: number;
  /**
   * Whether to say as well when a new unit would get there, the variance between units added; from three
   * groups on; default false.
   */
  readonly newUnit?: boolean;
};

/** The answer for one group and scenario. Times are in the unit of the period column. */
export interface GroupReach {
  readonly group: string;
  /** "" where there is a single scenario. */
  readonly scenario: string;
  /** On the path at the estimates; undefined where it does not get there within the forecast, or begins past it. */
  readonly time: number | undefined;
  /** First whole period at or past the value, on the path at the estimates. */
  readonly firstPeriod: number | undefined;
  /** Where the record itself shows the level passed: the time of the first such row. */
  readonly recorded: number | undefined;
  /** Whether the path begins at or past the level: then there is no time at which it gets there. */
  readonly beginsPast: boolean;
  /** Whether the time lies within the record, because the fitted path stands at or past the level at its end. */
  readonly withinRecord: boolean;
  /** The level as a number, at the estimates. */
  readonly levelAt: number;
  /** Across paths; a limit is undefined where that share of paths never gets there. */
  readonly lower: number | undefined;
  readonly upper: number | undefined;
  /** Half of the paths get there by then; undefined where fewer do. */
  readonly median: number | undefined;
  /** For the mean path alone, by the delta method; where errors are those of readings and all is determined. */
  readonly meanPath: DeltaMargin | undefined;
  /**
   * Share of paths that are never at or past the level from the present to the forecast's end, and its Monte-Carlo error.
   */
  readonly never: number;
  readonly neverError: number;
  /** Share of paths that ended outside the range of a state before they got there; part of `never`. */
  readonly left: number;
  readonly paths: number;
  /** By period that some path reaches first: its share of paths, and the share that is there by then. */
  readonly distribution: readonly { readonly time: number; readonly share: number; readonly by: number }[];
  /** Where the path no longer moves at the end of the forecast: the level it tends to, with the band of the level. */
  readonly tendsTo: { readonly value: number; readonly lower: number; readonly upper: number } | undefined;
  /** Last period that the forecast covers. */
  readonly lastPeriod: number;
  /** The times in words: with the period's unit, or as dates where the record has them. */
  readonly words: {
    readonly time: string | undefined;
    readonly firstPeriod: string | undefined;
    readonly lower: string | undefined;
    readonly upper: string | undefined;
    readonly recorded: string | undefined;
    /** The likeliest first periods with their chances, where more than one is likely: "month 36 (61%; month 35 39%)". */
    readonly likeliest: string | undefined;
    readonly lastPeriod: string;
  };
  readonly sentence: string;
}

/** When a state reaches a value, with its margin. */
export type TimeToReach = CrossedLevel & {
  readonly kind: "time-to-reach";
  /** The rule by its name, or by its lines. */
  readonly rule: string;
  readonly state: string;
  readonly unit: string;
  readonly periodUnit: string;
  readonly level: number;
  /** What the margin carries. */
  readonly margin: "parameters" | "parameters and process errors" | "random change";
  readonly groups: readonly GroupReach[];
  /** Where asked for: over the units of the record, their mean, and a new unit. */
  readonly across: AcrossUnits | undefined;
  readonly sentence: string;
};

/** A question with its defaults filled in. */
export type ReachQuestion = CrossedLevel &
  Pick<TimeToReach, "rule" | "state" | "unit" | "periodUnit" | "level" | "margin">;
