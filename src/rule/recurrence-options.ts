import type { ProcessNoise } from "./rule.js";

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
  /** Lowest and highest admitted value by state or parameter; infinite where open. */
  readonly bounds?: Readonly<Record<string, readonly [number, number]>>;
  /** Where a fit starts, by parameter. */
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
