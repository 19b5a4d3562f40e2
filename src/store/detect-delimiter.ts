import { csvRecords } from "./csv-records.js";
import { unclearDelimiterError } from "./errors.js";

const candidates = [",", ";", "\t", "|"] as const;
const sampledRecords = 200;

/**
 * The delimiter: the one candidate that gives every line the same number of cells.
 *
 * @param text - the beginning of the file, cut at a line's end.
 * @throws {ModelError} `delimiter-unclear` when no candidate or several do.
 */
export function detectDelimiter(text: string, path: string): string {
  const present = candidates.filter((candidate) => text.includes(candidate));
  if (present.length === 0) return ",";
  const consistent = present.filter((candidate) => commonWidth(text, candidate) > 1);
  if (consistent.length === 1) return consistent[0]!;
  const header = text.split(/\r\n|\r|\n/, 1)[0]!;
  if (consistent.length === 0) {
    // No candidate fits every line: use the one in the header, so that the line that breaks it can be named.
    const inHeader = present.filter((candidate) => header.includes(candidate));
    if (inHeader.length === 1) return inHeader[0]!;
    if (inHeader.length === 0 && !present.some((candidate) => candidate !== ","))
      return singleColumn(text, path, header);
  }
  throw unclearDelimiterError(path, header, consistent.length > 1 ? consistent : present);
}

/** Cells per line, or 0 when lines differ. */
function commonWidth(text: string, delimiter: string): number {
  let width = 0;
  let count = 0;
  for (const { cells } of csvRecords(text, delimiter)) {
    if (count++ === sampledRecords) break;
    if (width === 0) width = cells.length;
    else if (cells.length !== width) return 0;
  }
  return width;
}

/** A header without a comma above lines with one: decimal commas in a single column, or surplus cells. */
function singleColumn(text: string, path: string, header: string): string {
  const lines = text
    .split(/\r\n|\r|\n/)
    .slice(1)
    .filter((line) => line !== "");
  if (lines.every((line) => /^-?\d*(,\d*)?$/.test(line))) return ";";
  throw unclearDelimiterError(path, header, [","]);
}
