import { columnNames } from "./column-names.js";
import { csvRecords } from "./csv-records.js";
import { sqlString } from "./database.js";
import { possibleDateOrders, unambiguousDate } from "./date-notation.js";
import { decimalSignOf } from "./number-notation.js";
import type { ReadOptions } from "./read-options.js";
import { type Relation, selectExpression } from "./relation.js";

const sampledRows = 2000;

type PlainKind = "number" | "text";

/**
 * A text file as a relation of the database engine if its first rows are plain: decimal points, no ambiguous dates,
 * rows of equal length. Undefined if cells have to be interpreted one by one.
 */
export function plainCsvRelation(
  path: string,
  head: string,
  delimiter: string,
  options: ReadOptions,
): Relation | undefined {
  const rows: (readonly string[])[] = [];
  for (const { cells } of csvRecords(head, delimiter)) if (rows.push(cells) > sampledRows) break;
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
      `read_csv(${sqlString(path)}, auto_detect = false, header = true, delim = ${sqlString(delimiter)}, quote = '"', ` +
      `escape = '"', strict_mode = true, null_padding = false, allow_quoted_nulls = false, nullstr = '', ` +
      `columns = {${types}})`,
    names: columnNames(header, found),
    kinds,
    selected: kinds.map((kind, i) => selectExpression(`c${i}`, kind)),
    found,
  };
}

/** Undefined when the column has to be read cell by cell. */
function kindOf(rows: readonly (readonly string[])[], at: number, delimiter: string): PlainKind | undefined {
  const kinds = new Set<PlainKind | undefined>();
  for (const cells of rows) if (cells[at] !== "") kinds.add(cellKind(cells[at]!, delimiter));
  return kinds.size === 1 ? [...kinds][0] : undefined;
}

function cellKind(cell: string, delimiter: string): PlainKind | undefined {
  const sign = decimalSignOf(cell);
  if (sign === undefined)
    return (possibleDateOrders(cell) ?? unambiguousDate(cell)) === undefined ? "text" : undefined;
  // Digits with a point, as the engine reads them; "1.234" is unambiguous only in a file delimited by commas.
  const plain = /^-?[\d.]+(e[+-]?\d+)?$/i.test(cell) && (sign !== "either" || delimiter === ",");
  return plain ? "number" : undefined;
}
