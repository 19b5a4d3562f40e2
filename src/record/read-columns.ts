import { type ColumnChoice, columnChoices } from "./column-choices.js";
import { type ColumnTable, columnNamed, isEmpty, rowCount } from "./column-table.js";
import { type NumberColumn, numberColumn } from "./number-column.js";
import type { CensoringLimits, ObservationOptions } from "./observation-options.js";
import type { ObservedState } from "./observations.js";
import { optionMissing, optionWrong } from "./refusals.js";

/** A column that the options name, as numbers, one entry a row of the record; NaN where a cell is empty. */
export interface ReadColumn extends ColumnChoice {
  readonly values: Float64Array;
}

export interface ReadState extends ReadColumn {
  readonly unit: string;
  readonly censoring: Int8Array | undefined;
}

/** The columns that the options name. */
export interface ReadColumns {
  readonly states: readonly ReadState[];
  readonly inputs: readonly ReadColumn[];
  readonly weights: Float64Array | undefined;
}

/** Reads every column that the options name as numbers. */
export function readColumns(
  table: ColumnTable,
  options: ObservationOptions,
  isRead: (row: number) => boolean,
): ReadColumns {
  const [states, inputs] = [statesOf(options), inputsOf(options)];
  const choices = columnChoices(states, inputs, options);
  const limits = typeof options.censored === "object" ? options.censored : undefined;
  const numbers = (column: string, askedFor: string, signs = false): NumberColumn =>
    numberColumn(columnNamed(table, column, askedFor), column, signs, isRead);
  return {
    states: states.map(({ column, unit }, i) => {
      const { values, censoring } = numbers(column, "a value", options.censored === "signs");
      return { ...choices[i]!, unit, values, censoring: limits ? beyond(table, values, limits) : censoring };
    }),
    inputs: inputs.map(([, column], i) => ({
      ...choices[states.length + i]!,
      values: numbers(column, "an input").values,
    })),
    weights:
      options.weight === undefined
        ? undefined
        : positive(numbers(options.weight, "the weights").values, options.weight, isRead),
  };
}

function statesOf(options: ObservationOptions): readonly Omit<ObservedState, "measured">[] {
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
function inputsOf({ inputs = [] }: ObservationOptions): readonly (readonly [string, string])[] {
  return Array.isArray(inputs) ? inputs.map((name: string) => [name, name]) : Object.entries(inputs);
}

function positive(weights: Float64Array, column: string, isRead: (row: number) => boolean): Float64Array {
  const bad = weights.findIndex((weight, row) => !(weight > 0) && isRead(row));
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
