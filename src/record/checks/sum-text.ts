import { nearestNames } from "../../numeric/index.js";
import { identityUnread } from "./refusals.js";

/** One term of a sum: a column at the row or at the one before it, or a number. */
export interface SumTerm {
  readonly sign: 1 | -1;
  readonly column: string | undefined;
  readonly number: number;
  /** Rows back: 0, or 1 for `closing[t-1]`. */
  readonly back: 0 | 1;
}

/** What must foot: one column, and the sum it should equal. */
export interface Identity {
  readonly text: string;
  readonly column: string;
  readonly sum: readonly SumTerm[];
}

/**
 * Reads "closing = opening + interest - paid" or "opening = closing[t-1]"; names are those of the record, and the
 * longest that fits is taken.
 *
 * @throws {ModelError} `identity-unread`, with the place and the nearest names.
 */
export function identityOf(text: string, names: readonly string[]): Identity {
  const equals = text.indexOf("=");
  const column = text.slice(0, Math.max(0, equals)).trim();
  if (equals < 0 || !names.includes(column))
    throw identityUnread(text, 0, names, nearestNames(column, names));
  const longest = [...names].filter((name) => name !== "").sort((a, b) => b.length - a.length);
  const sum: SumTerm[] = [];
  let at = equals + 1;
  while (text.slice(at).trim() !== "") {
    const term = termAt(text, at, longest, sum.length === 0);
    if (term === undefined) throw unread(text, at, names);
    sum.push(term.term);
    at = term.next;
  }
  if (sum.length === 0) throw identityUnread(text, at, names, []);
  return { text, column, sum };
}

function termAt(
  text: string,
  from: number,
  names: readonly string[],
  isFirst: boolean,
): { readonly term: SumTerm; readonly next: number } | undefined {
  const signed = /^\s*([+-]?)\s*/.exec(text.slice(from))!;
  if (signed[1] === "" && !isFirst) return undefined;
  const sign = signed[1] === "-" ? -1 : 1;
  const start = from + signed[0].length;
  const name = names.find(
    (candidate) =>
      text.startsWith(candidate, start) && /^(\s*[+[-]|\s*$)/.test(text.slice(start + candidate.length)),
  );
  const number = /^\d+(\.\d+)?/.exec(text.slice(start));
  if (name === undefined && number === null) return undefined;
  const end = start + (name ?? number![0]).length;
  const back = /^\s*\[t(-1)?\]/.exec(text.slice(end));
  const term = {
    sign,
    column: name,
    number: name === undefined ? Number(number![0]) : 0,
    back: back?.[1] ? 1 : 0,
  } as const;
  return { term, next: end + (back?.[0].length ?? 0) };
}

function unread(text: string, from: number, names: readonly string[]): Error {
  const word = /[\p{L}\p{N}_][\p{L}\p{N}_ ]*/u.exec(text.slice(from))?.[0].trim() ?? "";
  return identityUnread(text, text.indexOf(word, from), names, nearestNames(word, names));
}
