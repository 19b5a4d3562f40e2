/** What is said of a span of a text inside a string. Positions are UTF-16 units into that text. */
export interface StringComplaint {
  readonly start: number;
  readonly end: number;
  readonly text: string;
}

/** One offer to complete the word before the cursor. */
export interface StringCompletion {
  readonly text: string;
  /** What it is, in one word: "function", "parameter", "rule". */
  readonly kind: string;
}

/**
 * Services for a language that is written inside a string of a cell. The kernel knows none itself; whoever
 * starts it registers them.
 */
export interface StringLanguage {
  /** Whether the string that is argument `argument` of a call of `callee` is in this language. */
  readonly matches: (callee: string, argument: number) => boolean;
  readonly complete: (
    text: string,
    position: number,
  ) => { start: number; end: number; items: readonly StringCompletion[] };
  /** Markdown about what stands at the position. */
  readonly inspect: (text: string, position: number) => string | undefined;
  /**
   * What is wrong with the text. `others` are the arguments of the call after it, as far as they are written out:
   * what is not a literal is undefined.
   */
  readonly check: (text: string, others: readonly unknown[]) => readonly StringComplaint[];
}
