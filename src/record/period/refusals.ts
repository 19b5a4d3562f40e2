import { ModelError } from "../../numeric/index.js";
import { shown } from "../refusals.js";

export function noPeriod(row: number, column: string): ModelError {
  return new ModelError(
    "no-period",
    `Row ${row}, ${column}: the period is empty, so the row has no place in the record. ` +
      "Enter the period, or correct the row so that it is left out.",
    { row, column },
  );
}

export function offStep(row: number, column: string, value: string, steps: number, step: string): ModelError {
  return new ModelError(
    "off-step",
    `Row ${row}, ${column}: ${value} lies ${Number(steps.toPrecision(6))} steps of ${step} after the first row, ` +
      'not a whole number of steps. Choose a step that divides the periods, or say offStep: "nearest".',
    { row, column, value, steps },
  );
}

export function stepMissing(column: string, closest: string, suggested: string): ModelError {
  return new ModelError(
    "step-missing",
    `The length of one step is not stated, and no length is assumed. The closest rows lie ${closest} apart in "${column}": ` +
      `say step: ${suggested} if that is one step.`,
    { column, closest, suggested },
  );
}

export function ambiguousDate(row: number, column: string, cell: unknown): ModelError {
  return new ModelError(
    "ambiguous-date",
    `Row ${row}, ${column}: ${shown(cell)} - ambiguous date. Write dates as 2026-03-31, ` +
      'or read the file with dates: "day-month-year" or dates: "month-day-year".',
    { row, column, value: cell },
  );
}

export function noSuchPeriod(
  row: number,
  columns: readonly string[],
  year: number,
  number: number,
): ModelError {
  return new ModelError(
    "no-such-period",
    `Row ${row}, ${columns.join(", ")}: the year ${year} has no period ${number}. Correct the row, or choose the calendar that numbers it so.`,
    { row, columns, year, number },
  );
}
