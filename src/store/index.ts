export type { Format, ReadOptions } from "./read-options.js";
export { readTable } from "./read-table.js";
export { holdsSeveralTables } from "./several-tables.js";
export type { RecordSource, StoredTable } from "./stored-table.js";
export { type StoredSeries, type StreamOptions, streamSeries } from "./stream-series.js";
export type { NamedTable, WriteOptions } from "./write-options.js";
export { writeTables } from "./write-tables.js";
