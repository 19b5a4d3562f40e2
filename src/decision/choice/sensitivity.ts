import type { Fit } from "../../estimate/index.js";
import type { Rule } from "../../rule/index.js";
import type { Measure } from "../measure/measure.js";
import {
  errorWords,
  measuredClause,
  measuredWords,
  measureUnit,
  measureWords,
} from "../measure/measure-words.js";
import { type MeasureReader, measureReader } from "../measure/read-measure.js";
import { type DecisionContext, type DecisionOptions, decisionContext } from "../setting/decision-context.js";
import { settingOf } from "../setting/set-value.js";
import { opened, percent, plain } from "../words/amount.js";
import { leftWords } from "./solve-notes.js";

/** Options of `sensitivity`. */
export interface SensitivityOptions extends DecisionOptions {
  /** Measure whose change is wanted. */
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
  /** Monte-Carlo error of the difference between these two; 0 where nothing is random. */
  readonly tenthError: number;
  /** Per cent of the answer for one per cent of the parameter, at the estimate; NaN where either is 0. */
  readonly elasticity: number;
}

/** What an answer depends on. */
export interface Sensitivity {
  readonly kind: "sensitivity";
  readonly measure: string;
  readonly unit: string;
  readonly answer: number;
  /** Monte-Carlo error of the answer; 0 where nothing is random. */
  readonly answerError: number;
  /** By falling effect of ten per cent. */
  readonly rows: readonly SensitivityRow[];
  readonly sentence: string;
}

/**
 * How an answer changes for one standard error and for ten per cent of each parameter, one at a time, and its
 * elasticity (central differences of a ten-thousandth; of ten per cent where chance has a part).
 *
 * What a fit estimates is moved in the record as well, because an error of the estimate would have been there all along.
 * A parameter that the fit held, and an input's plan, are moved from the record's end on, as in `tradeoff`.
 *
 * @throws {ModelError} `no-such-setting` | `outside-projection` | `unknown-name` | `nothing-random`.
 * @example sensitivity(fitted, { periods: 12, answer: { time: "N", risesTo: 600 } }).rows.length // 3
 */
export function sensitivity(subject: Fit | Rule, options: SensitivityOptions): Sensitivity {
  const context = decisionContext(subject, options);
  const reader = measureReader(context, options.answer);
  const { value: answer, error: answerError, left } = reader.read();
  const names = options.vary ?? movable(context);
  const rows = names
    .map((name) => rowOf(context, name, reader, answer))
    .sort((a, b) => effect(b) - effect(a));
  return {
    kind: "sensitivity",
    measure: measureWords(options.answer, context),
    unit: measureUnit(options.answer, context),
    answer,
    answerError,
    rows,
    sentence: `${sentenceOf(options.answer, answer, answerError, rows, context)}${leftWords(left, context.paths)}`,
  };
}

function movable({ rule, fitGround }: DecisionContext): readonly string[] {
  if (fitGround === undefined) return rule.parameters;
  return fitGround.group.estimates
    .filter((estimate, i) => fitGround.places[i]! >= 0 || estimate.role === "parameter")
    .map((estimate) => estimate.name);
}

function rowOf(
  context: DecisionContext,
  name: string,
  reader: MeasureReader,
  answer: number,
): SensitivityRow {
  const setting = settingOf(context, name);
  const value = setting.now ?? Number.NaN;
  const estimate = context.fitGround?.group.estimates.find((each) => each.name === name);
  const throughout = estimate !== undefined;
  const choice = (moved: number) => ({ setting, value: moved, throughout });
  const at = (moved: number): number => reader.read(choice(moved)).value;
  const error = estimate?.standardError;
  const [tenthLower, tenthUpper] = [at(0.9 * value), at(1.1 * value)];
  const small = 1e-4 * value;
  const slope = reader.simulated
    ? (tenthUpper - tenthLower) / (0.2 * value)
    : (at(value + small) - at(value - small)) / (2 * small);
  return {
    name,
    value,
    unit: context.unitOf(name),
    standardError: error,
    errorLower: error === undefined ? undefined : at(value - error),
    errorUpper: error === undefined ? undefined : at(value + error),
    tenthLower,
    tenthUpper,
    tenthError: reader.simulated ? differenceError(reader, choice(0.9 * value), choice(1.1 * value)) : 0,
    elasticity: (slope * value) / answer,
  };
}

/** Of a mean by the differences of single paths, which meet the same chance; of a quantile as of two separate ones. */
function differenceError(
  reader: MeasureReader,
  lower: Parameters<MeasureReader["read"]>[0],
  upper: Parameters<MeasureReader["read"]>[0],
): number {
  const { kind, quantile } = reader.measure;
  if (kind === "time" || quantile !== undefined)
    return Math.hypot(reader.read(lower).error, reader.read(upper).error);
  const [low, high] = [reader.paths(lower).values, reader.paths(upper).values];
  const differences = high.map((value, path) => value - low[path]!).filter(Number.isFinite);
  const mean = differences.reduce((sum, each) => sum + each, 0) / differences.length;
  const squares = differences.reduce((sum, each) => sum + (each - mean) ** 2, 0);
  return Math.sqrt(squares / Math.max(1, differences.length - 1) / differences.length);
}

function effect({ tenthLower, tenthUpper }: SensitivityRow): number {
  const size = Math.abs(tenthUpper - tenthLower);
  return Number.isNaN(size) ? Number.POSITIVE_INFINITY : size;
}

function sentenceOf(
  asked: Measure,
  answer: number,
  error: number,
  rows: readonly SensitivityRow[],
  context: DecisionContext,
): string {
  const said = opened(measuredClause(asked, answer, error, context));
  const [first] = rows;
  if (first === undefined) return `${said}; nothing was moved.`;
  const change = ([lower, upper]: readonly [number, number]): string =>
    `${measuredWords(asked, lower, error, context)} and ${measuredWords(asked, upper, error, context)}`;
  const chance =
    first.tenthError > 0
      ? ` (Monte-Carlo error of the difference ${errorWords(asked, first.tenthError, context)})`
      : "";
  const elastic = Number.isFinite(first.elasticity)
    ? `, about ${percent(Math.abs(first.elasticity) / 100, 0)} for each 1%`
    : "";
  const errors = rows.filter((row) => row.errorUpper !== undefined);
  const widest = errors.sort(
    (a, b) => Math.abs(b.errorUpper! - b.errorLower!) - Math.abs(a.errorUpper! - a.errorLower!),
  )[0];
  const uncertain =
    widest === undefined
      ? ""
      : ` What the record leaves open matters most through ${widest.name} (${plain(widest.value, 4)}, standard error ${plain(widest.standardError!, 2)}): one standard error either way gives ${change([widest.errorLower!, widest.errorUpper!])}.`;
  return `${said}; it is most sensitive to ${first.name}: ten per cent lower and higher give ${change([first.tenthLower, first.tenthUpper])}${chance}${elastic}.${uncertain}`;
}
