/** Representations of a value by MIME type; `text/plain` is always present. */
export type MimeBundle = Readonly<Record<string, string | object>>;

/** A value that displays itself has a method of this name: `[showsItself](): MimeBundle | Promise<MimeBundle>`. */
export const mimeBundleMethod: unique symbol = Symbol.for("mime-bundle") as never;
