/** Where the scatter of the record is blamed: on the rule's own steps, or on the reading of a value. */
export type ErrorKind = "process" | "observation";

/** `constant`: equal scatter at every level; `proportional`: normal errors on the log scale. */
export type Spread = "constant" | "proportional";

/** Options of `fit`. */
export interface FitOptions {
  /** Has no default: a fit states what it assumes. */
  readonly errors: ErrorKind;
  /** Default `constant`. */
  readonly spread?: Spread;
  /** Constants held at a value. */
  readonly fixed?: Readonly<Record<string, number>>;
  /** Lowest and highest admitted value by constant or by initial state ("N[0]"). */
  readonly bounds?: Readonly<Record<string, readonly [number, number]>>;
  /** Where the search begins, by constant; what is not named is found from the record. */
  readonly start?: Readonly<Record<string, number>>;
  /** Initial states that are known exactly, by state; otherwise a trajectory fit estimates them. */
  readonly initial?: Readonly<Record<string, number>>;
  /** Level of the intervals; default 0.95. */
  readonly level?: number;
  /** Cut of the profile: small-sample F (default) or chi-square with sigma^2 = RSS/n. */
  readonly cut?: "F" | "chi-square";
}
