/** Something seen in a record: what, where, and what was done about it. Never an alteration by itself. */
export interface Finding {
  /** Kebab-case and stable: "gap", "duplicate-period", "missing-value", ... */
  readonly kind: string;
  /** 1-based row of the record, header not counted; undefined when the finding is of the whole record. */
  readonly row: number | undefined;
  readonly column: string;
  /** The value as it was read. */
  readonly value: string;
  /** A whole sentence. */
  readonly message: string;
  /** What was done: "kept", "left out", "used as a two-step pair", ... */
  readonly done: string;
}
