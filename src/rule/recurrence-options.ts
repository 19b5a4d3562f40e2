import type { ProcessNoise } from "./rule.js";
import type { BoundBehaviour } from "./state-bounds.js";

/** Lowest and highest value; for a state also what happens there. */
export type Bounds =
  | readonly [number, number]
  | {
      /** Lowest and highest value of the state. */
      readonly range: readonly [number, number];
      /** What becomes of the state there: it stays at the bound for good, or the path ends. */
      readonly atBounds: BoundBehaviour;
    };

/** Options of a rule. */
export interface RecurrenceOptions {
  /** Name of the rule in titles, tables and sentences; default its text, or its name in the catalogue. */
  readonly name?: string;
  /** All parameters; any other free name is then an error; default every free name. */
  readonly parameters?: readonly string[];
  /** Names that are recorded by period, as columns of the record; only inputs can be read at [t+1]. */
  readonly inputs?: readonly string[];
  /** Unit by name. */
  readonly units?: Readonly<Record<string, string>>;
  /**
   * Lower and upper bound by state or parameter, as in { K: [0, Infinity] }; for a state also what happens
   * there, { N: { range: [0, 500], atBounds: "error" } }; default a state is absorbed at a lower bound of 0
   * (it stays 0), and any other bound is an error of the rule, at which a path ends.
   */
  readonly bounds?: Readonly<Record<string, Bounds>>;
  /** Starting value of a fit, by parameter. */
  readonly start?: Readonly<Record<string, number>>;
  /** Parameters held at a value in every fit, by name. */
  readonly fixed?: Readonly<Record<string, number>>;
  /**
   * By state: its first value, its first values oldest first where the rule reads past ones, or "estimated".
   */
  readonly initial?: Readonly<Record<string, number | readonly number[] | "estimated">>;
  /** By state: random change added in every period. */
  readonly noise?: Readonly<Record<string, ProcessNoise>>;
}
