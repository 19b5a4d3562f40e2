/** What is shown of a value: one representation a MIME type, `text/plain` always among them. */
export type MimeBundle = Readonly<Record<string, string | object>>;

/** A value that shows itself has a method of this name: `[showsItself](): MimeBundle | Promise<MimeBundle>`. */
export const showsItself: unique symbol = Symbol.for("mime-bundle") as never;
