import type {
  FillOptions,
  LongerOptions,
  PeriodsOf,
  ShiftOptions,
  Summary,
  ToPeriodsOptions,
  WiderOptions,
  WindowOptions,
} from "../../src/record/index.js";
import { anyNumber, record } from "./common-options.js";
import type { FunctionSchema } from "./function-schema.js";
import {
  either,
  listOf,
  named,
  number,
  oneOf,
  optional,
  required,
  type Schema,
  text,
  type Value,
  whole,
} from "./option.js";
import { by, column, period, step, stepOrCalendar } from "./record-schemas.js";

const takes = [record];
const periodsOf: Schema<PeriodsOf> = { period, step, by };

const summary: Value<Summary> = oneOf<Summary>(
  "mean",
  "sum",
  "least",
  "most",
  "middle",
  "deviation",
  "last",
  "count",
);

const shiftOptions: Schema<ShiftOptions> = {
  ...periodsOf,
  column: required(column, "Column to shift"),
  steps: optional(number({ whole: true }, 1), "Periods back, or with a minus ahead", 1),
  name: optional(text("owed before"), "Name of the new column", '"owed, 1 before"'),
};

const shiftSchema: FunctionSchema = {
  name: "shift",
  takes,
  options: { fields: shiftOptions },
  example: 'shift(record, { column: "owed", period: "month", step: "month" })',
};

const windowFields: Schema<Omit<WindowOptions, "over">> = {
  ...periodsOf,
  column: required(column, "Column to summarise"),
  take: required(summary, "What is taken of the values in a window"),
  needed: optional(
    whole(1, 3),
    "Fewest values a window needs",
    "every period of it (one, in a window from the first row on)",
  ),
  name: optional(text("mean of sold"), "Name of the new column", '"mean of sold over 4"'),
};

const rollingOptions: Schema<WindowOptions & { readonly over: number }> = {
  ...windowFields,
  over: required(whole(1, 4), "Periods in the window, this one included"),
};

const rollingSchema: FunctionSchema = {
  name: "rolling",
  takes,
  options: { fields: rollingOptions },
  example: 'rolling(record, { column: "sold", over: 4, take: "mean", period: "week", step: "week" })',
};

const expandingSchema: FunctionSchema = {
  name: "expanding",
  takes,
  options: { fields: windowFields },
  example: 'expanding(record, { column: "sold", take: "sum", period: "week", step: "week" })',
};

const toPeriodsOptions: Schema<ToPeriodsOptions> = {
  ...periodsOf,
  to: required(stepOrCalendar, "Length of the longer periods, or their calendar"),
  take: optional(named(summary, '{ sold: "sum" }'), "By column, how its values become one"),
  measured: optional(
    named(oneOf("level", "flow"), '{ owed: "level", sold: "flow" }'),
    "By column, what it is: of a level the last value is taken, of a flow the sum",
  ),
};

const toPeriodsSchema: FunctionSchema = {
  name: "toPeriods",
  takes,
  options: { fields: toPeriodsOptions },
  example: 'toPeriods(record, { period: "date", step: "day", to: "month", take: { sold: "sum" } })',
};

const fillOptions: Schema<FillOptions> = {
  ...periodsOf,
  column: required(column, "Column to fill"),
  with: required(
    either(oneOf("previous", "between"), anyNumber),
    "Value of an empty cell: the one before, a line between its neighbours, or a number",
  ),
};

const fillSchema: FunctionSchema = {
  name: "fill",
  takes,
  options: { fields: fillOptions },
  example: 'fill(record, { column: "sold", with: "between", period: "week", step: "week" })',
};

const kept = required(
  either(text("week", "the name of a column"), listOf(column, '["week"]')),
  "Columns that stay, such as the period",
);

const widerOptions: Schema<WiderOptions> = {
  keep: kept,
  names: required(text("item", "the name of a column"), "Column whose cells become column names"),
  values: required(text("sold", "the name of a column"), "Column whose cells fill them"),
};

const widerSchema: FunctionSchema = {
  name: "wider",
  takes,
  options: { fields: widerOptions },
  example: 'wider(record, { keep: "week", names: "item", values: "sold" })',
};

const longerOptions: Schema<LongerOptions> = {
  keep: required(kept, "Columns that stay; every other one becomes rows"),
  names: required(text("item", "the name of a column"), "Name of the new column of names"),
  values: required(text("sold", "the name of a column"), "Name of the new column of values"),
};

const longerSchema: FunctionSchema = {
  name: "longer",
  takes,
  options: { fields: longerOptions },
  example: 'longer(record, { keep: "week", names: "item", values: "sold" })',
};

export const frameSchemas: readonly FunctionSchema[] = [
  shiftSchema,
  rollingSchema,
  expandingSchema,
  toPeriodsSchema,
  fillSchema,
  widerSchema,
  longerSchema,
];
