import { type Fit, type FitOptions, fit as fitRule, problemOf } from "../../estimate/index.js";
import { type RunHooks, randomStream, ticker } from "../../numeric/index.js";
import type { Observations } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import { refuseExact } from "../refit/refuse-exact.js";
import { refuseUnsearched } from "../refusals.js";
import { type GroupChangePoint, groupChangePoint } from "./group-change-point.js";

/** Options of `changePoint`; those of a fit by least squares, with errors in the process. */
export interface ChangePointOptions
  extends Omit<FitOptions, "errors" | "intervals" | "distribution">,
    RunHooks {
  /**
   * Normal errors on the natural or on the log scale; counts are not searched for a break; default "normal".
   */
  readonly distribution?: "normal" | "lognormal";
  /** Least share of the record on either side of a break, between 0 and 0.5; default 0.15. */
  readonly leastShare?: number;
  /**
   * Records without a break that the largest F is held against; with 399 a test at 5% is exact; default 399.
   */
  readonly resamples?: number;
  /** Seed of the random numbers, a whole number; default that of the case, else 1. */
  readonly seed?: number;
}

/** A search for a break in the parameters of a rule. */
export interface ChangePoint {
  readonly kind: "change-point";
  /** The fit without a break. */
  readonly fit: Fit;
  readonly level: number;
  readonly resamples: number;
  readonly groups: readonly GroupChangePoint[];
  readonly sentence: string;
}

/**
 * Looks for one date from which all parameters of a rule take other values.
 *
 * The rule is fitted step by step before and after every date that leaves enough pairs on either side; the largest F is
 * held against its own distribution in records without a break (not against the F table, which would call a break in
 * far too many), and the interval holds the dates whose likelihood lies within its cut of the best one.
 *
 * @returns per group the date, its interval and both sets of parameters, whether or not a break is found.
 * @throws {ModelError} `break-not-searched` for counts, censored values, robust fits and groups together; `too-short-for-a-break` | `exact-fit` and those of `fit`.
 * @see Andrews, D. W. K. (1993), Tests for parameter instability and structural change with unknown change point,
 *   Econometrica 61; Diebold, F. X. and Chen, C. (1996), Testing structural stability with endogenous breakpoint, Journal
 *   of Econometrics 70: its distribution in short dynamic records, by drawing them; Eo, Y. and
 *   Morley, J. (2015), Likelihood-ratio-based confidence sets for the timing of structural breaks, Quantitative Economics
 *   6: the interval.
 * @example changePoint(crowding, counts, { distribution: "lognormal" }).groups[0].found; // false
 */
export function changePoint(
  rule: Rule,
  observations: Observations,
  options: ChangePointOptions = {},
): ChangePoint {
  const { leastShare = 0.15, resamples = 399, seed = 1, onProgress, signal, ...others } = options;
  const level = options.level ?? 0.95;
  const fit = fitRule(rule, observations, { ...others, errors: "process", intervals: "none" });
  const { kind, distribution, groups: together } = problemOf(fit);
  if (distribution === "poisson" || distribution === "negative-binomial")
    throw refuseUnsearched("counts", distribution);
  if (kind !== "least-squares") throw refuseUnsearched("censored");
  if (together !== "separate" || options.robust === true) throw refuseUnsearched("together");
  refuseExact(fit);
  const tick = ticker(options, fit.groups.length * resamples);
  let stream = randomStream(seed);
  const groups = fit.groups.map((group) => {
    const own = stream;
    stream = stream.jump();
    return groupChangePoint(fit, group, { leastShare, draws: resamples, level, tick }, own);
  });
  const sentence = groups.map((group) => group.sentence).join(" ");
  return {
    kind: "change-point",
    fit,
    level,
    resamples,
    groups,
    sentence,
  };
}
