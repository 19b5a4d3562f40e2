/**
 * Where the error lies: in the rule's own steps (`process`), in the observation of a value
 * (`observation`), or in both, their shares found from the record.
 */
export type ErrorKind = "process" | "observation" | "both";

/**
 * `normal`: equal scatter at every level; `lognormal`: normal errors on the log scale; `poisson` and
 * `negative-binomial`: counts.
 */
export type ErrorDistribution = "normal" | "lognormal" | "poisson" | "negative-binomial";

/** Options of `fit`. */
export interface FitOptions {
  /**
   * Where the error lies: in the steps of the rule, in the observation of a value, or in both; it has no
   * default, because a fit states what it assumes.
   */
  readonly errors: ErrorKind;
  /**
   * Distribution of the errors: equal scatter at every level, normal on the log scale, or counts; default
   * "normal".
   */
  readonly distribution?: ErrorDistribution;
  /**
   * Standard deviation of the errors of a single reading where it is known, one number or the name of an
   * input column that holds one for every row: in the record's unit for "normal", on the log scale for
   * "lognormal" (0.1 for a coefficient of variation of 10%); with `errors: "both"` that of the observation.
   */
  readonly sd?: number | string;
  /** Parameters held at a value, by name. */
  readonly fixed?: Readonly<Record<string, number>>;
  /** Lowest and highest admitted value, by parameter or by initial state ("N[0]"). */
  readonly bounds?: Readonly<Record<string, readonly [number, number]>>;
  /** Where the search begins, by parameter or initial state; what is not named is found from the record. */
  readonly start?: Readonly<Record<string, number>>;
  /**
   * Initial states that are known exactly, by state (oldest first where the rule reads past values); otherwise a
   * trajectory fit estimates them; with `errors: "both"` the filter begins there, without error.
   */
  readonly initial?: Readonly<Record<string, number | readonly number[]>>;
  /**
   * By state: the name of an unknown factor by which the record reads it, as `{ B: "q" }` for recorded = q *
   * B.
   */
  readonly factor?: Readonly<Record<string, string>>;
  /**
   * Whether values far off the rule count for less (Huber's weights), in fits by least squares; default
   * false.
   */
  readonly robust?: boolean;
  /**
   * Each group on its own, the same parameters for all, or parameters that vary among them; default
   * "separate".
   */
  readonly groups?: "separate" | "combined" | "mixed";
  /**
   * Intervals by profile likelihood, or none where many fits are made and only estimates are wanted; default
   * "profile".
   */
  readonly intervals?: "profile" | "none";
  /** Confidence level of the interval, between 0 and 1; default 0.95. */
  readonly level?: number;
  /** Cut of the profile: small-sample F, or chi-square with sigma^2 = RSS/n; default "F". */
  readonly cut?: "F" | "chi-square";
}

/** Whether differences are of logarithms. */
export function onLogScale(options: FitOptions): boolean {
  return options.distribution === "lognormal";
}

/** Whether a record without censored values is fitted by least squares. */
export function bySquares({ errors, distribution: spread }: FitOptions): boolean {
  return errors !== "both" && spread !== "poisson" && spread !== "negative-binomial";
}
