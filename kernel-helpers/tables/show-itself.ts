/** Representations of a value by MIME type; `text/plain` is always present. */
export type Bundle = Readonly<Record<string, string | object>>;

/** Method by which a value displays itself; the kernel calls it. */
const shows: unique symbol = Symbol.for("mime-bundle") as never;

/**
 * Freezes a result and adds a hidden display method, which listings, copies and comparisons ignore.
 *
 * @param result - a plain object that is not frozen yet.
 * @param bundle - creates the representations; called only when a front end displays the result.
 * @returns the same object, frozen.
 * @example showing({ kind: "note", text: "two gaps" }, () => ({ "text/plain": "two gaps" }));
 */
export function showing<T extends object>(result: T, bundle: () => Bundle | Promise<Bundle>): Readonly<T> {
  Object.defineProperty(result, shows, { value: bundle, enumerable: false });
  return Object.freeze(result);
}

/**
 * The representations of a value that displays itself.
 *
 * @returns the bundle; undefined when the value has no display method.
 */
export async function bundleOf(value: unknown): Promise<Bundle | undefined> {
  if (typeof value !== "object" || value === null) return undefined;
  const method = (value as { [shows]?: () => Bundle | Promise<Bundle> })[shows];
  return typeof method === "function" ? await method.call(value) : undefined;
}
