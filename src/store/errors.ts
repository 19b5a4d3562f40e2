import { extname } from "node:path";
import { list, plural } from "../../kernel-helpers/wording/index.js";
import { didYouMean, ModelError } from "../numeric/index.js";

/** A text in a message: shortened, in double quotes, with visible line breaks. */
function quoteText(text: string): string {
  const line = text.replace(/\r?\n/g, "\\n");
  return `"${line.length > 60 ? `${line.slice(0, 60)}...` : line}"`;
}

const quotedNames = (names: readonly string[]): string => {
  const shown = names.slice(0, 12).map((name) => `"${name}"`);
  return names.length > 12 ? `${shown.join(", ")} and ${names.length - 12} more` : list(shown);
};

const quotedChoices = (choices: readonly string[]): string =>
  list(
    choices.map((choice) => JSON.stringify(choice)),
    "or",
  );

export function missingPathError(path: unknown): ModelError {
  return new ModelError("path-missing", 'Give the path of a file, such as "data/stock.csv".', { path });
}

export function fileNotFoundError(
  path: string,
  folder: string,
  nearest: readonly string[],
  cause: unknown,
): ModelError {
  return new ModelError(
    "no-such-file",
    `File "${path}" not found. Paths are relative to ${folder}.${didYouMean(nearest)}`,
    { path, folder, nearest },
    cause,
  );
}

export function folderGivenError(path: string): ModelError {
  return new ModelError("unreadable-file", `"${path}" is a folder. Give the path of a file in it.`, { path });
}

export function unreadableFileError(path: string, as: string, reason: string, cause?: unknown): ModelError {
  return new ModelError(
    "unreadable-file",
    `Cannot read "${path}" as ${as}: ${reason}. Check that the file is complete and that its extension matches its contents.`,
    { path, as, reason },
    cause,
  );
}

export function unknownFormatError(path: string, known: readonly string[]): ModelError {
  const extension = extname(path);
  const what = extension === "" ? "No file extension" : `Unknown file extension "${extension}"`;
  return new ModelError("format-unknown", `${what} in "${path}". Give \`format\`: ${quotedChoices(known)}.`, {
    path,
    known,
  });
}

export function noDataRowsError(path: string): ModelError {
  return new ModelError(
    "no-data-rows",
    `No data rows were found in "${path}": nothing follows its header. Check that it is the right file.`,
    { path },
  );
}

export function unclearEncodingError(path: string, line: number, text: string): ModelError {
  return new ModelError(
    "encoding-unclear",
    `Line ${line} of "${path}" is not UTF-8: ${quoteText(text)}. ` +
      'Give `encoding`, such as encoding: "windows-1252", or save the file as UTF-8.',
    { path, line, text },
  );
}

export function unknownEncodingError(path: string, encoding: string, cause: unknown): ModelError {
  return new ModelError(
    "encoding-unknown",
    `"${path}" cannot be decoded as "${encoding}". Give another \`encoding\`, such as "utf-8", "windows-1252" or "utf-16le".`,
    { path, encoding },
    cause,
  );
}

export function unclearDelimiterError(
  path: string,
  header: string,
  candidates: readonly string[],
): ModelError {
  return new ModelError(
    "delimiter-unclear",
    `Cannot detect the delimiter of "${path}" from its first line ${quoteText(header)}. ` +
      `Give \`delimiter\`: ${quotedChoices(candidates)}.`,
    { path, header, candidates },
  );
}

export function raggedRowError(
  path: string,
  row: number,
  line: number,
  found: number,
  expected: number,
): ModelError {
  return new ModelError(
    "ragged-row",
    `Row ${row} (line ${line}) of "${path}" has ${plural(found, "cell")}; the header has ${expected}. ` +
      "Quote cells that contain the delimiter. If there are lines above the header, give `skip`: the number of lines.",
    { path, row, line, found, expected },
  );
}

export function unclosedQuoteError(path: string, line: number): ModelError {
  return new ModelError(
    "unended-quote",
    `The quoted cell that starts on line ${line} of "${path}" is not closed. Close it; write a quote inside a cell as two quotes.`,
    { path, line },
  );
}

export function missingHeaderError(path: string, cells: readonly string[]): ModelError {
  return new ModelError(
    "header-missing",
    `The first row of "${path}" has numbers instead of column names: ${cells.slice(0, 6).join(", ")}. ` +
      'Add a header row, or give header: false; the columns are then called "column 1", "column 2" and so on.',
    { path, cells },
  );
}

export function unclearDecimalSignError(row: number, column: string, cell: string): ModelError {
  return new ModelError(
    "decimal-sign-unclear",
    `Row ${row}, ${column}: the decimal sign of "${cell}" is unclear. Give decimal: "," or decimal: ".".`,
    { row, column, value: cell },
  );
}

export function ambiguousDateError(row: number, column: string, cell: string): ModelError {
  return new ModelError(
    "ambiguous-date",
    `Row ${row}, ${column}: the date "${cell}" is ambiguous. ` +
      'Give dates: "day-month-year" or dates: "month-day-year"; dates: "text" leaves the column unchanged.',
    { row, column, value: cell },
  );
}

export function mixedDatesError(row: number, column: string, cell: string, order: string): ModelError {
  return new ModelError(
    "mixed-dates",
    `Row ${row}, ${column}: "${cell}" is not a date in the order ${order} of the other rows. ` +
      'Correct the row, or give dates: "text" to leave the column unchanged.',
    { row, column, value: cell, order },
  );
}

export function unclearTableError(path: string, names: readonly string[]): ModelError {
  const problem =
    names.length === 0
      ? "has no tables. Check that it is the right file."
      : `has several tables: ${quotedNames(names)}. Choose one, such as table: ${JSON.stringify(names[0])}.`;
  return new ModelError("table-unclear", `"${path}" ${problem}`, { path, names });
}

export function tableNotFoundError(path: string, table: string, names: readonly string[]): ModelError {
  const others = names.length === 0 ? "It has none." : `It has ${quotedNames(names)}.`;
  return new ModelError("no-such-table", `"${path}" has no table "${table}". ${others}`, {
    path,
    table,
    names,
  });
}

export function formulaWithoutValueError(
  path: string,
  row: number,
  column: string,
  formula: string,
): ModelError {
  return new ModelError(
    "formula-without-value",
    `Row ${row}, ${column} of "${path}" is the formula ${quoteText(formula)} without a saved value. ` +
      "Open the workbook in a spreadsheet program, recalculate it and save it.",
    { path, row, column, formula },
  );
}

export function notWritableError(path: string, reason: string, remedy: string): ModelError {
  return new ModelError("not-writable", `Cannot write "${path}": ${reason}. ${remedy}`, { path, reason });
}

export function notStreamableError(path: string): ModelError {
  return new ModelError(
    "not-streamable",
    `"${path}" cannot be streamed by series, because its cells have to be read one by one. ` +
      `Convert it once: await writeRecord(await readRecord(${JSON.stringify(path)}), "record.parquet").`,
    { path },
  );
}

export function columnNotFoundError(
  name: string,
  names: readonly string[],
  nearest: readonly string[],
): ModelError {
  return new ModelError(
    "no-such-column",
    `The file has no column "${name}". It has ${quotedNames(names)}.${didYouMean(nearest)}`,
    { name, names, nearest },
  );
}
