/**
 * The one error class of the engine: something asked for cannot be answered as it was asked.
 *
 * `code` is kebab-case and stable; tests and callers tell errors apart by `name` and `code`, not by
 * `instanceof`, because a cell may hold another copy of the package. `facts` holds the values that the
 * message mentions. Each room keeps the functions that word its own errors in `refusals.ts`.
 */
export class ModelError extends Error {
  override readonly name = "ModelError";
  readonly code: string;
  readonly facts: Readonly<Record<string, unknown>>;

  constructor(code: string, message: string, facts: Readonly<Record<string, unknown>> = {}, cause?: unknown) {
    super(message, cause === undefined ? undefined : { cause });
    this.code = code;
    this.facts = facts;
  }
}
