import type { Fit } from "../../estimate/index.js";
import { quantile } from "../../numeric/index.js";
import type { Rule } from "../../rule/index.js";
import { noEffectError, noObjectiveError } from "../errors.js";
import { isProbability, type Measure } from "../measure/measure.js";
import { errorWords, measuredWords, measureUnit, measureWords } from "../measure/measure-words.js";
import { type MeasureReader, measureReader } from "../measure/read-measure.js";
import { type DecisionContext, type DecisionOptions, decisionContext } from "../setting/decision-context.js";
import { type Setting, settingOf } from "../setting/set-value.js";
import { drawReader } from "../setting/setting-margin.js";
import { checkedRange, withUnplanned } from "../setting/setting-range.js";
import { amount, opened, percentWords, plain, rounded } from "../words/amount.js";
import { conditionWords } from "../words/record-words.js";
import { findPeak, type Peak, type PeakSearch, type Place } from "./find-peak.js";
import { leftWords, readingNotes } from "./solve-notes.js";
import { solveWithin } from "./solve-within.js";

/** Options of `optimize`. */
export interface OptimizeOptions extends DecisionOptions {
  /** What is varied: a parameter, a first value such as "N[0]", or an input, whose usual level is set. */
  readonly vary: string;
  /** Lowest and highest value looked at. */
  readonly range: readonly [number, number];
  /** Measure that is to be as large as can be; give this or `minimize`. */
  readonly maximize?: Measure;
  /** Measure that is to be as small as can be; give this or `maximize`. */
  readonly minimize?: Measure;
  /** The value comes in multiples of this (1 for pieces); only they are tried. */
  readonly multiple?: number;
  /** Confidence level of the interval, between 0 and 1; default 0.95. */
  readonly level?: number;
}

/** The best setting, and how much it matters to hit it. */
export interface Optimum {
  readonly kind: "optimum";
  readonly vary: string;
  readonly unit: string;
  readonly range: readonly [number, number];
  readonly measure: string;
  /** What the measure is counted in. */
  readonly measureUnit: string;
  readonly value: number;
  readonly achieved: number;
  /** Monte-Carlo error of what is achieved; 0 where nothing is random. */
  readonly achievedError: number;
  /** Share of the paths that ended outside the range of a state, without which the measure is. */
  readonly left: number;
  /** Whether the best lies on an end of the range, so that a wider one might hold a better. */
  readonly atEnd: boolean;
  /** Settings between which the measure is the same, its best, and `value` is the near end; undefined where one is best. */
  readonly plateau: { readonly from: number; readonly to: number } | undefined;
  /** Settings between which the measure stays within 1% and within 5% of its best. */
  readonly flatness: readonly { readonly within: number; readonly from: number; readonly to: number }[];
  /** Of the best setting, from the uncertainty of a fit's parameters. */
  readonly lower: number | undefined;
  readonly upper: number | undefined;
  readonly level: number;
  /** The measure against the setting. */
  readonly curve: readonly { readonly value: number; readonly measure: number }[];
  readonly sentence: string;
}

/** Draws whose best setting is found. */
const draws = 200;

/** How a range is searched where every look is exact, and where it is a simulation. */
const exactSearch: PeakSearch = { looks: 64, tolerance: 1e-9 };
const simulatedSearch: PeakSearch = { looks: 24, tolerance: 1e-4 };

/**
 * The setting at which a measure of the projection is largest or smallest, with the flatness around it.
 *
 * The range is looked over, then searched around the best place by golden section. The objective is flat at its peak,
 * so the setting itself is known to about half the digits of the measure. Where chance has a part, every setting meets
 * the same random numbers, and the measure is its mean over the paths (a time its median), the probability, or the
 * `quantile` asked for. A setting of a fit holds from the record's end.
 *
 * @throws {ModelError} `no-such-setting` | `no-objective` | `no-effect` | `outside-projection` | `unknown-name` | `range-contradicts`.
 * @example
 * const stock = recurrence("yield = h*B\nB[t+1] = B + B*(1 - B/100) - yield");
 * const found = optimize(stock, { vary: "h", range: [0.01, 0.99], parameters: { h: 0.1 }, initial: { B: 50 }, periods: 200,
 *   maximize: { level: "yield", at: 200 } });
 * Math.round(found.achieved) // 25
 */
export function optimize(subject: Fit | Rule, options: OptimizeOptions): Optimum {
  const { vary, range, maximize, minimize, level = 0.95, multiple } = options;
  const measure = maximize ?? minimize;
  if (measure === undefined || (maximize !== undefined && minimize !== undefined)) throw noObjectiveError();
  checkedRange(subject, options);
  const context = decisionContext(subject, withUnplanned(subject, options, vary, range));
  const setting = settingOf(context, vary);
  const sign = maximize === undefined ? -1 : 1;
  const reader = measureReader(context, measure);
  const { height, known } = heights(reader, setting, sign);
  const search = { ...(reader.simulated ? simulatedSearch : exactSearch), multiple };
  const found = findPeak(height, range[0], range[1], search);
  if (found.looked.length > 1 && found.looked.every((at) => at.height === found.height))
    throw noEffectError(vary, measureWords(measure, context));
  const plateau = plateauOf(height, found, search);
  const peak = plateau === undefined ? found : { ...found, at: nearEnd(plateau, found), atEnd: false };
  const best = reader.read({ setting, value: peak.at });
  const stepped = reader.simulated || multiple !== undefined;
  const answer = {
    vary,
    unit: context.unitOf(vary),
    range,
    measure: measureWords(measure, context),
    measureUnit: measureUnit(measure, context),
    value: peak.at,
    achieved: best.value,
    achievedError: best.error,
    left: best.left,
    atEnd: peak.atEnd,
    plateau,
    flatness: [0.01, 0.05].map((within) =>
      stepped ? flatAmong(known(), peak, within) : flatWithin(height, peak, within, range),
    ),
    ...(plateau === undefined
      ? peakMargin(context, measure, setting, sign, peak.looked, level)
      : { lower: undefined, upper: undefined }),
    level,
    curve: peak.looked.map((at) => ({ value: at.at, measure: sign * at.height })),
  };
  const notes = readingNotes(context, setting, answer.value, measure, best);
  const sentence = [bestSentence(answer, measure, sign, context), ...notes].join(" ");
  return { kind: "optimum", ...answer, sentence };
}

interface Heights {
  readonly height: (at: number) => number;
  /** All places looked at, by increasing setting. */
  readonly known: () => readonly Place[];
}

/** The objective, turned so that the best is the highest; a place without a value is the lowest. */
function heights(reader: MeasureReader, setting: Setting, sign: number): Heights {
  const found = new Map<number, number>();
  return {
    height(at) {
      const value = found.get(at) ?? sign * reader.read({ setting, value: at }).value;
      const height = Number.isNaN(value) ? Number.NEGATIVE_INFINITY : value;
      found.set(at, height);
      return height;
    },
    known: () => [...found].map(([at, height]) => ({ at, height })).sort((a, b) => a.at - b.at),
  };
}

/** The stretch of neighbouring places with the height of the peak, its ends refined; undefined where it has no equal. */
function plateauOf(
  height: Heights["height"],
  peak: Peak,
  { tolerance, multiple }: PeakSearch,
): Optimum["plateau"] {
  const { looked } = peak;
  const level = looked.map((at) => at.height === peak.height);
  const first = level.indexOf(true);
  const next = level.indexOf(false, first);
  const last = (next < 0 ? level.length : next) - 1;
  if (first < 0 || last === first) return undefined;
  const end = (inside: number, outside: number): number => {
    const [from, to] = [looked[inside]!.at, looked[outside]?.at];
    if (to === undefined) return from;
    const below = (at: number): number => (height(at) < peak.height ? 1 : 0);
    const sought = { looks: 2, edge: true, tolerance, multiple };
    return solveWithin(below, Math.min(from, to), Math.max(from, to), sought).roots[0]?.at ?? from;
  };
  return { from: end(first, first - 1), to: end(last, last + 1) };
}

/** The end of a plateau from which on the rest of the range is the same; the lower one where it lies within the range. */
function nearEnd({ from, to }: NonNullable<Optimum["plateau"]>, { looked }: Peak): number {
  return from === looked[0]!.at ? to : from;
}

const floorOf = (peak: Place, within: number): number => peak.height - within * Math.abs(peak.height);

function flatWithin(
  height: (at: number) => number,
  peak: Peak,
  within: number,
  [from, to]: readonly [number, number],
): Optimum["flatness"][number] {
  const floor = floorOf(peak, within);
  const edge = (end: number): number => {
    if (end === peak.at || height(end) >= floor) return end;
    const { roots } = solveWithin((at) => floor - height(at), Math.min(end, peak.at), Math.max(end, peak.at));
    return (end < peak.at ? roots[roots.length - 1] : roots[0])?.at ?? end;
  };
  return { within, from: edge(from), to: edge(to) };
}

/** The same from the places that were looked at, where a further look would be another simulation. */
function flatAmong(known: readonly Place[], peak: Place, within: number): Optimum["flatness"][number] {
  const floor = floorOf(peak, within);
  const top = known.findIndex(({ at }) => at === peak.at);
  let first = top;
  while (first > 0 && known[first - 1]!.height >= floor) first--;
  let last = top;
  while (last < known.length - 1 && known[last + 1]!.height >= floor) last++;
  return { within, from: known[first]!.at, to: known[last]!.at };
}

/** The best setting of every draw of a fit's parameters: each has its own history, and then the setting. */
function peakMargin(
  context: DecisionContext,
  measure: Measure,
  setting: Setting,
  sign: number,
  looked: readonly Place[],
  level: number,
): { readonly lower: number | undefined; readonly upper: number | undefined } {
  if (context.fit === undefined || isProbability(measure) || looked.length < 3)
    return { lower: undefined, upper: undefined };
  const read = drawReader(context, measure, draws);
  const each = looked.map(({ at }) => read({ setting, value: at }));
  const places = Float64Array.from({ length: draws }, (_, k) =>
    peakOf(
      looked.map(({ at }) => at),
      each.map((values) => sign * values[k]!),
    ),
  ).sort();
  return { lower: quantile(places, (1 - level) / 2), upper: quantile(places, (1 + level) / 2) };
}

/** The top of the parabola through the highest of some places and its neighbours. */
function peakOf(at: readonly number[], heightAt: readonly number[]): number {
  const top = heightAt.reduce(
    (best, next, i) => (next > heightAt[best]! || Number.isNaN(heightAt[best]!) ? i : best),
    0,
  );
  if (top === 0 || top === at.length - 1) return at[top]!;
  const [a, b, c] = [at[top - 1]!, at[top]!, at[top + 1]!];
  const [low, high] = [
    (b - a) * (heightAt[top]! - heightAt[top + 1]!),
    (b - c) * (heightAt[top]! - heightAt[top - 1]!),
  ];
  const shift = (0.5 * ((b - a) * low - (b - c) * high)) / (low - high);
  return Number.isFinite(shift) ? Math.min(c, Math.max(a, b - shift)) : b;
}

function bestSentence(
  answer: Omit<Optimum, "kind" | "sentence">,
  measure: Measure,
  sign: number,
  context: DecisionContext,
): string {
  const { vary, unit, value, lower, upper, level, achieved, achievedError } = answer;
  const spread = lower === undefined || upper === undefined ? undefined : (upper - lower) / 4;
  const margin =
    spread === undefined || !(spread > 0)
      ? ""
      : ` (${percentWords(level)} interval ${rounded(lower!, spread)} to ${rounded(upper!, spread)})`;
  const hold = conditionWords(context.rule, context.fit);
  const error =
    achievedError > 0 ? ` (Monte-Carlo error ${errorWords(measure, achievedError, context)})` : "";
  const best = `${measuredWords(measure, achieved, achievedError, context)}${error}`;
  return `${opened(answer.measure)} is ${sign > 0 ? "largest" : "smallest"}, ${best}, with ${vary} at ${amount(answer.plateau === undefined ? rounded(value, spread) : plain(value, 6), unit)}${margin}, and ${flatWords(answer)}, provided ${hold}.${leftWords(answer.left, context.paths)}`;
}

/** How far the setting may be off, and whether the range ends there. */
function flatWords({
  value,
  unit,
  plateau,
  range,
  atEnd,
  flatness,
}: Omit<Optimum, "kind" | "sentence">): string {
  if (plateau !== undefined) {
    const far = plateau.from === value ? plateau.to : plateau.from;
    const end = range.includes(far) ? ", the end of the range" : "";
    return `the same for every value looked at from there to ${amount(plain(far, 6), unit)}${end}`;
  }
  const [narrow] = flatness;
  const flat = `within 1% of that from ${plain(narrow!.from, 3)} to ${amount(plain(narrow!.to, 3), unit)}`;
  return atEnd
    ? `${flat}; that is an end of the range ${plain(range[0], 4)} to ${plain(range[1], 4)}, so a wider range may hold a better one`
    : flat;
}
