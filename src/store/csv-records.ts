/** One record of a text file: its cells, and the line on which it begins. */
export interface CsvRecord {
  readonly cells: readonly string[];
  readonly line: number;
}

/** A quoted cell that the end of the text leaves open. */
export interface UnendedQuote {
  readonly unendedQuoteAt: number;
}

/**
 * The records of delimited text (RFC 4180): a quoted cell may hold the delimiter, line breaks and doubled
 * quotes. Lines end with CR, LF or both. Empty lines are passed over, as in every reader of such files.
 */
export function* csvRecords(text: string, delimiter: string): Generator<CsvRecord, UnendedQuote | undefined> {
  let at = text.startsWith("\ufeff") ? 1 : 0;
  let line = 1;
  while (at < text.length) {
    const begun = line;
    const cells: string[] = [];
    let ended = false;
    while (!ended) {
      const quoted = text[at] === '"';
      const stop = quoted ? endOfQuoted(text, at) : endOfPlain(text, at, delimiter);
      if (stop < 0) return { unendedQuoteAt: line };
      const cell = quoted ? text.slice(at + 1, stop - 1).replaceAll('""', '"') : text.slice(at, stop);
      if (quoted) line += cell.match(/\r\n|\r|\n/g)?.length ?? 0;
      cells.push(cell);
      at = stop;
      if (text[at] === delimiter) at++;
      else ended = true;
    }
    at += text.startsWith("\r\n", at) ? 2 : 1;
    line++;
    if (cells.length > 1 || cells[0] !== "") yield { cells, line: begun };
  }
  return undefined;
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

/** Place after the closing quote, or -1. What follows a closing quote up to the delimiter is refused as open. */
function endOfQuoted(text: string, from: number): number {
  let at = from + 1;
  for (;;) {
    at = text.indexOf('"', at);
    if (at < 0) return -1;
    if (text[at + 1] !== '"') return at + 1;
    at += 2;
  }
}
