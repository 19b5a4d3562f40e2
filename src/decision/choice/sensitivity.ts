import type { Fit } from "../../estimate/index.js";
import type { Ground } from "../../projection/index.js";
import type { Rule } from "../../rule/index.js";
import {
  isProbability,
  type Measure,
  measuredClause,
  measuredWords,
  measureWords,
} from "../measure/measure.js";
import { measureReader } from "../measure/read-measure.js";
import { refuseProbabilityObjective } from "../refusals.js";
import { settingOf } from "../setting/set-value.js";
import { type Standing, type StandingOptions, standingOf } from "../setting/standing.js";
import { opened, percent, plain } from "../words/amount.js";

/** Options of `sensitivity`. */
export interface SensitivityOptions extends StandingOptions {
  readonly answer: Measure;
  /** Parameters, first values and inputs to move; default what the fit estimates, or all parameters of a rule. */
  readonly vary?: readonly string[];
}

/** How an answer moves with one parameter. Infinite where a time is then never reached. */
export interface SensitivityRow {
  readonly name: string;
  readonly value: number;
  readonly unit: string;
  readonly standardError: number | undefined;
  /** The answer with the parameter one standard error lower and higher; undefined without a standard error. */
  readonly errorLower: number | undefined;
  readonly errorUpper: number | undefined;
  /** The answer with the parameter ten per cent lower and higher. */
  readonly tenthLower: number;
  readonly tenthUpper: number;
  /** Per cent of the answer for one per cent of the parameter, at the estimate; NaN where either is 0. */
  readonly elasticity: number;
}

/** What an answer depends on. */
export interface Sensitivity {
  readonly kind: "sensitivity";
  readonly measure: string;
  readonly unit: string;
  readonly answer: number;
  /** By falling effect of ten per cent. */
  readonly rows: readonly SensitivityRow[];
  readonly sentence: string;
}

/**
 * How an answer changes for one standard error and for ten per cent of each parameter, one at a time, and its
 * elasticity (central differences of a ten-thousandth).
 *
 * @throws {ModelError} `no-such-setting` | `outside-projection` | `unknown-name` | `probability-not-smooth`.
 * @example sensitivity(fitted, { periods: 12, answer: { time: "N", risesTo: 600 } }).rows.length // 3
 */
export function sensitivity(subject: Fit | Rule, options: SensitivityOptions): Sensitivity {
  if (isProbability(options.answer)) throw refuseProbabilityObjective();
  const standing = standingOf(subject, options);
  const read = measureReader(standing, options.answer);
  const answer = read(standing.ground);
  const names = options.vary ?? movable(standing);
  const rows = names.map((name) => rowOf(standing, name, read, answer)).sort((a, b) => effect(b) - effect(a));
  const measure = measureWords(options.answer, standing);
  const unit =
    "time" in options.answer
      ? standing.periodUnit
      : standing.unitOf(Object.values(options.answer)[0] as string);
  return {
    kind: "sensitivity",
    measure,
    unit,
    answer,
    rows,
    sentence: sentenceOf(options.answer, answer, rows, standing),
  };
}

function movable({ rule, fitGround }: Standing): readonly string[] {
  if (fitGround === undefined) return rule.parameters;
  return fitGround.group.estimates
    .filter((estimate, i) => fitGround.places[i]! >= 0 || estimate.role === "parameter")
    .map((estimate) => estimate.name);
}

function rowOf(
  standing: Standing,
  name: string,
  read: (ground: Ground) => number,
  answer: number,
): SensitivityRow {
  const setting = settingOf(standing, name);
  const value = setting.now ?? Number.NaN;
  const at = (moved: number): number => read(setting.at(moved));
  const error = standing.fitGround?.group.estimates.find((each) => each.name === name)?.standardError;
  const small = 1e-4 * value;
  const slope = (at(value + small) - at(value - small)) / (2 * small);
  return {
    name,
    value,
    unit: standing.unitOf(name),
    standardError: error,
    errorLower: error === undefined ? undefined : at(value - error),
    errorUpper: error === undefined ? undefined : at(value + error),
    tenthLower: at(0.9 * value),
    tenthUpper: at(1.1 * value),
    elasticity: (slope * value) / answer,
  };
}

function effect({ tenthLower, tenthUpper }: SensitivityRow): number {
  const size = Math.abs(tenthUpper - tenthLower);
  return Number.isNaN(size) ? Number.POSITIVE_INFINITY : size;
}

function sentenceOf(
  asked: Measure,
  answer: number,
  rows: readonly SensitivityRow[],
  standing: Standing,
): string {
  const said = opened(measuredClause(asked, answer, 0, standing));
  const [first] = rows;
  if (first === undefined) return `${said}; nothing was moved.`;
  const change = ([lower, upper]: readonly [number, number]): string =>
    `${measuredWords(asked, lower, 0, standing)} and ${measuredWords(asked, upper, 0, standing)}`;
  const elastic = Number.isFinite(first.elasticity)
    ? `, about ${percent(Math.abs(first.elasticity) / 100, 0)} for each 1%`
    : "";
  const errors = rows.filter((row) => row.errorUpper !== undefined);
  const loudest = errors.sort(
    (a, b) => Math.abs(b.errorUpper! - b.errorLower!) - Math.abs(a.errorUpper! - a.errorLower!),
  )[0];
  const uncertain =
    loudest === undefined
      ? ""
      : ` What the record leaves open matters most through ${loudest.name} (${plain(loudest.value, 4)}, standard error ${plain(loudest.standardError!, 2)}): one standard error either way gives ${change([loudest.errorLower!, loudest.errorUpper!])}.`;
  return `${said}; it hangs most on ${first.name}: ten per cent lower and higher give ${change([first.tenthLower, first.tenthUpper])}${elastic}.${uncertain}`;
}
