/** A correction that the analyst chose: what was there, what is used instead, why, and who said so. */
export interface Decision {
  /** 1-based row of the record, header not counted. */
  readonly row: number;
  /** "" when the whole row is left out. */
  readonly column: string;
  /** The value as it was read. */
  readonly was: unknown;
  /** The value used instead; null means that the cell (or the row) is left out as missing. */
  readonly now: unknown;
  readonly why: string;
  /** "" when not stated. */
  readonly who: string;
}
