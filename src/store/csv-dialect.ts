import { csvRecords } from "./csv-records.js";
import { delimiterUnclear } from "./refusals.js";

const candidates = [",", ";", "\t", "|"] as const;
const looked = 200;

/**
 * What separates the cells, found where exactly one candidate gives every line the same number of cells.
 *
 * @param text - the beginning of the file, cut at a line's end.
 * @throws {ModelError} `delimiter-unclear` when none or several do.
 */
export function delimiterOf(text: string, path: string): string {
  const present = candidates.filter((candidate) => text.includes(candidate));
  if (present.length === 0) return ",";
  const even = present.filter((candidate) => evenWidth(text, candidate) > 1);
  if (even.length === 1) return even[0]!;
  const header = text.split(/\r\n|\r|\n/, 1)[0]!;
  if (even.length === 0) {
    // No candidate fits every line: the one that the header uses is taken, and the line that breaks it is named.
    const inHeader = present.filter((candidate) => header.includes(candidate));
    if (inHeader.length === 1) return inHeader[0]!;
    if (inHeader.length === 0 && !present.some((candidate) => candidate !== ","))
      return singleColumn(text, path, header);
  }
  throw delimiterUnclear(path, header, even.length > 1 ? even : present);
}

/** Cells in every line, or 0 when lines differ. */
function evenWidth(text: string, delimiter: string): number {
  let width = 0;
  let count = 0;
  for (const { cells } of csvRecords(text, delimiter)) {
    if (count++ === looked) break;
    if (width === 0) width = cells.length;
    else if (cells.length !== width) return 0;
  }
  return width;
}

/** A header without a comma over lines with one: decimal commas in a single column, or cells too many. */
function singleColumn(text: string, path: string, header: string): string {
  const lines = text
    .split(/\r\n|\r|\n/)
    .slice(1)
    .filter((line) => line !== "");
  if (lines.every((line) => /^-?\d*(,\d*)?$/.test(line))) return ";";
  throw delimiterUnclear(path, header, [","]);
}
