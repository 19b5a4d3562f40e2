import { createRequire } from "node:module";

/** The spreadsheet library, loaded on first use. */
export function workbooks(): typeof import("xlsx") {
  return createRequire(__filename)("xlsx") as typeof import("xlsx");
}
