/**
 * Something the kernel or its client cannot do as asked: a broken connection file, a kernel that does not
 * start, a notebook that is not one. `code` is kebab-case and stable; `facts` holds what the message mentions.
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
