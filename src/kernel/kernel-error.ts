/**
 * An error of the kernel or its client: a broken connection file, a kernel that does not start, an invalid notebook.
 * `code` is kebab-case and stable; `facts` has the values that the message mentions.
 */
export class KernelError extends Error {
  override readonly name = "KernelError";
  readonly code: string;
  readonly facts: Readonly<Record<string, unknown>>;

  constructor(code: string, message: string, facts: Readonly<Record<string, unknown>> = {}, cause?: unknown) {
    super(message, cause === undefined ? undefined : { cause });
    this.code = code;
    this.facts = facts;
  }
}
