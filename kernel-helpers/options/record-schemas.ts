import type {
  CalendarName,
  Correction,
  DifferenceOptions,
  ObservationOptions,
  StepLength,
} from "../../src/record/index.js";
import type { Format, ReadOptions, WriteOptions } from "../../src/store/index.js";
import { anyNumber, observations as observed, positive, record } from "./common-options.js";
import type { FunctionSchema } from "./function-schema.js";
import {
  anything,
  either,
  flag,
  listOf,
  named,
  type Option,
  oneOf,
  optional,
  pairOf,
  required,
  type Schema,
  shapeOf,
  text,
  type Value,
  whole,
} from "./option.js";

type Given<Name extends keyof ObservationOptions> = NonNullable<ObservationOptions[Name]>;

export const column: Value<string> = text("owed", "the name of a column");

const columns: Value<string | readonly string[]> = either(column, listOf(column, '["loan"]'));

export const stepLength: Schema<StepLength> = {
  every: required(positive, "How many units one step takes"),
  of: required(text("hour", "a unit of time"), "Unit of time, such as hour, day or month"),
  begins: optional(
    text("04-01"),
    'Month and day on which a fiscal year begins, such as "04-01"; only with years',
  ),
};

export const stepOrCalendar: Value<StepLength | CalendarName> = either(
  oneOf(
    "second",
    "minute",
    "half-hour",
    "hour",
    "day",
    "week",
    "iso-week",
    "28-day",
    "month",
    "month-end",
    "4-4-5",
    "quarter",
    "year",
    "survey-year",
  ),
  shapeOf(stepLength, '{ every: 12, of: "hour" }'),
);

/** Where the rows of a table stand. */
export const period: Option<string | readonly [string, string], "required"> = required(
  either(text("month", "the name of a column"), pairOf(column, '["year", "week"]')),
  'The period column; or a year column and one that numbers periods within it: `["year", "week"]`',
);

export const step: Option<StepLength | CalendarName, "optional"> = optional(
  { ...stepOrCalendar, example: '"month"' },
  "Length of one step, or a calendar; required, because none is assumed",
);

export const by: Option<string | readonly string[], "optional"> = optional(
  columns,
  "Columns that tell series apart: flasks, loans, items",
);

const readLimit = either(anyNumber, column);

const censoring: Schema<Exclude<Given<"censored">, string>> = {
  below: optional(readLimit, "Limit below which values are censored, or the name of a flag column"),
  above: optional(readLimit, "Limit above which values are censored, or the name of a flag column"),
};

const rowRange: Schema<Given<"rows">> = {
  from: optional(whole(1, 1), "First row", 1),
  until: optional(whole(1, 60), "Last row", "the last one of the record"),
  except: optional(either(whole(1, 12), listOf(whole(1, 12))), "Rows to leave out"),
};

const levelOrFlow = oneOf("level", "flow");
const duplicateChoice = oneOf("refuse", "average", "sum", "first", "last");

const observationOptions: Schema<ObservationOptions> = {
  period,
  step,
  value: optional(column, "The one value column; give this or `values`"),
  values: optional(named(column, '{ N: "density" }'), "Columns of values, by the state of the rules"),
  unit: optional(
    either(text("EUR"), named(text("EUR"), '{ N: "cells/mL" }')),
    "Unit of the values, or one a state",
    '"" (none)',
  ),
  by,
  where: optional(
    named(anything<Given<"where">[string]>('"sample"'), '{ kind: "sample" }'),
    'Only rows whose cells meet these: `{ kind: "sample" }`, `{ loan: ["A", "B"] }`, `{ loan: { not: "X" } }`, `{ month: { from: "2025-01", until: "2025-06" } }`',
  ),
  rows: optional(
    shapeOf(rowRange, "{ from: 5, until: 60 }"),
    "Only rows with these numbers, 1 for the first below the header: `{ from: 5, until: 60, except: [12, 13] }`",
  ),
  replicates: optional(
    column,
    "Column that tells technical replicates apart inside a series; their mean is one observation",
  ),
  weight: optional(column, "Column of weights, positive", "all 1"),
  censored: optional(
    either(oneOf("signs"), shapeOf(censoring, "{ below: 0.05 }")),
    '`"signs"` reads cells such as "<0.05"; or limits as numbers or flag columns',
  ),
  measured: optional(
    either(levelOrFlow, named(levelOrFlow, '{ owed: "level", paid: "flow" }')),
    'A level at an instant, or a flow over the period that ends at the row; or one a column, inputs included: `{ owed: "level", paid: "flow" }`',
    '"level"',
  ),
  order: optional(
    text("interest, then payment"),
    "Order of events inside a period, in words; printed with every rule",
  ),
  inputs: optional(
    either(listOf(column, '["paid"]', 0), named(column, '{ C: "caught" }')),
    "Columns that drive the rule: names, or columns by the name of the input",
  ),
  duplicates: optional(
    either(duplicateChoice, named(duplicateChoice, '{ owed: "last", paid: "first" }')),
    'Two rows of one period: what a level takes of them; columns measured as flows are added up. Or one choice a column: `{ owed: "last", paid: "first" }`',
    '"refuse"',
  ),
  disorder: optional(oneOf("refuse", "sort"), "Rows out of order: refused, or sorted by period", '"refuse"'),
  offStep: optional(
    oneOf("refuse", "nearest"),
    "Rows between steps: refused when more than a tenth of a step off, or put on the nearest",
    '"refuse"',
  ),
  identities: optional(
    listOf(text("closing = opening + interest - paid")),
    'Sums that must foot, such as "closing = opening + interest - paid" or "opening = closing[t-1]"',
  ),
};

const observationsSchema: FunctionSchema = {
  name: "observations",
  takes: [record],
  options: { fields: observationOptions },
  example: 'observations(record, { period: "month", step: "month", value: "owed" })',
};

const differenceOptions: Schema<DifferenceOptions> = {
  order: optional(
    whole(1, 1, 100),
    "How many times differences are taken; a second difference needs three rows without a gap",
    1,
  ),
  lag: optional(
    whole(1, 1, 1_000_000),
    "How many steps apart the two rows lie; with 1 a gap gives a multi-step pair",
    1,
  ),
  per: optional(
    oneOf("step", "value", "log"),
    "What `difference` holds: the change, the change per value, or that of logarithms",
    '"step"',
  ),
  seasonal: optional(
    whole(1, 12, 1_000_000),
    "Steps in a season, 12 for months of a year: first takes the difference to the season before",
  ),
};

const differencesSchema: FunctionSchema = {
  name: "differences",
  takes: [{ ...observed, name: "record" }],
  options: { fields: differenceOptions },
  example: 'differences(observations, { per: "log" })',
};

const format = optional(
  oneOf<Format>("csv", "tsv", "json", "parquet", "excel", "duckdb"),
  "What the file holds",
  "what its extension says",
);

const readOptions: Schema<ReadOptions> = {
  format,
  delimiter: optional(
    text(";"),
    'What separates the cells of a text file: ",", ";", a tab or "|"; found where the file shows it',
  ),
  decimal: optional(
    oneOf(".", ","),
    "Decimal sign of a text file; the other sign is then taken as separator of thousands",
  ),
  dates: optional(
    oneOf("day-month-year", "month-day-year", "text"),
    'Order of dates written with numbers, or "text" to leave them as they are',
  ),
  missing: optional(
    listOf(text("n.d."), '["n.d."]', 0),
    'Texts that mean a missing value, such as `["n.d.", "NA"]`; an empty cell always does',
  ),
  encoding: optional(
    text("windows-1252"),
    'Encoding of a text file, such as "windows-1252"',
    "UTF-8, or what its byte-order mark says",
  ),
  skip: optional(whole(0, 2), "Lines above the header", 0),
  header: optional(flag, "Whether the first row names the columns", "true"),
  table: optional(
    text("Sheet1", "the name of a sheet or table"),
    "Sheet of a workbook, or table of a database; needed where there are several",
  ),
};

const path = { name: "path", takes: text("loan.csv", "the path of a file") } as const;

const readRecordSchema: FunctionSchema = {
  name: "readRecord",
  takes: [path],
  options: { fields: readOptions },
  example: 'await readRecord("loan.csv")',
};

const writeOptions: Schema<WriteOptions> = {
  format,
  delimiter: optional(text(";"), "What separates the cells of a text file", '"," (a tab for .tsv)'),
  table: optional(
    text("record", "the name of a sheet or table"),
    "Name of the sheet, or of the table in a database file",
    '"record"',
  ),
};

const writeRecordSchema: FunctionSchema = {
  name: "writeRecord",
  takes: [{ name: "record", takes: ["record", "result"] }, path],
  options: { fields: writeOptions },
  example: 'await writeRecord(record, "loan.xlsx")',
};

const correction: Schema<Correction> = {
  row: required(whole(1, 4), "Row of the record, 1 for the first below the header"),
  column: optional(column, "Column of the cell; without it the whole row is left out"),
  now: optional(
    anything<unknown>("412"),
    "Value to use instead; null, or nothing, where the cell counts as missing",
  ),
  why: required(text("flask shaken", "a reason"), "Why; a correction without a reason is refused"),
  who: optional(text("A. K."), "Who decided"),
};

const correctSchema: FunctionSchema = {
  name: "correct",
  takes: [record],
  options: { fields: correction },
  example: 'correct(record, { row: 4, column: "owed", now: 412, why: "typing error" })',
};

const undoSchema: FunctionSchema = {
  name: "undo",
  takes: [record, { name: "row", takes: whole(1, 4), mayBeLeftOut: true }],
  example: "undo(record, 4)",
};

const decisionsLogSchema: FunctionSchema = {
  name: "decisionsLog",
  takes: [record],
  example: "decisionsLog(record)",
};

const frameSchema: FunctionSchema = {
  name: "frame",
  takes: [{ name: "record", takes: ["record", "result"] }],
  example: "frame(fit)",
};

const sourceOfSchema: FunctionSchema = {
  name: "sourceOf",
  takes: [{ name: "frame", takes: ["frame"] }],
  example: "sourceOf(readings)",
};

export const recordSchemas: readonly FunctionSchema[] = [
  observationsSchema,
  differencesSchema,
  readRecordSchema,
  writeRecordSchema,
  correctSchema,
  undoSchema,
  decisionsLogSchema,
  frameSchema,
  sourceOfSchema,
];
