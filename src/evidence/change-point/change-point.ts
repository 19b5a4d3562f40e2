import { type Fit, type FitOptions, fit as fitRule, type GroupFit } from "../../estimate/index.js";
import { type RandomStream, randomStream } from "../../numeric/index.js";
import type { Observations } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import { type Refitter, refitter } from "../refit/refitter.js";
import { refuseExact } from "../refit/refuse-exact.js";
import { refuseNoDates } from "../refusals.js";
import { type BreakDate, breakScan } from "./break-scan.js";
import { breakSentence } from "./break-sentence.js";
import { fRatio, type SupremumDraw, supremumDraw } from "./supremum-draw.js";

/** Options of `changePoint`; those of a fit but for the kind of error, which is the process. */
export interface ChangePointOptions extends Omit<FitOptions, "errors" | "intervals"> {
  /** Least share of the record on either side of a break; default 0.15. */
  readonly leastShare?: number;
  /** Records without a break that the largest F is held against; default 399, with which 5% is met exactly. */
  readonly draws?: number;
  /** Default 1. */
  readonly seed?: number;
}

/** The constants of one part of a record. */
export interface Regime {
  /** First and last time of the part, in the period column's unit. */
  readonly from: number;
  readonly to: number;
  readonly constants: Readonly<Record<string, number>>;
}

/** Whether, and when, the constants of one group changed. */
export interface GroupChangePoint {
  readonly group: string;
  /** Largest F over the dates. */
  readonly statistic: number;
  /** Of one as large in a record without a break; its Monte-Carlo error. */
  readonly probability: number;
  readonly probabilityError: number;
  readonly found: boolean;
  /** Likeliest first time of the part after, and the times that the record does not tell from it. */
  readonly date: number;
  readonly earliest: number;
  readonly latest: number;
  readonly before: Regime;
  readonly after: Regime;
  /** F at every date tried. */
  readonly trace: readonly { readonly date: number; readonly statistic: number }[];
  readonly sentence: string;
}

/** A search for a break in the constants of a rule. */
export interface ChangePoint {
  readonly kind: "change-point";
  /** The fit without a break. */
  readonly fit: Fit;
  readonly level: number;
  readonly draws: number;
  readonly groups: readonly GroupChangePoint[];
  readonly sentence: string;
}

/**
 * Looks for one date from which all constants of a rule take other values.
 *
 * The rule is fitted step by step before and after every date that leaves enough pairs on either side; the largest F is
 * held against its own distribution in records without a break (not against the F table, which would call a break in
 * far too many), and the interval holds the dates whose likelihood lies within its cut of the best one.
 *
 * @returns per group the date, its interval and both sets of constants, whether or not a break is found.
 * @throws {ModelError} `too-short-for-a-break` | `exact-fit` and those of `fit`.
 * @see Andrews, D. W. K. (1993), Tests for parameter instability and structural change with unknown change point,
 *   Econometrica 61; Diebold, F. X. and Chen, C. (1996), Testing structural stability with endogenous breakpoint, Journal
 *   of Econometrics 70: its distribution in short dynamic records, by drawing them; Eo, Y. and
 *   Morley, J. (2015), Likelihood-ratio-based confidence sets for the timing of structural breaks, Quantitative Economics
 *   6: the interval.
 * @example changePoint(crowding, counts, { spread: "proportional" }).groups[0].found; // false
 */
export function changePoint(
  rule: Rule,
  observations: Observations,
  options: ChangePointOptions = {},
): ChangePoint {
  const { leastShare = 0.15, draws = 399, seed = 1, ...others } = options;
  const level = options.level ?? 0.95;
  const fit = fitRule(rule, observations, { ...others, errors: "process", intervals: "none" });
  refuseExact(fit);
  let stream = randomStream(seed);
  const groups = fit.groups.map((group) => {
    const own = stream;
    stream = stream.jump();
    return groupChangePoint(fit, group, { leastShare, draws, level }, own);
  });
  const sentence = groups.map((group) => group.sentence).join(" ");
  return Object.freeze({ kind: "change-point", fit, level, draws, groups: Object.freeze(groups), sentence });
}

interface Settings {
  readonly leastShare: number;
  readonly draws: number;
  readonly level: number;
}

function groupChangePoint(
  fit: Fit,
  group: GroupFit,
  settings: Settings,
  stream: RandomStream,
): GroupChangePoint {
  const again = refitter(fit, group);
  const dates = again ? datesOf(again, settings.leastShare) : [];
  if (again === undefined || dates.length === 0) throw refuseNoDates(group.group, group.count);
  const { count, size } = again.rows;
  const scan = breakScan(again, dates);
  const best = scan.reduce((low, next) => (next.sumOfSquares < low.sumOfSquares ? next : low));
  const statistic = fRatio(group.sumOfSquares, best.sumOfSquares, count, size);
  const probability = chanceOf(statistic, supremumDraw(fit, group, again, dates), settings.draws, stream);
  const close = scan.filter(
    (date) => count * Math.log(date.sumOfSquares / best.sumOfSquares) <= cutOf(settings.level),
  );
  const { time } = fit.observations.groups.find((each) => each.name === group.group)!;
  const at = ({ first }: BreakDate): number => time[again.rows.entries[first]!]!;
  const entry = again.rows.entries[best.first]!;
  const regime = (from: number, to: number, values: Float64Array): Regime => ({
    from,
    to,
    constants: {
      ...group.constants,
      ...Object.fromEntries(again.unknowns.names.map((name, i) => [name, values[i]!])),
    },
  });
  const found = {
    group: group.group,
    statistic,
    probability,
    probabilityError: Math.sqrt((probability * (1 - probability)) / settings.draws),
    found: probability <= 1 - settings.level,
    date: at(best),
    earliest: at(close[0]!),
    latest: at(close[close.length - 1]!),
    before: regime(time[0]!, time[entry - 1]!, best.before),
    after: regime(at(best), time[time.length - 1]!, best.after),
    trace: scan.map((date) => ({
      date: at(date),
      statistic: fRatio(group.sumOfSquares, date.sumOfSquares, count, size),
    })),
  };
  return Object.freeze({ ...found, sentence: breakSentence(found, fit, settings.level) });
}

/** Share of drawn records without a break whose largest F reaches the statistic, the record itself counted in. */
function chanceOf(statistic: number, draw: SupremumDraw, draws: number, stream: RandomStream): number {
  let above = 1;
  let drawn = 1;
  for (let k = 0; k < draws; k++) {
    const largest = draw(stream);
    if (largest === undefined) continue;
    drawn++;
    if (largest >= statistic) above++;
  }
  return above / drawn;
}

/** First compared values of parts after, leaving the share, and size + 2 values, on either side; whole rows only. */
function datesOf({ rows }: Refitter, leastShare: number): number[] {
  const least = Math.max(rows.size + 2, Math.ceil(leastShare * rows.count));
  const dates: number[] = [];
  for (let first = least; first <= rows.count - least; first++)
    if (rows.entries[first] !== rows.entries[first - 1]) dates.push(first);
  return dates;
}

/** Cut of the log-likelihood ratio against the likeliest date: (1 - exp(-x/2))^2 = level. */
const cutOf = (level: number): number => -2 * Math.log(1 - Math.sqrt(level));
