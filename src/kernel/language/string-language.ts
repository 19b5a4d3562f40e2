/** An error in the text of a string. Positions are UTF-16 units into that text. */
export interface StringDiagnostic {
  readonly start: number;
  readonly end: number;
  readonly text: string;
}

/** A completion of the word before the cursor. */
export interface StringCompletion {
  readonly text: string;
  /** Its kind, in one word: "function", "parameter", "rule". */
  readonly kind: string;
}

/**
 * Services for a language inside strings of cells. The kernel has none itself; its caller registers them.
 */
export interface StringLanguage {
  /** Whether the string that is argument `argument` of a call of `callee` is in this language. */
  readonly matches: (callee: string, argument: number) => boolean;
  readonly complete: (
    text: string,
    position: number,
  ) => { start: number; end: number; items: readonly StringCompletion[] };
  /** Markdown about the word at the position. */
  readonly inspect: (text: string, position: number) => string | undefined;
  /**
   * Errors in the text. `others` are the arguments after it; an argument that is not a literal is undefined.
   */
  readonly check: (text: string, others: readonly unknown[]) => readonly StringDiagnostic[];
}
