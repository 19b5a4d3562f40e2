/** Something a reader must know about a result; kept in the result and shown in every table of it. */
export interface Warning {
  /** Kebab-case and stable. */
  readonly code: string;
  /** A whole sentence: what, where, what to do. */
  readonly message: string;
}
