import { ModelError } from "../../numeric/index.js";

export function noSuchRow(row: number, rows: number): ModelError {
  return new ModelError(
    "no-such-row",
    `The record has no row ${row}; its rows are 1 to ${rows}, the header not counted.`,
    { row, rows },
  );
}

export function reasonMissing(row: number, column: string): ModelError {
  const where = column === "" ? `row ${row}` : `row ${row}, ${column}`;
  return new ModelError(
    "reason-missing",
    `The correction of ${where} gives no reason. Say why: the decisions log is printed with the case.`,
    { row, column },
  );
}

export function noDecision(row: number | undefined): ModelError {
  const where = row === undefined ? "" : ` of row ${row}`;
  return new ModelError("no-decision", `There is no correction${where} to take back.`, { row });
}
