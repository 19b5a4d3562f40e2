import type { ArgumentKind } from "./argument.js";
import type { Described, Shape } from "./option.js";

/** What a function takes before its options: a result of one of some kinds, or a plain value. */
export interface Argument {
  readonly name: string;
  readonly takes: readonly ArgumentKind[] | Described;
  readonly mayBeLeftOut?: boolean;
}

/** The number of values that a call keeps, by the option that decides about it. */
export interface Size {
  readonly option: string;
  readonly bytes: (options: Readonly<Record<string, unknown>>, given: readonly unknown[]) => number;
}

/** All that one public function may be given. */
export interface FunctionSchema {
  readonly name: string;
  readonly takes: readonly Argument[];
  /** Absent where the function has no options. */
  readonly options?: Shape;
  /** What may stand in place of the options. */
  readonly instead?: Described;
  /** A call that works, the option first that a bare number or text would be meant for. */
  readonly example: string;
  readonly sizes?: readonly Size[];
}
