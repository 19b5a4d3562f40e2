import { createRequire } from "node:module";

/** The spreadsheet library, loaded when a workbook is first read or written. */
export function workbooks(): typeof import("xlsx") {
  return createRequire(__filename)("xlsx") as typeof import("xlsx");
}
