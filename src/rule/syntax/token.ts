/** A half-open range of UTF-16 offsets into the rule's text. */
export interface Span {
  readonly start: number;
  readonly end: number;
}

/** One word, number or symbol of a rule's text. `text` is canonical: a Unicode minus reads "-". */
export interface Token extends Span {
  readonly kind: "number" | "name" | "sign" | "newline" | "end";
  readonly text: string;
}
