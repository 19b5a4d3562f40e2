import { ModelError } from "../../src/numeric/index.js";

export function notARecord(value: unknown, at?: string): ModelError {
  const what = value === null ? "null" : Array.isArray(value) ? "an array" : typeof value;
  const where = at === undefined ? `this is ${what}` : `"${at}" is none of these`;
  return new ModelError(
    "not-a-record",
    `A record is a DataFrame, an array of row objects, or an object of columns such as { week: [1, 2], stock: [90, 83] }; ${where}.`,
    { at },
  );
}
