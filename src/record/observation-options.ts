import type { StepLength } from "./observations.js";
import type { CalendarName } from "./period/calendar.js";
import type { RowCondition, RowRange } from "./series/choose-rows.js";

/** What to do where a series has two rows of one period; none is dropped unless the analyst says so. */
export type DuplicateChoice = "refuse" | "average" | "sum" | "first" | "last";

/** Whether a value is a level at an instant or a flow over the period that ends at its row. */
export type Measured = "level" | "flow";

/** Limits of what could be read: a number beyond which values are censored, or the name of a flag column. */
export interface CensoringLimits {
  /** Limit below which values are censored, or the name of a flag column. */
  readonly below?: number | string;
  /** Limit above which values are censored, or the name of a flag column. */
  readonly above?: number | string;
}

/** How to read a record as observations. Column names are those of the record. */
export interface ObservationOptions {
  /** The period column; or a year column and one that numbers periods within it: `["year", "week"]`. */
  readonly period: string | readonly [string, string];
  /** Length of one step, or a calendar; required, because none is assumed. */
  readonly step?: StepLength | CalendarName;
  /** The one value column; give this or `values`. */
  readonly value?: string;
  /** Columns of values, by the state of the rules. */
  readonly values?: Readonly<Record<string, string>>;
  /** Unit of the values, or one a state; default "" (none). */
  readonly unit?: string | Readonly<Record<string, string>>;
  /** Columns that tell series apart: flasks, loans, items. */
  readonly by?: string | readonly string[];
  /**
   * Only rows whose cells meet these: `{ kind: "sample" }`, `{ loan: ["A", "B"] }`, `{ loan: { not: "X" } }`,
   * `{ month: { from: "2025-01", until: "2025-06" } }`.
   */
  readonly where?: Readonly<Record<string, RowCondition>>;
  /** Only rows with these numbers, 1 for the first below the header: `{ from: 5, until: 60, except: [12, 13] }`. */
  readonly rows?: RowRange;
  /** Column that tells technical replicates apart inside a series; their mean is one observation. */
  readonly replicates?: string;
  /** Column of weights, positive; default all 1. */
  readonly weight?: string;
  /** `"signs"` reads cells such as "<0.05"; or limits as numbers or flag columns. */
  readonly censored?: "signs" | CensoringLimits;
  /**
   * A level at an instant, or a flow over the period that ends at the row; or one a column, inputs included:
   * `{ owed: "level", paid: "flow" }`; default "level".
   */
  readonly measured?: Measured | Readonly<Record<string, Measured>>;
  /** Order of events inside a period, in words; printed with every rule. */
  readonly order?: string;
  /** Columns that drive the rule: names, or columns by the name of the input. */
  readonly inputs?: readonly string[] | Readonly<Record<string, string>>;
  /**
   * Two rows of one period: what a level takes of them; columns measured as flows are added up. Or one choice
   * a column: `{ owed: "last", paid: "first" }`; default "refuse".
   */
  readonly duplicates?: DuplicateChoice | Readonly<Record<string, DuplicateChoice>>;
  /** Rows out of order: refused, or sorted by period; default "refuse". */
  readonly disorder?: "refuse" | "sort";
  /**
   * Rows between steps: refused when more than a tenth of a step off, or put on the nearest; default
   * "refuse".
   */
  readonly offStep?: "refuse" | "nearest";
  /** Sums that must foot, such as "closing = opening + interest - paid" or "opening = closing[t-1]". */
  readonly identities?: readonly string[];
}
