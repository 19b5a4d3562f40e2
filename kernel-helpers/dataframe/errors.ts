import { ModelError } from "../../src/numeric/index.js";

/** @param problem - what is wrong inside the value, such as "row 3 is not an object". */
export function notARecordError(value: unknown, problem?: string): ModelError {
  const given =
    value === null ? "null" : Array.isArray(value) ? "an empty array" : `a value of type ${typeof value}`;
  return new ModelError(
    "not-a-record",
    `Not a record: ${problem ?? `${given} was given`}. Give a DataFrame, an array of row objects, or an object of columns such as { week: [1, 2], stock: [90, 83] }.`,
    { problem },
  );
}
