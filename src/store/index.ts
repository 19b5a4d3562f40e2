export type { Format, ReadOptions } from "./read-options.js";
export { readTable } from "./read-table.js";
export type { RecordSource, StoredTable } from "./stored-table.js";
