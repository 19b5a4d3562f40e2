import { type ColumnTable, columnNamed, isEmpty, rowCount } from "./column-table.js";
import { numberColumn } from "./number-column.js";
import type { CensoringLimits, ObservationOptions } from "./observation-options.js";
import type { ObservedState } from "./observations.js";
import { optionMissing, optionWrong } from "./refusals.js";

/** The columns that the options name, as numbers, one entry a row of the record. */
export interface ReadColumns {
  readonly states: readonly ObservedState[];
  /** By state, in the order of `states`. */
  readonly values: readonly Float64Array[];
  readonly censoring: readonly (Int8Array | undefined)[];
  readonly inputs: ReadonlyMap<string, Float64Array>;
  readonly weights: Float64Array | undefined;
}

/** Reads every column that the options name as numbers. */
export function readColumns(table: ColumnTable, options: ObservationOptions): ReadColumns {
  const states = statesOf(options);
  const signs = options.censored === "signs";
  const read = states.map(({ column }) => numberColumn(columnNamed(table, column, "a value"), column, signs));
  const limits = typeof options.censored === "object" ? options.censored : undefined;
  return {
    states,
    values: read.map(({ values }) => values),
    censoring: read.map(({ values, censoring }) => (limits ? beyond(table, values, limits) : censoring)),
    inputs: new Map(
      inputsOf(options).map(([name, column]) => [name, plainNumbers(table, column, "an input")]),
    ),
    weights: options.weight === undefined ? undefined : weightsOf(table, options.weight),
  };
}

function plainNumbers(table: ColumnTable, column: string, askedFor: string): Float64Array {
  return numberColumn(columnNamed(table, column, askedFor), column).values;
}

function statesOf(options: ObservationOptions): readonly ObservedState[] {
  const named = options.values ?? (options.value === undefined ? {} : { [options.value]: options.value });
  const states = Object.entries(named);
  if (states.length === 0)
    throw optionMissing("value", 'Name the column of values: value: "density", or values: { N: "density" }.');
  return states.map(([name, column]) => ({ name, column, unit: unitOf(options, name, column) }));
}

function unitOf({ unit }: ObservationOptions, state: string, column: string): string {
  if (unit === undefined || typeof unit === "string") return unit ?? "";
  if (Object.hasOwn(unit, state)) return unit[state]!;
  return Object.hasOwn(unit, column) ? unit[column]! : "";
}

/** Input name and column of every input. */
export function inputsOf({ inputs = [] }: ObservationOptions): readonly (readonly [string, string])[] {
  return Array.isArray(inputs) ? inputs.map((name: string) => [name, name]) : Object.entries(inputs);
}

function weightsOf(table: ColumnTable, column: string): Float64Array {
  const weights = plainNumbers(table, column, "the weights");
  const bad = weights.findIndex((weight) => !(weight > 0));
  if (bad >= 0)
    throw optionWrong("weight", `${column}, row ${bad + 1}: ${weights[bad]}`, "a column of positive numbers");
  return weights;
}

function beyond(table: ColumnTable, values: Float64Array, limits: CensoringLimits): Int8Array {
  const rows = rowCount(table);
  const side = new Int8Array(rows);
  mark(
    side,
    -1,
    tester(table, values, limits.below, (value, limit) => value <= limit),
  );
  mark(
    side,
    1,
    tester(table, values, limits.above, (value, limit) => value >= limit),
  );
  return side;
}

function mark(side: Int8Array, as: number, isBeyond: (row: number) => boolean): void {
  for (let row = 0; row < side.length; row++) if (isBeyond(row)) side[row] = as;
}

function tester(
  table: ColumnTable,
  values: Float64Array,
  limit: number | string | undefined,
  passes: (value: number, limit: number) => boolean,
): (row: number) => boolean {
  if (limit === undefined) return () => false;
  if (typeof limit === "number") return (row) => passes(values[row]!, limit);
  const flags = columnNamed(table, limit, "a flag of censored values");
  return (row) => isRaised(flags[row]);
}

/** A flag is raised by true, a number other than 0, or any text but "no", "false" and "0". */
function isRaised(cell: unknown): boolean {
  if (isEmpty(cell)) return false;
  return typeof cell === "string" ? !/^(no|false|0)$/i.test(cell.trim()) : Boolean(cell);
}
