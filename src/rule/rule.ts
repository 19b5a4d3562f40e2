import type { Warning } from "../numeric/index.js";
import type { NamedRule } from "./catalogue/named-rule.js";
import type { BoundBehaviour } from "./state-bounds.js";

/** Process noise of one state: added to the value (`normal`), or as a factor exp(sd*z) (`lognormal`). */
export interface ProcessNoise {
  readonly distribution: "normal" | "lognormal";
  /** For `lognormal`: whether the factor has median 1 (default) or mean 1. */
  readonly centre?: "median" | "mean";
  /** Standard deviation per period: a number, or the name of a parameter of the rule. */
  readonly sd: number | string;
}

/** A recurrence, read from text and checked. */
export interface Rule {
  readonly kind: "rule";
  /** Name in titles, tables and sentences; absent if neither the options nor the catalogue give one. */
  readonly name?: string;
  /** The text as given, normalised (NFC), comments kept. */
  readonly text: string;
  /** How the first state is stated: `X[t+1] = ...` or `ΔX = ...`. */
  readonly form: "next" | "change";
  readonly states: readonly string[];
  /**
   * Past values that the rule reads; empty for a rule without lags. The state vector of the compiled rule is the
   * states in order, followed by these.
   */
  readonly lags: readonly { readonly state: string; readonly lag: number }[];
  /** Named values within the period, in order of evaluation. */
  readonly quantities: readonly string[];
  readonly inputs: readonly string[];
  /** Parameters in order of first appearance. */
  readonly parameters: readonly string[];
  /** By name; "" or absent = no unit given. */
  readonly units: Readonly<Record<string, string>>;
  /** Lower and upper bound by parameter or state. */
  readonly bounds: Readonly<Record<string, readonly [number, number]>>;
  /** What happens at the bounds of a state, by state, where the options say so. */
  readonly atBounds: Readonly<Record<string, BoundBehaviour>>;
  /** Starting values for a fit, by parameter. */
  readonly start: Readonly<Record<string, number>>;
  /** Parameters held at a value in every fit. */
  readonly fixed: Readonly<Record<string, number>>;
  /**
   * By state, where given: the value at the first period; a list, oldest first, where the rule reads past values;
   * or "estimated".
   */
  readonly initial: Readonly<Record<string, number | readonly number[] | "estimated">>;
  /** By state, where given. */
  readonly noise: Readonly<Record<string, ProcessNoise>>;
  readonly findings: readonly Warning[];
  /** The catalogue entry of the rule, if it comes from there. */
  readonly named?: NamedRule;
}
