/** One record of a delimited text file: its cells, and the line on which it starts. */
export interface CsvRecord {
  readonly cells: readonly string[];
  readonly line: number;
}

/** A quoted cell that is not closed. */
export interface UnclosedQuote {
  readonly unclosedQuoteAt: number;
}

/**
 * The records of delimited text (RFC 4180): a quoted cell may contain the delimiter, line breaks and doubled
 * quotes. Lines end with CR, LF or both. Empty lines are skipped.
 */
export function* csvRecords(
  text: string,
  delimiter: string,
): Generator<CsvRecord, UnclosedQuote | undefined> {
  let at = text.startsWith("\ufeff") ? 1 : 0;
  let line = 1;
  while (at < text.length) {
    const read = recordAt(text, at, delimiter);
    if (read === undefined) return { unclosedQuoteAt: line };
    const { cells, next, breaks } = read;
    if (cells.length > 1 || cells[0] !== "") yield { cells, line };
    line += breaks + 1;
    at = next;
  }
  return undefined;
}

/** The record at an offset: its cells, the offset of the next one, and the line breaks inside its cells. */
function recordAt(
  text: string,
  from: number,
  delimiter: string,
): { cells: string[]; next: number; breaks: number } | undefined {
  const cells: string[] = [];
  let at = from;
  let breaks = 0;
  for (;;) {
    const stop = text[at] === '"' ? endOfQuoted(text, at, delimiter) : endOfPlain(text, at, delimiter);
    if (stop < 0) return undefined;
    const cell = text.slice(at, stop);
    cells.push(unquoted(cell));
    breaks += cell.match(/\r\n|\r|\n/g)?.length ?? 0;
    if (text[stop] !== delimiter)
      return { cells, next: stop + (text.startsWith("\r\n", stop) ? 2 : 1), breaks };
    at = stop + 1;
  }
}

function unquoted(cell: string): string {
  return cell.startsWith('"') ? cell.slice(1, -1).replaceAll('""', '"') : cell;
}

function endOfPlain(text: string, from: number, delimiter: string): number {
  let at = from;
  while (at < text.length) {
    const letter = text[at]!;
    if (letter === delimiter || letter === "\n" || letter === "\r") return at;
    at++;
  }
  return at;
}

/** Offset after the closing quote, or -1 when there is none or text follows it. */
function endOfQuoted(text: string, from: number, delimiter: string): number {
  let at = from + 1;
  for (;;) {
    at = text.indexOf('"', at);
    if (at < 0) return -1;
    if (text[at + 1] !== '"') return isCellEnd(text, at + 1, delimiter) ? at + 1 : -1;
    at += 2;
  }
}

function isCellEnd(text: string, at: number, delimiter: string): boolean {
  return at >= text.length || text[at] === delimiter || text[at] === "\n" || text[at] === "\r";
}
