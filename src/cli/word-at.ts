/** The word around a position: its span, and the part before the position. */
export interface Word {
  readonly text: string;
  readonly before: string;
  readonly start: number;
  readonly end: number;
}

export function wordAt(text: string, position: number): Word {
  const before = /[\p{L}_][\p{L}\p{N}_]*$/u.exec(text.slice(0, position))?.[0] ?? "";
  const after = /^[\p{L}\p{N}_]*/u.exec(text.slice(position))?.[0] ?? "";
  return { text: before + after, before, start: position - before.length, end: position + after.length };
}
