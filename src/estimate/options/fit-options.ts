/**
 * Where the scatter of the record is blamed: on the rule's own steps (`process`), on the reading of a value
 * (`observation`), or on both, their shares found from the record.
 */
export type ErrorKind = "process" | "observation" | "both";

/**
 * `constant`: equal scatter at every level; `proportional`: normal errors on the log scale; `poisson` and
 * `negative-binomial`: counts; `{ sd }`: normal errors of a known standard deviation, in the unit of the record.
 */
export type Spread = "constant" | "proportional" | "poisson" | "negative-binomial" | { readonly sd: number };

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
  /** Where the search begins, by constant or initial state; what is not named is found from the record. */
  readonly start?: Readonly<Record<string, number>>;
  /**
   * Initial states that are known exactly, by state (oldest first where the rule reads past values); otherwise a
   * trajectory fit estimates them.
   */
  readonly initial?: Readonly<Record<string, number | readonly number[]>>;
  /** By state: the name of an unknown factor by which the record reads it, as `{ B: "q" }`: recorded = q * B. */
  readonly factor?: Readonly<Record<string, string>>;
  /** Lets values far off the rule count for less (Huber's weights), in fits by least squares; default false. */
  readonly robust?: boolean;
  /** `separate` (default): every group on its own; `combined`: the same constants for all; `mixed`: a spread among them. */
  readonly groups?: "separate" | "combined" | "mixed";
  /** Intervals by profile (default), or none, where many fits are made and only estimates are wanted. */
  readonly intervals?: "profile" | "none";
  /** Level of the intervals; default 0.95. */
  readonly level?: number;
  /** Cut of the profile: small-sample F (default) or chi-square with sigma^2 = RSS/n. */
  readonly cut?: "F" | "chi-square";
}

/** Whether differences are of logarithms. */
export function onLogScale(options: FitOptions): boolean {
  return options.spread === "proportional";
}

/** Whether a record without censored values is fitted by least squares. */
export function bySquares({ errors, spread }: FitOptions): boolean {
  return errors !== "both" && spread !== "poisson" && spread !== "negative-binomial";
}
