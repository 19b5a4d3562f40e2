import type { Warning } from "../../numeric/index.js";
import type { Statement } from "../syntax/expression.js";

/** A rule whose names are resolved and whose calls have the right number of arguments. */
export interface CheckedRule {
  readonly text: string;
  readonly statements: readonly Statement[];
  readonly states: readonly string[];
  readonly quantities: readonly string[];
  readonly inputs: readonly string[];
  readonly parameters: readonly string[];
  /** By state: the largest lag read; absent where only the present value is. */
  readonly lags: ReadonlyMap<string, number>;
  readonly findings: readonly Warning[];
}

/** Names declared in the options. */
export interface Declarations {
  /** Absent: every free name is a parameter. */
  readonly parameters?: readonly string[] | undefined;
  readonly inputs: readonly string[];
}
