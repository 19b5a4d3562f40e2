import type { Fit } from "../../estimate/index.js";
import type { Rule } from "../../rule/index.js";
import { isProbability, type Measure, measuredWords, measureWords } from "../measure/measure.js";
import { expectedReader } from "../measure/read-expected.js";
import { measureReader } from "../measure/read-measure.js";
import { type Estimated, probabilityReader } from "../measure/read-probability.js";
import { refuseNoValues } from "../refusals.js";
import { type Setting, settingOf } from "../setting/set-value.js";
import { withUnplanned } from "../setting/setting-range.js";
import { type Standing, type StandingOptions, standingOf } from "../setting/standing.js";
import { amount, plain } from "../words/amount.js";
import { signNotes } from "./solve-notes.js";

/** Options of `tradeoff`. */
export interface TradeoffOptions extends StandingOptions {
  /** A parameter, a first value such as "N[0]", or an input whose usual level is chosen. */
  readonly vary: string;
  /** Settings to look at: a list, or two ends with how many. */
  readonly values: readonly number[] | { readonly from: number; readonly to: number; readonly count: number };
  /** What each setting brings, by the name it is shown under. */
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
  /** By setting: every answer, and the Monte-Carlo error of each (0 where nothing is random). */
  readonly rows: readonly {
    readonly value: number;
    readonly answers: Readonly<Record<string, number>>;
    readonly errors: Readonly<Record<string, number>>;
  }[];
  readonly sentence: string;
}

/**
 * Answers against a setting: time, cost and probability of each choice, all with the same random numbers.
 *
 * @throws {ModelError} `no-such-setting` | `no-values` | `unknown-name` | `outside-projection` | `nothing-random`.
 * @example
 * const stock = recurrence("B[t+1] = B + 0.5*B*(1 - B/100) - catch", { parameters: ["catch"] });
 * const found = tradeoff(stock, { vary: "catch", values: [5, 10], parameters: { catch: 5 }, initial: { B: 50 }, periods: 20,
 *   answers: { stock: { level: "B", at: 20 } } });
 * found.rows.length // 2
 */
export function tradeoff(subject: Fit | Rule, options: TradeoffOptions): Tradeoff {
  const { vary: name, answers } = options;
  const values = valuesOf(options.values);
  const first = values[0];
  if (first === undefined || Object.keys(answers).length === 0) throw refuseNoValues();
  const standing = standingOf(subject, withUnplanned(subject, options, name, [first, first]));
  const setting = settingOf(standing, name);
  const readers = Object.entries(answers).map(([shown, measure]) => ({
    shown,
    read: readerOf(standing, setting, measure),
  }));
  const rows = values.map((value) => {
    const found = readers.map(({ shown, read }) => [shown, read(value)] as const);
    return {
      value,
      answers: Object.fromEntries(found.map(([shown, each]) => [shown, each.value])),
      errors: Object.fromEntries(found.map(([shown, each]) => [shown, each.error])),
    };
  });
  const measures = Object.fromEntries(
    Object.entries(answers).map(([shown, measure]) => [shown, measureWords(measure, standing)]),
  );
  const unit = standing.unitOf(name);
  const notes = [rows[0]!, rows[rows.length - 1]!].flatMap((row) =>
    Object.entries(answers).flatMap(([shown, measure]) =>
      signNotes(standing, setting, row.value, measure, row.answers[shown]!),
    ),
  );
  return {
    kind: "tradeoff",
    vary: name,
    unit,
    measures,
    answers,
    rows,
    sentence: [sentenceOf(name, unit, rows, answers, standing), ...new Set(notes)].join(" "),
  };
}

function valuesOf(values: TradeoffOptions["values"]): readonly number[] {
  if (!("count" in values)) return values;
  return Array.from({ length: values.count }, (_, i) =>
    values.count === 1 ? values.from : values.from + (i / (values.count - 1)) * (values.to - values.from),
  );
}

/** Under random change what is expected is the mean over paths; times and parameters are those of the central path. */
function readerOf(standing: Standing, setting: Setting, measure: Measure): (value: number) => Estimated {
  if (isProbability(measure)) {
    const read = probabilityReader(standing, measure);
    return (value) => read(setting, value);
  }
  const random = standing.change.some((noise) => noise !== undefined);
  if (random && !("time" in measure) && !("parameter" in measure)) {
    const read = expectedReader(standing, measure);
    return (value) => read(setting, value);
  }
  const read = measureReader(standing, measure);
  return (value) => ({ value: read(setting.at(value)), error: 0 });
}

function sentenceOf(
  name: string,
  unit: string,
  rows: Tradeoff["rows"],
  answers: Tradeoff["answers"],
  standing: Standing,
): string {
  const ends = rows.length === 1 ? [rows[0]!] : [rows[0]!, rows[rows.length - 1]!];
  const said = ends.map((row) => {
    const each = Object.entries(answers).map(([shown, measure]) => {
      const value = row.answers[shown]!;
      const words =
        value === Number.POSITIVE_INFINITY
          ? "never within the projection"
          : measuredWords(measure, value, row.errors[shown]!, standing);
      return `${shown} ${words}`;
    });
    return `with ${name} at ${amount(plain(row.value, 6), unit)}: ${each.join(", ")}`;
  });
  return `${said.join("; ")}.`.replace(/^w/, "W");
}
