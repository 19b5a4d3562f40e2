import type { ProcessNoise } from "./rule.js";
import type { AtBound } from "./state-bounds.js";

/** Lowest and highest value; for a state also what becomes of it there. */
export type Bounds =
  | readonly [number, number]
  | { readonly range: readonly [number, number]; readonly atBounds: AtBound };

/** What can be said of a rule beside its text. */
export interface RecurrenceOptions {
  /** The only names that are parameters; any other free name is then refused. Default: every free name is one. */
  readonly parameters?: readonly string[];
  /** Names that are recorded by period: columns of the record. Only they may be read at [t+1]. */
  readonly inputs?: readonly string[];
  /** Unit by name. */
  readonly units?: Readonly<Record<string, string>>;
  /**
   * Lowest and highest admitted value by state or parameter; infinite where open. For a state also with what happens
   * there: `{ range: [0, 1], atBounds: "error" }`. Default: a state is absorbed at a lower bound of 0 (it stays 0), and
   * any other bound is an error of the rule, at which a path ends.
   */
  readonly bounds?: Readonly<Record<string, Bounds>>;
  /** Where a fit starts, by parameter. */
  readonly start?: Readonly<Record<string, number>>;
  /** Parameters that no fit changes. */
  readonly fixed?: Readonly<Record<string, number>>;
  /** By state: its first value, its first values oldest first where the rule reads past ones, or "estimated". */
  readonly initial?: Readonly<Record<string, number | readonly number[] | "estimated">>;
  /** By state: random change added in every period. */
  readonly noise?: Readonly<Record<string, ProcessNoise>>;
}
