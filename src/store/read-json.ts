import { readFile } from "node:fs/promises";
import { type ColumnTable, packed, tableOfRows } from "../record/index.js";
import { decodeText } from "./decode-text.js";
import { unreadableFileError } from "./errors.js";
import type { ReadOptions } from "./read-options.js";
import type { FileColumns } from "./stored-table.js";

/** Reads JSON: an array of row objects, one such object a line, or an object of columns of equal length. */
export async function readJson(path: string, shownPath: string, options: ReadOptions): Promise<FileColumns> {
  const text = decodeText(await readFile(path), shownPath, options.encoding);
  const table = tableOfJson(parseJson(text, shownPath));
  if (table === undefined)
    throw unreadableFileError(
      shownPath,
      "JSON",
      "it contains neither an array of row objects nor columns of equal length",
    );
  const missing = new Set<unknown>(options.missing);
  const columns = table.columns.map((column) =>
    packed(Array.from<unknown>(column).map((cell) => cellValue(cell, missing))),
  );
  return { names: table.names, columns, found: [] };
}

function parseJson(text: string, path: string): unknown {
  try {
    return JSON.parse(text);
  } catch (cause) {
    const lines = text.split("\n").filter((line) => line.trim() !== "");
    try {
      if (lines.length > 1) return lines.map((line): unknown => JSON.parse(line));
    } catch {
      // The first error is reported: the text is not one JSON document.
    }
    throw unreadableFileError(path, "JSON", (cause as Error).message, cause);
  }
}

function tableOfJson(value: unknown): ColumnTable | undefined {
  const isObject = (row: unknown): row is object =>
    typeof row === "object" && row !== null && !Array.isArray(row);
  if (Array.isArray(value)) return value.every(isObject) ? tableOfRows(value) : undefined;
  if (!isObject(value)) return undefined;
  const columns = Object.entries(value);
  const lengths = new Set(columns.map(([, cells]) => (Array.isArray(cells) ? cells.length : -1)));
  if (lengths.size !== 1 || lengths.has(-1)) return undefined;
  return { names: columns.map(([name]) => name), columns: columns.map(([, cells]) => cells as unknown[]) };
}

/** A cell that is itself an array or an object is kept as text. */
function cellValue(cell: unknown, missing: ReadonlySet<unknown>): unknown {
  if (cell === undefined || missing.has(cell)) return null;
  return typeof cell === "object" && cell !== null ? JSON.stringify(cell) : cell;
}
