/** What is shown of a value: one representation a MIME type, `text/plain` always among them. */
export type Bundle = Readonly<Record<string, string | object>>;

/** The name of the method by which a value shows itself; the kernel looks for it. */
const shows: unique symbol = Symbol.for("mime-bundle") as never;

/**
 * Freezes a result and gives it a way to show itself that no listing, copy or comparison of it sees.
 *
 * @param result - a plain object; an object already frozen cannot be given the method.
 * @param bundle - makes the representations when a front end asks, not before.
 * @returns the same object, frozen.
 * @example showing({ kind: "note", text: "two gaps" }, () => ({ "text/plain": "two gaps" }));
 */
export function showing<T extends object>(result: T, bundle: () => Bundle | Promise<Bundle>): Readonly<T> {
  Object.defineProperty(result, shows, { value: bundle, enumerable: false });
  return Object.freeze(result);
}

/**
 * The representations of a value that shows itself.
 *
 * @returns the bundle, or undefined when the value has no way to show itself.
 */
export async function bundleOf(value: unknown): Promise<Bundle | undefined> {
  if (typeof value !== "object" || value === null) return undefined;
  const method = (value as { [shows]?: () => Bundle | Promise<Bundle> })[shows];
  return typeof method === "function" ? await method.call(value) : undefined;
}
