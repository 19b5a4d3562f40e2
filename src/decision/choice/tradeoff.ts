import type { Fit } from "../../estimate/index.js";
import type { Rule } from "../../rule/index.js";
import { noValuesError } from "../errors.js";
import type { Measure } from "../measure/measure.js";
import { measuredWords, measureWords } from "../measure/measure-words.js";
import { measureReader } from "../measure/read-measure.js";
import { type DecisionContext, type DecisionOptions, decisionContext } from "../setting/decision-context.js";
import { settingOf } from "../setting/set-value.js";
import { withUnplanned } from "../setting/setting-range.js";
import { amount, plain } from "../words/amount.js";
import { leftWords, readingNotes } from "./solve-notes.js";

/** Options of `tradeoff`. */
export interface TradeoffOptions extends DecisionOptions {
  /** What is varied: a parameter, a first value such as "N[0]", or an input, whose usual level is set. */
  readonly vary: string;
  /** Values to look at: a list, or two ends with how many. */
  readonly values:
    | readonly number[]
    | {
        /** First value. */
        readonly from: number;
        /** Last value. */
        readonly to: number;
        /** How many values, ends included. */
        readonly count: number;
      };
  /** What each value brings: measures by the name they are shown under. */
  readonly answers: Readonly<Record<string, Measure>>;
}

/** What several settings bring, side by side. */
export interface Tradeoff {
  readonly kind: "tradeoff";
  readonly vary: string;
  readonly unit: string;
  /** By answer: what is measured, in words. */
  readonly measures: Readonly<Record<string, string>>;
  readonly answers: Readonly<Record<string, Measure>>;
  readonly rows: readonly TradeoffRow[];
  readonly sentence: string;
}

/** What one setting brings. */
export interface TradeoffRow {
  readonly value: number;
  /** By answer; infinite for a time that is never reached, NaN where no path stays within its range. */
  readonly answers: Readonly<Record<string, number>>;
  /** By answer: its Monte-Carlo error, 0 where nothing is random. */
  readonly errors: Readonly<Record<string, number>>;
  /** Largest share of paths that ended outside the range of a state, without which an answer is. */
  readonly left: number;
}

/**
 * Answers against a setting: time, cost and probability of each choice, all with the same random numbers.
 *
 * A setting of a fit holds from the record's end. Where chance has a part, an answer is its mean over the paths (a time
 * its median), the probability, or the `quantile` asked for, with its Monte-Carlo error.
 *
 * @throws {ModelError} `no-such-setting` | `no-values` | `unknown-name` | `outside-projection` | `nothing-random`.
 * @example
 * const stock = recurrence("B[t+1] = B + 0.5*B*(1 - B/100) - catch", { parameters: ["catch"] });
 * const found = tradeoff(stock, { vary: "catch", values: [5, 10], parameters: { catch: 5 }, initial: { B: 50 }, periods: 20,
 *   answers: { stock: { level: "B", at: 20 } } });
 * found.rows.length // 2
 */
export function tradeoff(subject: Fit | Rule, options: TradeoffOptions): Tradeoff {
  const { vary, answers } = options;
  const values = valuesOf(options.values);
  const first = values[0];
  if (first === undefined || Object.keys(answers).length === 0) throw noValuesError();
  const context = decisionContext(subject, withUnplanned(subject, options, vary, [first, first]));
  const setting = settingOf(context, vary);
  const readers = Object.entries(answers).map(([shown, measure]) => ({
    shown,
    read: measureReader(context, measure).read,
  }));
  const rows = values.map((value): TradeoffRow => {
    const found = readers.map(({ shown, read }) => [shown, read({ setting, value })] as const);
    return {
      value,
      answers: Object.fromEntries(found.map(([shown, each]) => [shown, each.value])),
      errors: Object.fromEntries(found.map(([shown, each]) => [shown, each.error])),
      left: Math.max(...found.map(([, each]) => each.left)),
    };
  });
  const measures = Object.fromEntries(
    Object.entries(answers).map(([shown, measure]) => [shown, measureWords(measure, context)]),
  );
  const unit = context.unitOf(vary);
  const notes = [rows[0]!, rows[rows.length - 1]!].flatMap((row) =>
    Object.entries(answers).flatMap(([shown, measure]) =>
      readingNotes(context, setting, row.value, measure, {
        value: row.answers[shown]!,
        error: row.errors[shown]!,
      }),
    ),
  );
  return {
    kind: "tradeoff",
    vary,
    unit,
    measures,
    answers,
    rows,
    sentence: [sentenceOf(vary, unit, rows, answers, context), ...new Set(notes)].join(" "),
  };
}

function valuesOf(values: TradeoffOptions["values"]): readonly number[] {
  if (!("count" in values)) return values;
  return Array.from({ length: values.count }, (_, i) =>
    values.count === 1 ? values.from : values.from + (i / (values.count - 1)) * (values.to - values.from),
  );
}

function sentenceOf(
  vary: string,
  unit: string,
  rows: readonly TradeoffRow[],
  answers: Tradeoff["answers"],
  context: DecisionContext,
): string {
  const ends = rows.length === 1 ? [rows[0]!] : [rows[0]!, rows[rows.length - 1]!];
  const said = ends.map((row) => {
    const each = Object.entries(answers).map(
      ([shown, measure]) =>
        `${shown} ${measuredWords(measure, row.answers[shown]!, row.errors[shown]!, context)}`,
    );
    return `with ${vary} at ${amount(plain(row.value, 6), unit)}: ${each.join(", ")}`;
  });
  const worst = ends.reduce((most, row) => (row.left > most.left ? row : most));
  const left = leftWords(
    worst.left,
    context.paths,
    ` with ${vary} at ${amount(plain(worst.value, 6), unit)}`,
  );
  return `${said.join("; ")}.${left}`.replace(/^w/, "W");
}
