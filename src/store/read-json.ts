import { readFile } from "node:fs/promises";
import { type ColumnTable, packed, tableOfRows } from "../record/index.js";
import { decodedText } from "./decoded-text.js";
import type { ReadOptions } from "./read-options.js";
import { unreadableFile } from "./refusals.js";
import type { FileColumns } from "./stored-table.js";

/** Reads JSON: an array of row objects, one such object a line, or an object of columns of equal length. */
export async function readJson(path: string, shownPath: string, options: ReadOptions): Promise<FileColumns> {
  const text = decodedText(await readFile(path), shownPath, options.encoding);
  const table = tableOfJson(parsed(text, shownPath));
  if (table === undefined)
    throw unreadableFile(shownPath, "JSON", "it is neither rows as objects nor columns of equal length");
  const missing = new Set<unknown>(options.missing);
  const columns = table.columns.map((column) =>
    packed(Array.from<unknown>(column).map((cell) => flat(cell, missing))),
  );
  return { names: table.names, columns, found: [] };
}

function parsed(text: string, path: string): unknown {
  try {
    return JSON.parse(text);
  } catch (cause) {
    const lines = text.split("\n").filter((line) => line.trim() !== "");
    try {
      if (lines.length > 1) return lines.map((line): unknown => JSON.parse(line));
    } catch {
      // The first reason is the one to tell: the text is not a document of one value.
    }
    throw unreadableFile(path, "JSON", (cause as Error).message, cause);
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

/** A cell that is itself a list or an object is kept as its text. */
function flat(cell: unknown, missing: ReadonlySet<unknown>): unknown {
  if (cell === undefined || missing.has(cell)) return null;
  return typeof cell === "object" && cell !== null ? JSON.stringify(cell) : cell;
}
