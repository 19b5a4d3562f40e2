import { columnNames } from "./column-names.js";
import { csvRecords } from "./csv-records.js";
import { quoted } from "./database.js";
import { dateOrdersOf, plainDate } from "./date-form.js";
import { decimalSignOf } from "./number-form.js";
import type { ReadOptions } from "./read-options.js";
import { type Relation, selectedAs } from "./relation.js";

const looked = 2000;

type PlainKind = "number" | "text";

/**
 * A text file as a relation of the database engine where its first rows are plain: decimal points, no dates to
 * put in order, rows of equal length. Undefined where a cell needs to be looked at.
 */
export function plainCsv(
  path: string,
  head: string,
  delimiter: string,
  options: ReadOptions,
): Relation | undefined {
  const rows: (readonly string[])[] = [];
  for (const { cells } of csvRecords(head, delimiter)) if (rows.push(cells) > looked) break;
  const header = rows.shift();
  if (header === undefined || header.length < 2 || rows.length === 0) return undefined;
  if (options.decimal === "," || rows.some((cells) => cells.length !== header.length)) return undefined;
  if (header.every((cell) => decimalSignOf(cell) !== undefined)) return undefined;
  const kinds = header.map((_, at) => kindOf(rows, at, delimiter));
  if (!kinds.every((kind): kind is PlainKind => kind !== undefined)) return undefined;
  const found: string[] = [];
  const types = kinds.map((kind, i) => `'c${i}': '${kind === "number" ? "DOUBLE" : "VARCHAR"}'`).join(", ");
  return {
    from:
      `read_csv(${quoted(path)}, auto_detect = false, header = true, delim = ${quoted(delimiter)}, quote = '"', ` +
      `escape = '"', strict_mode = true, null_padding = false, allow_quoted_nulls = false, nullstr = '', ` +
      `columns = {${types}})`,
    names: columnNames(header, found),
    kinds,
    selected: kinds.map((kind, i) => selectedAs(`c${i}`, kind)),
    found,
  };
}

/** Undefined when the column holds anything that must be looked at cell by cell. */
function kindOf(rows: readonly (readonly string[])[], at: number, delimiter: string): PlainKind | undefined {
  const kinds = new Set<PlainKind | undefined>();
  for (const cells of rows) if (cells[at] !== "") kinds.add(cellKind(cells[at]!, delimiter));
  return kinds.size === 1 ? [...kinds][0] : undefined;
}

function cellKind(cell: string, delimiter: string): PlainKind | undefined {
  const sign = decimalSignOf(cell);
  if (sign === undefined) return (dateOrdersOf(cell) ?? plainDate(cell)) === undefined ? "text" : undefined;
  // Digits with a point, as the engine reads them; "1.234" is plain only where commas separate the cells.
  const plain = /^-?[\d.]+(e[+-]?\d+)?$/i.test(cell) && (sign !== "either" || delimiter === ",");
  return plain ? "number" : undefined;
}
