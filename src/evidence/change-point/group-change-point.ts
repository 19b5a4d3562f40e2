import { type Fit, type GroupFit, problemOf, type Refitter } from "../../estimate/index.js";
import type { RandomStream, Tick } from "../../numeric/index.js";
import { labelAt } from "../../record/index.js";
import { refuseNoDates, refuseUnsearched } from "../refusals.js";
import { type BreakDate, breakScan } from "./break-scan.js";
import { breakSentence } from "./break-sentence.js";
import { fRatio, type SupremumDraw, supremumDraw } from "./supremum-draw.js";

/** The parameters of one part of a record. */
export interface Regime {
  /** First and last time of the part, in the period column's unit. */
  readonly from: number;
  readonly to: number;
  readonly parameters: Readonly<Record<string, number>>;
}

/** Whether, and when, the parameters of one group changed. */
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
  /** The same three as labels of the record's periods. */
  readonly labels: Readonly<Record<"date" | "earliest" | "latest", string>>;
  readonly before: Regime;
  readonly after: Regime;
  /** F at every date tried. */
  readonly trace: readonly { readonly date: number; readonly statistic: number }[];
  readonly sentence: string;
}

/** How a break is looked for. */
export interface BreakSearch {
  readonly leastShare: number;
  readonly draws: number;
  readonly level: number;
  readonly tick: Tick;
}

/** Looks for a break in one group. */
export function groupChangePoint(
  fit: Fit,
  group: GroupFit,
  search: BreakSearch,
  stream: RandomStream,
): GroupChangePoint {
  const again = problemOf(fit).group(group.group).refitter();
  if (again?.draw === undefined || again.minimisePart === undefined) throw refuseUnsearched("together");
  const dates = datesOf(again, search.leastShare);
  if (dates.length === 0) throw refuseNoDates(group.group, group.count);
  const { count, size } = again.rows;
  const scan = breakScan(again, again.minimisePart, dates);
  const best = scan.reduce((low, next) => (next.value < low.value ? next : low));
  const statistic = fRatio(group.sumOfSquares, best.value, count, size);
  const probability = chanceOf(statistic, supremumDraw(again, again.draw, dates), search, stream);
  const found = {
    group: group.group,
    statistic,
    probability,
    probabilityError: Math.sqrt((probability * (1 - probability)) / search.draws),
    found: probability <= 1 - search.level,
    ...datedBy(fit, group, again, scan, best, search.level),
  };
  return { ...found, sentence: breakSentence(found, fit, search.level) };
}

/** The likeliest date with those not told from it, the parameters on either side, and F at every date. */
function datedBy(
  fit: Fit,
  group: GroupFit,
  again: Refitter,
  scan: readonly BreakDate[],
  best: BreakDate,
  level: number,
): Pick<GroupChangePoint, "date" | "earliest" | "latest" | "labels" | "before" | "after" | "trace"> {
  const { count, size, entries } = again.rows;
  const { time, axis, index } = fit.observations.groups.find((each) => each.name === group.group)!;
  const at = ({ first }: BreakDate): number => time[entries[first]!]!;
  const label = ({ first }: BreakDate): string => labelAt(axis, index[entries[first]!]!);
  const close = scan.filter((date) => count * Math.log(date.value / best.value) <= cutOf(level));
  const parameters = (values: Float64Array): Regime["parameters"] => ({
    ...group.parameters,
    ...Object.fromEntries(again.unknowns.names.map((name, i) => [name, values[i]!])),
  });
  return {
    date: at(best),
    earliest: at(close[0]!),
    latest: at(close[close.length - 1]!),
    labels: {
      date: label(best),
      earliest: label(close[0]!),
      latest: label(close[close.length - 1]!),
    },
    before: { from: time[0]!, to: time[entries[best.first]! - 1]!, parameters: parameters(best.before) },
    after: { from: at(best), to: time[time.length - 1]!, parameters: parameters(best.after) },
    trace: scan.map((date) => ({
      date: at(date),
      statistic: fRatio(group.sumOfSquares, date.value, count, size),
    })),
  };
}

/** Share of drawn records without a break whose largest F reaches the statistic, the record itself counted in. */
function chanceOf(
  statistic: number,
  draw: SupremumDraw,
  { draws, tick }: BreakSearch,
  stream: RandomStream,
): number {
  let above = 1;
  let drawn = 1;
  for (let k = 0; k < draws; k++) {
    const largest = draw(stream);
    tick();
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
