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

export function stepWrong(step: unknown, names: readonly string[], nearest: readonly string[]): ModelError {
  const given = typeof step === "object" ? JSON.stringify(step) : step;
  return new ModelError(
    "option-wrong",
    `The option "step" is ${shown(given)}; it must be a length such as { every: 12, of: "hour" } or one of ${names.join(", ")}.${didYouMean(nearest)}`,
    { option: "step", value: step },
  );
}

export function unitUnknown(unit: unknown, units: readonly string[], nearest: readonly string[]): ModelError {
  return new ModelError(
    "unit-unknown",
    `Option \`step\`: ${shown(unit)} is not a unit of time.${didYouMean(nearest)} Units are ${units.join(", ")}. ` +
      "To count something else, name the period column after it.",
    { unit, units, nearest },
  );
}

export function beginsWrong(begins: string, unit: string): ModelError {
  return new ModelError(
    "option-wrong",
    `Option \`step\`: \`begins\` is the day on which a year begins, as month and day from 01-01 to 12-28, and goes with of: "year"; ` +
      `${shown(begins)} was given with of: "${unit}". Write step: { every: 1, of: "year", begins: "04-01" }.`,
    { begins, unit },
  );
}

function didYouMean(nearest: readonly string[]): string {
  return nearest.length === 0 ? "" : ` Did you mean ${nearest.map((name) => `"${name}"`).join(" or ")}?`;
}
