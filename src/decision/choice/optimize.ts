import type { Fit } from "../../estimate/index.js";
import { quantile } from "../../numeric/index.js";
import type { Ground } from "../../projection/index.js";
import type { Rule } from "../../rule/index.js";
import { isProbability, type Measure, measuredWords, measureWords } from "../measure/measure.js";
import { type MeasureReader, measureReader } from "../measure/read-measure.js";
import { refuseNoEffect, refuseNoObjective, refuseProbabilityObjective } from "../refusals.js";
import { type Setting, settingOf } from "../setting/set-value.js";
import { drawnGrounds } from "../setting/setting-margin.js";
import { withUnplanned } from "../setting/setting-range.js";
import { type Standing, type StandingOptions, standingOf } from "../setting/standing.js";
import { amount, levelWords, opened, plain, rounded } from "../words/amount.js";
import { conditionWords } from "../words/record-words.js";
import { findPeak } from "./find-peak.js";
import { signNotes } from "./solve-notes.js";
import { solveWithin } from "./solve-within.js";

/** Options of `best`. */
export interface OptimizeOptions extends StandingOptions {
  /** A parameter, a first value such as "N[0]", or an input whose usual level is chosen. */
  readonly vary: string;
  readonly range: readonly [number, number];
  /** What is to be as large as can be; give this or `least`. */
  readonly maximize?: Measure;
  readonly minimize?: Measure;
  /** Level of the interval; default 0.95. */
  readonly level?: number;
}

/** The best setting, and how much it matters to hit it. */
export interface Optimum {
  readonly kind: "optimum";
  readonly vary: string;
  readonly unit: string;
  readonly range: readonly [number, number];
  readonly measure: string;
  readonly value: number;
  readonly achieved: number;
  /** Whether the best lies on an end of the range, so that a wider one might hold a better. */
  readonly atEnd: boolean;
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

/**
 * The setting at which a measure of the projection is largest or smallest, with the flatness around it.
 *
 * The range is looked over at 64 places, then searched around the best of them by golden section and parabola. The
 * objective is flat at its peak, so the setting itself is known to about half the digits of the measure.
 *
 * @throws {ModelError} `no-such-setting` | `no-objective` | `no-effect` | `outside-projection` | `unknown-name`.
 * @example
 * const stock = recurrence("yield = h*B\nB[t+1] = B + B*(1 - B/100) - yield");
 * const found = optimize(stock, { vary: "h", range: [0.01, 0.99], parameters: { h: 0.1 }, initial: { B: 50 }, periods: 200,
 *   maximize: { level: "yield", at: 200 } });
 * Math.round(found.achieved) // 25
 */
export function optimize(subject: Fit | Rule, options: OptimizeOptions): Optimum {
  const { vary: name, range: between, maximize: most, minimize: least, level = 0.95 } = options;
  const measure = most ?? least;
  if (measure === undefined || (most !== undefined && least !== undefined)) throw refuseNoObjective();
  if (isProbability(measure)) throw refuseProbabilityObjective();
  const standing = standingOf(subject, withUnplanned(subject, options, name, between));
  const setting = settingOf(standing, name);
  const sign = most === undefined ? -1 : 1;
  const read = measureReader(standing, measure);
  const height = heightOf(read, setting, sign, standing.ground);
  const peak = findPeak(height, between[0], between[1]);
  if (peak.looked.every((at) => at.height === peak.height))
    throw refuseNoEffect(name, measureWords(measure, standing));
  const margin = peakMargin(standing, read, setting, sign, between, level);
  const answer = {
    vary: name,
    unit: standing.unitOf(name),
    range: between,
    measure: measureWords(measure, standing),
    value: peak.at,
    achieved: sign * peak.height,
    atEnd: peak.atEnd,
    flatness: [0.01, 0.05].map((within) => flatWithin(height, peak, within, between)),
    ...margin,
    level,
    curve: peak.looked.map((at) => ({ value: at.at, measure: sign * at.height })),
  };
  const notes = signNotes(standing, setting, answer.value, measure, answer.achieved);
  const sentence = [bestSentence(answer, measure, sign, standing), ...notes].join(" ");
  return { kind: "optimum", ...answer, sentence };
}

/** The objective, turned so that the best is the highest; a place without a value is the lowest. */
function heightOf(
  read: MeasureReader,
  setting: Setting,
  sign: number,
  ground: Ground,
): (at: number) => number {
  return (at) => {
    const value = sign * read(setting.at(at, ground));
    return Number.isNaN(value) ? Number.NEGATIVE_INFINITY : value;
  };
}

function flatWithin(
  height: (at: number) => number,
  peak: { readonly at: number; readonly height: number },
  within: number,
  [from, to]: readonly [number, number],
): Optimum["flatness"][number] {
  const floor = peak.height - within * Math.abs(peak.height);
  const edge = (end: number, other: number): number => {
    if (end === peak.at || height(end) >= floor) return end;
    const { roots } = solveWithin((at) => floor - height(at), Math.min(end, peak.at), Math.max(end, peak.at));
    return (end < peak.at ? roots[roots.length - 1] : roots[0]) ?? other;
  };
  return { within, from: edge(from, peak.at), to: edge(to, peak.at) };
}

function peakMargin(
  standing: Standing,
  read: MeasureReader,
  setting: Setting,
  sign: number,
  between: readonly [number, number],
  level: number,
): { readonly lower: number | undefined; readonly upper: number | undefined } {
  if (standing.fit === undefined) return { lower: undefined, upper: undefined };
  const places = drawnGrounds(standing, draws).map(
    (ground) => findPeak(heightOf(read, setting, sign, ground), between[0], between[1], 1e-6).at,
  );
  const sorted = Float64Array.from(places).sort();
  return { lower: quantile(sorted, (1 - level) / 2), upper: quantile(sorted, (1 + level) / 2) };
}

function bestSentence(
  answer: Omit<Optimum, "kind" | "sentence">,
  measure: Measure,
  sign: number,
  standing: Standing,
): string {
  const { vary, unit, value, lower, upper, level, range: between, atEnd } = answer;
  const spread = lower === undefined || upper === undefined ? undefined : (upper - lower) / 4;
  const margin =
    spread === undefined || !(spread > 0)
      ? ""
      : ` (${levelWords(level)} interval ${rounded(lower!, spread)} to ${rounded(upper!, spread)})`;
  const [narrow] = answer.flatness;
  const flat = `within 1% of that from ${plain(narrow!.from, 3)} to ${amount(plain(narrow!.to, 3), unit)}`;
  const end = atEnd
    ? `; that is an end of the range ${plain(between[0], 4)} to ${plain(between[1], 4)}, so a wider range may hold a better one`
    : "";
  const hold = conditionWords(standing.rule, standing.fit);
  const best = measuredWords(measure, answer.achieved, 0, standing);
  return `${opened(answer.measure)} is ${sign > 0 ? "largest" : "smallest"}, ${best}, with ${vary} at ${amount(rounded(value, spread), unit)}${margin}, and ${flat}${end}, provided ${hold}.`;
}
