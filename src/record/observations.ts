import type { Decision } from "./decisions/decision.js";
import type { Finding } from "./finding.js";
import type { Measured } from "./observation-options.js";
import type { PeriodAxis } from "./period/period-axis.js";

/** How far apart recorded periods lie: `{ every: 12, of: "hour" }` is one step of twelve hours. */
export interface StepLength {
  /** How many units one step takes. */
  readonly every: number;
  /** Unit of time, such as hour, day or month. */
  readonly of: string;
  /** Month and day on which a fiscal year begins, such as "04-01"; only with years. */
  readonly begins?: string;
}

/** One state of the record: the name rules use, the column it was read from, its unit ("" = none), level or flow. */
export interface ObservedState {
  readonly name: string;
  readonly column: string;
  readonly unit: string;
  readonly measured: Measured;
}

/** Technical replicates of one state that were averaged: how many a row, and their standard deviation. */
export interface ReplicateVariation {
  readonly count: Int32Array;
  /** Divided by count - 1; NaN where there is a single one. */
  readonly deviation: Float64Array;
}

/** Rows that hold inputs and no value. All arrays have one entry a row. */
export interface InputRows {
  readonly index: Int32Array;
  readonly inputs: Readonly<Record<string, Float64Array>>;
  /** 1-based row numbers in the record. */
  readonly rows: Int32Array;
}

/** One series of a record: one flask, one loan, one item. All arrays have one entry a kept row. */
export interface ObservedGroup {
  /** "" when the record has a single group. */
  readonly name: string;
  /** Whole steps since the first row of the group, increasing; 0 at its first row. A gap stays a gap. */
  readonly index: Int32Array;
  /** The period column as it was read, in the unit of `axis`; from the earliest row where it holds dates. */
  readonly time: Float64Array;
  /** By state name: the values, finite. */
  readonly values: Readonly<Record<string, Float64Array>>;
  /** By input name, aligned with `index`. */
  readonly inputs: Readonly<Record<string, Float64Array>>;
  /** Periods from the first value on that have inputs and no value: the inputs hold all the same. */
  readonly withoutValue?: InputRows;
  /** The axis of periods from the first row of the group on: `labelAt(axis, index)` is the label of a period. */
  readonly axis: PeriodAxis;
  /** 1-based row numbers in the record, header not counted. */
  readonly rows: Int32Array;
  /** The periods as they were written, where they are dates or pairs. */
  readonly labels?: readonly string[];
  /** Positive weights; absent when all are 1. */
  readonly weights?: Float64Array;
  /** By state name: 0 exact, -1 at or below the value, 1 at or above it; absent when all are exact. */
  readonly censoring?: Readonly<Record<string, Int8Array>>;
  /** By state name, where replicates were averaged. */
  readonly replicates?: Readonly<Record<string, ReplicateVariation>>;
}

/** A record made ready for rules: groups of values by whole steps, with what was found on the way. */
export interface Observations {
  readonly kind: "observations";
  readonly groups: readonly ObservedGroup[];
  /** Columns that tell the groups apart; absent where there is a single group. */
  readonly by?: readonly string[];
  readonly states: readonly ObservedState[];
  readonly inputs: readonly string[];
  /** Inputs stated to be flows, which add up over periods. */
  readonly flows?: readonly string[];
  /** The axis that all groups lie on; its origin is the earliest row of the record. */
  readonly axis: PeriodAxis;
  /** Order of events inside a period, as the analyst stated it; "" when not stated. */
  readonly order: string;
  readonly findings: readonly Finding[];
  /** Corrections that the analyst chose, in the order in which they were made. */
  readonly decisions?: readonly Decision[];
  readonly counts: {
    /** Rows of the record that `where` and `rows` leave aside; absent where there is none. */
    readonly aside?: number;
    readonly read: number;
    readonly used: number;
    readonly flagged: number;
    readonly corrected: number;
    /** Of those corrected, rows that an option settled and no correction names; absent where there is none. */
    readonly settled?: number;
    readonly refused: number;
  };
}
