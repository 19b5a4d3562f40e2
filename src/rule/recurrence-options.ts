import type { ProcessNoise } from "./rule.js";
import type { BoundBehaviour } from "./state-bounds.js";

/** Lowest and highest value; for a state also what happens there. */
export type Bounds =
  | readonly [number, number]
  | { readonly range: readonly [number, number]; readonly atBounds: BoundBehaviour };

/** Options of a rule. */
export interface RecurrenceOptions {
  /** Name of the rule in titles, tables and sentences; default: its text, or its name in the catalogue. */
  readonly name?: string;
  /** All parameters; any other free name is then an error. Default: every free name is a parameter. */
  readonly parameters?: readonly string[];
  /** Names that are recorded by period, as columns of the record. Only inputs can be read at [t+1]. */
  readonly inputs?: readonly string[];
  /** Unit by name, such as { N: "cells/mL", r: "1/hour" }. */
  readonly units?: Readonly<Record<string, string>>;
  /**
   * Lower and upper bound by state or parameter, as in { K: [0, Infinity] }. For a state also what happens there:
   * { N: { range: [0, 500], atBounds: "error" } }. Default: a lower bound of 0 absorbs the state (it
   * stays 0); beyond any other bound a path ends with a warning.
   */
  readonly bounds?: Readonly<Record<string, Bounds>>;
  /** Starting value of a fit, by parameter. */
  readonly start?: Readonly<Record<string, number>>;
  /** Parameters held at a value in every fit. */
  readonly fixed?: Readonly<Record<string, number>>;
  /** By state: its first value; a list, oldest first, where the rule reads past values; or "estimated". */
  readonly initial?: Readonly<Record<string, number | readonly number[] | "estimated">>;
  /** Process noise by state. */
  readonly noise?: Readonly<Record<string, ProcessNoise>>;
}
