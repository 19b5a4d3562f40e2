import type { Direction } from "../projection/index.js";
import type { AcrossUnits } from "./across-units.js";
import type { DeltaMargin } from "./delta-margin.js";

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

/** The answer for one group and scenario. Times are in the unit of the period column. */
export interface GroupReach {
  readonly group: string;
  /** "" where there is a single scenario. */
  readonly scenario: string;
  /** On the path at the estimates; undefined where it does not get there within the forecast. */
  readonly time: number | undefined;
  /** First recorded period at or past the value, on the path at the estimates. */
  readonly firstPeriod: number | undefined;
  /** Across draws; a limit is undefined where that share of draws never gets there. */
  readonly lower: number | undefined;
  readonly upper: number | undefined;
  /** Half of the draws get there by then; undefined where fewer do. */
  readonly median: number | undefined;
  /** For the mean path alone, by the delta method; where errors are those of readings and all is determined. */
  readonly meanPath: DeltaMargin | undefined;
  /** Share of draws that never get there within the forecast, and its Monte-Carlo error. */
  readonly never: number;
  readonly neverError: number;
  /** How many draws. */
  readonly draws: number;
  /** By period that some draw reaches first: its share of draws, and the share that is there by then. */
  readonly distribution: readonly { readonly time: number; readonly share: number; readonly by: number }[];
  /** Where the path no longer moves at the end of the forecast: the level it tends to, with the band of the level. */
  readonly tendsTo: { readonly value: number; readonly lower: number; readonly upper: number } | undefined;
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
  readonly margin: "constants" | "constants and process errors" | "random change";
  readonly groups: readonly GroupReach[];
  /** Over the units of the record, where there are several and all get there: their mean, and a new unit. */
  readonly across: AcrossUnits | undefined;
  readonly sentence: string;
}

/** A question with its defaults filled in. */
export type ReachQuestion = Omit<Reach, "kind" | "groups" | "across" | "sentence">;
