import type { Axis, FigureOptions, Layer, Panel } from "../figures/index.js";
import type { Column, Footnote, NumberFormat, Table, TableOptions } from "../tables/index.js";
import { anyNumber, pair } from "./common-options.js";
import type { FunctionSchema } from "./function-schema.js";
import {
  anything,
  either,
  type Fields,
  flag,
  listOf,
  numbers,
  oneOf,
  optional,
  required,
  resultOf,
  type Schema,
  shapeOf,
  text,
  type Value,
  whole,
} from "./option.js";

const partialFormat: Schema<Partial<NumberFormat>> = {
  decimal: optional(text(","), 'Decimal sign: "." or ","'),
  group: optional(text(" "), 'Put between groups of three digits before the decimal sign; "" for none'),
  currency: optional(
    text("EUR"),
    'Currency written in the heading of a money column that states no unit; "" for none',
  ),
  minorDigits: optional(
    whole(0, 2, 20),
    "Digits of the currency's minor unit (ISO 4217: 2 for most, 0 or 3 for some)",
  ),
};

const numberFormatSchema: FunctionSchema = {
  name: "numberFormat",
  takes: [],
  options: { fields: partialFormat },
  instead: oneOf("standard"),
  example: 'numberFormat({ decimal: ",", group: " ", currency: "EUR" })',
};

const column: Schema<Column> = {
  key: required(text("n", "a key of the rows"), "Where rows hold the value"),
  label: required(text("Week"), "Heading of the column"),
  unit: optional(text("EUR"), "Unit, written behind the label in brackets", '"" (none)'),
  kind: required(
    oneOf("text", "integer", "number", "estimate", "money", "percent", "probability"),
    "How a value is written",
  ),
  digits: optional(
    whole(0, 4, 100),
    "Significant digits of a number, or decimals of a percentage or probability",
    "as the kind has it",
  ),
  grouped: optional(flag, "Whether digits are set apart in thousands; false for a year", "true"),
  pairedWith: optional(
    text("standardError", "a key of the rows"),
    "Key of the standard error (estimate) or Monte-Carlo error (probability) that says how many digits count",
  ),
};

const footnote: Schema<Footnote> = {
  text: required(text("Adjusted for returns."), "What the note says"),
  column: optional(text("n", "a key of the rows"), "Column that the note is about"),
  row: optional(whole(0, 0), "Row that it is about, 0 for the first", "the column's heading"),
};

const rows = listOf(anything<object>("{ n: 1 }"), "[{ n: 1 }]", 0);

const notes: Value<readonly (string | Footnote)[]> = listOf(
  either(text("Adjusted for returns."), shapeOf(footnote, '{ text: "Adjusted.", column: "n" }')),
  '["Adjusted for returns."]',
  0,
);

const tableOptions: Schema<TableOptions> = {
  title: required(text("Levels"), "Title of the table"),
  columns: required(
    listOf(shapeOf(column, '{ key: "n", label: "Week", kind: "integer" }'), undefined, 0),
    "Columns from left to right",
  ),
  rows: required(rows, "Rows: objects that hold a value under the key of each column"),
  totals: optional(rows, "Rows set apart at the foot: sums, means"),
  notes: optional(notes, "What stands below the table"),
  limit: optional(whole(1, 40), "At most so many rows are shown; the count of the others is said", 40),
  format: optional(
    shapeOf(partialFormat, '{ decimal: "," }'),
    "How numbers are written",
    "the format in force (`numberFormat`)",
  ),
};

const tableSchema: FunctionSchema = {
  name: "table",
  takes: [],
  options: { fields: tableOptions },
  example:
    'table({ title: "Levels", columns: [{ key: "n", label: "Week", kind: "integer" }], rows: [{ n: 1 }] })',
};

const tabSeparatedSchema: FunctionSchema = {
  name: "tabSeparated",
  takes: [{ name: "table", takes: ["table"] }],
  example: "tabSeparated(table({ title, columns, rows }))",
};

const axisPeriods: Schema<NonNullable<Axis["periods"]>> = {
  axis: required(anything<NonNullable<Axis["periods"]>["axis"]>("axis"), "Axis of the periods"),
  zero: required(anyNumber, "Place of period 0"),
};

const axis: Schema<Axis> = {
  title: required(text("Week"), "What the axis measures"),
  unit: optional(text("cells/mL"), "Its unit", '"" (none)'),
  scale: optional(
    oneOf("linear", "log", "category", "date"),
    'How places lie along it: "category" for names, "date" for calendar dates as ISO text',
    '"linear"',
  ),
  periods: optional(
    shapeOf(axisPeriods, "{ axis, zero: 0 }"),
    "The periods that places on the axis stand for, where these have labels; `zero` is the place of period 0",
  ),
  ends: optional(pair, "Ends of the axis, in its unit", "what the layers need"),
  bare: optional(
    flag,
    "Whether it has no ticks and grid: where places along the axis have no meaning of their own",
    "false",
  ),
};

const axisValue = shapeOf(axis, '{ title: "Week" }');

const places = numbers("[0, 1]");
const namedPlaces = either(places, listOf(text("2026-04"), '["2026-04"]', 0));

const named: Fields = {
  name: required(text("counted"), "Name in the legend and in the text alternative"),
  style: optional(
    whole(0, 0, 1000),
    "Which of the palette's styles (colour, dash and shape together)",
    "the layer's turn in its panel",
  ),
  inLegend: optional(flag, "Whether it stands in the legend", "true"),
};

const x = required(namedPlaces, "Places along the horizontal axis");
const yes = (says: string): Fields[string] => optional(flag, says, "false");
const values = (says: string): Fields[string] => required(places, says);
const limit = (says: string): Fields[string] => optional(places, says);
const place = (says: string): Fields[string] => required(anyNumber, says);

/** By mark: what else a layer has. */
const layers: Readonly<Record<Layer["mark"], Fields>> = {
  points: {
    ...named,
    x,
    y: required(namedPlaces, "Places along the vertical axis"),
    lower: limit("Lower end of a bar through each"),
    upper: limit("Upper end of a bar through each"),
    variant: optional(
      oneOf("plain", "open", "flag"),
      "By its style's shape, hollow, or a large hollow diamond around a flagged value",
      '"plain"',
    ),
    large: yes("Whether points are drawn larger than observations are"),
    small: yes("Whether points are drawn smaller, for many frames in one figure"),
  },
  line: {
    ...named,
    x,
    y: values("Values joined in their order; NaN breaks the line"),
    dashed: yes("Whether the line is broken whatever its style says"),
    stepped: yes("Whether the value holds until the next place"),
    thin: yes("Whether the line is hair-thin: frames and baselines"),
  },
  band: {
    ...named,
    x,
    lower: values("Lower edge"),
    upper: values("Upper edge"),
    nested: optional(whole(0, 0, 100), "0 for the outermost band of a nest, then 1, 2", 0),
  },
  threshold: { ...named, y: place("Level across the whole panel") },
  vertical: {
    ...named,
    x: required(either(anyNumber, text("2026-04")), "Place marked from bottom to top"),
  },
  bars: {
    ...named,
    x,
    y: required(namedPlaces, "Heights, or names where bars are horizontal"),
    horizontal: yes("Whether bars are horizontal: then `x` holds the lengths and `y` the names"),
  },
  arrow: {
    ...named,
    x: place("Where it begins, horizontally"),
    y: place("Where it begins, vertically"),
    direction: required(oneOf("left", "right", "up", "down"), "Where it points"),
  },
  label: {
    ...named,
    x: place("Where the words begin, horizontally"),
    y: place("Where the words hang, vertically"),
  },
};

const layerExample = '{ mark: "points", name: "counted", x: [0, 1], y: [90, 83] }';

const layerValues: Value<readonly Layer[]> = listOf(
  { kind: { is: "variants", by: "mark", of: layers }, example: layerExample },
  `[${layerExample}]`,
);

const panel: Schema<Panel> = {
  title: required(text("Stock"), 'Title of the panel; "" for the only one of a figure'),
  x: required(axisValue, "Horizontal axis"),
  y: required(axisValue, "Vertical axis"),
  layers: required(layerValues, "What is drawn, in drawing order"),
};

const figureOptions: Schema<FigureOptions> = {
  title: required(text("Level"), "Title of the figure"),
  x: optional(axisValue, "Horizontal axis of the only panel"),
  y: optional(axisValue, "Vertical axis of the only panel"),
  layers: optional(layerValues, "What is drawn on the only panel, in drawing order"),
  panels: optional(
    listOf(
      shapeOf(
        panel,
        `{ title: "Stock", x: { title: "Week" }, y: { title: "Stock" }, layers: [${layerExample}] }`,
      ),
    ),
    "Several panels, in place of `x`, `y` and `layers`",
  ),
  summary: optional(text("Stock falls."), "One or two sentences that say in words what the figure shows"),
  notes: optional(listOf(text("Counted by hand."), undefined, 0), "What stands below the figure"),
  numbers: optional(
    listOf(resultOf<Table>("table", "table({ title, columns, rows })"), undefined, 0),
    "Tables shown as the numbers behind the figure",
    "what is drawn",
  ),
};

const figureSchema: FunctionSchema = {
  name: "figure",
  takes: [],
  options: { fields: figureOptions },
  example: `figure({ title: "Level", x: { title: "Week" }, y: { title: "Stock" }, layers: [${layerExample}] })`,
};

export const tableSchemas: readonly FunctionSchema[] = [
  numberFormatSchema,
  tableSchema,
  tabSeparatedSchema,
  figureSchema,
];
