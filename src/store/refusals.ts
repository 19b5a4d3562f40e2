import { ModelError } from "../numeric/index.js";

/** A text as it is shown in a message: shortened, in double quotes, line breaks made visible. */
function shown(text: string): string {
  const line = text.replace(/\r?\n/g, "\\n");
  return `"${line.length > 60 ? `${line.slice(0, 60)}...` : line}"`;
}

export function pathMissing(path: unknown): ModelError {
  return new ModelError(
    "path-missing",
    'The path of the file is missing; it is a text such as "data/stock.csv".',
    { path },
  );
}

export function noSuchFile(
  path: string,
  folder: string,
  nearest: readonly string[],
  cause: unknown,
): ModelError {
  const hint = nearest.length > 0 ? ` Did you mean ${nearest.map((name) => `"${name}"`).join(" or ")}?` : "";
  return new ModelError(
    "no-such-file",
    `There is no file "${path}". Paths are relative to ${folder}.${hint}`,
    { path, folder, nearest },
    cause,
  );
}

export function unreadableFile(path: string, as: string, reason: string, cause?: unknown): ModelError {
  return new ModelError(
    "unreadable-file",
    `"${path}" could not be read as ${as}: ${reason}. Check that the file is whole and that its name ends as its contents say.`,
    { path, as, reason },
    cause,
  );
}

export function formatUnknown(path: string, known: readonly string[]): ModelError {
  return new ModelError(
    "format-unknown",
    `"${path}" does not say by its ending what it holds. Say format: one of ${known.map((f) => `"${f}"`).join(", ")}.`,
    { path, known },
  );
}

export function emptyFile(path: string): ModelError {
  return new ModelError("no-data-rows", `No data rows were found. "${path}" has no row below its header.`, {
    path,
  });
}

export function encodingUnclear(path: string, line: number, text: string): ModelError {
  return new ModelError(
    "encoding-unclear",
    `Line ${line} of "${path}" is not UTF-8 text: ${shown(text)}. ` +
      'Say encoding: "windows-1252", or save the file as UTF-8 if it mixes encodings.',
    { path, line, text },
  );
}

export function encodingUnknown(path: string, encoding: string, cause: unknown): ModelError {
  return new ModelError(
    "encoding-unknown",
    `"${path}" cannot be read with the encoding "${encoding}". Say for example "utf-8", "windows-1252" or "utf-16le".`,
    { path, encoding },
    cause,
  );
}

export function delimiterUnclear(path: string, header: string, candidates: readonly string[]): ModelError {
  return new ModelError(
    "delimiter-unclear",
    `What separates the cells of "${path}" cannot be told from ${shown(header)}. ` +
      `Say delimiter: one of ${candidates.map((c) => JSON.stringify(c)).join(", ")}.`,
    { path, header, candidates },
  );
}

export function raggedRow(
  path: string,
  row: number,
  line: number,
  found: number,
  expected: number,
): ModelError {
  return new ModelError(
    "ragged-row",
    `Row ${row} (line ${line}) of "${path}" has ${found} cells where the header has ${expected}. ` +
      "A cell that holds the delimiter must be quoted. If lines stand above the header, say skip: how many.",
    { path, row, line, found, expected },
  );
}

export function unendedQuote(path: string, line: number): ModelError {
  return new ModelError(
    "unended-quote",
    `A quoted cell that begins on line ${line} of "${path}" does not end. Close the quote, or double a quote that is part of the text.`,
    { path, line },
  );
}

export function headerMissing(path: string, cells: readonly string[]): ModelError {
  return new ModelError(
    "header-missing",
    `The first row of "${path}" holds numbers, not names: ${cells.slice(0, 6).join(", ")}. ` +
      'Add a header, or say header: false; the columns are then named "column 1", "column 2" and so on.',
    { path, cells },
  );
}

export function decimalSignUnclear(row: number, column: string, cell: string): ModelError {
  return new ModelError(
    "decimal-sign-unclear",
    `Row ${row}, ${column}: '${cell}' - decimal sign unclear; choose comma or point: decimal: "," or decimal: ".".`,
    { row, column, value: cell },
  );
}

export function ambiguousDate(row: number, column: string, cell: string): ModelError {
  return new ModelError(
    "ambiguous-date",
    `Ambiguous date: row ${row}, ${column}: '${cell}'. ` +
      'Say dates: "day-month-year" or dates: "month-day-year"; dates: "text" leaves the column as it is.',
    { row, column, value: cell },
  );
}

export function mixedDates(row: number, column: string, cell: string, order: string): ModelError {
  return new ModelError(
    "mixed-dates",
    `Row ${row}, ${column}: '${cell}' is no date in the order ${order} of the other rows. ` +
      'Correct the row, or say dates: "text" to leave the column as it is.',
    { row, column, value: cell, order },
  );
}

const listed = (names: readonly string[]): string =>
  names
    .slice(0, 12)
    .map((name) => `"${name}"`)
    .join(", ");

export function tableUnclear(path: string, names: readonly string[]): ModelError {
  const held = names.length === 0 ? "no tables" : `several tables: ${listed(names)}`;
  return new ModelError(
    "table-unclear",
    `"${path}" holds ${held}. Say which one to read, for example table: ${JSON.stringify(names[0] ?? "record")}.`,
    { path, names },
  );
}

export function noSuchTable(path: string, table: string, names: readonly string[]): ModelError {
  return new ModelError(
    "no-such-table",
    `"${path}" holds no table "${table}". It holds ${names.length === 0 ? "none" : listed(names)}.`,
    { path, table, names },
  );
}

export function formulaWithoutValue(path: string, row: number, column: string, formula: string): ModelError {
  return new ModelError(
    "formula-without-value",
    `Row ${row}, ${column} of "${path}" holds the formula ${shown(formula)} without a value. ` +
      "Open the workbook, let it compute, and save it; formulas are not computed here.",
    { path, row, column, formula },
  );
}

export function notWritable(path: string, reason: string, remedy: string): ModelError {
  return new ModelError("not-writable", `"${path}" was not written: ${reason}. ${remedy}`, { path, reason });
}

export function notStreamable(path: string): ModelError {
  return new ModelError(
    "not-streamable",
    `"${path}" cannot be read series by series: its cells must be looked at one by one. ` +
      'Read it once and write it as Parquet: await writeRecord(await readRecord(path), "record.parquet").',
    { path },
  );
}

export function noSuchColumn(name: string, names: readonly string[], nearest: readonly string[]): ModelError {
  const hint = nearest.length > 0 ? ` Did you mean ${nearest.map((n) => `"${n}"`).join(" or ")}?` : "";
  return new ModelError(
    "no-such-column",
    `The file has no column "${name}". Its columns are ${listed(names)}.${hint}`,
    {
      name,
      names,
      nearest,
    },
  );
}
