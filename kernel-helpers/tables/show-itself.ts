import { freezeDeep } from "../../src/numeric/index.js";

/** Representations of a value by MIME type; `text/plain` is always present. */
export type Bundle = Readonly<Record<string, string | object>>;

/** Method by which a value displays itself; the kernel calls it. */
const shows: unique symbol = Symbol.for("mime-bundle") as never;

/**
 * Adds a hidden display method to a result, which listings, copies and comparisons ignore, and freezes it deeply.
 *
 * The result is not copied: what is kept beside an object (a rule's graph and code) is found again under the same one.
 *
 * @param result - a plain object; one that has a display method, or is frozen already, stays as it is.
 * @param bundle - creates the representations; called only when a front end displays the result.
 * @returns the same object, frozen.
 * @example showing({ kind: "note", text: "two gaps" }, () => ({ "text/plain": "two gaps" }));
 */
export function showing<T extends object>(result: T, bundle: () => Bundle | Promise<Bundle>): Readonly<T> {
  if (!Object.hasOwn(result, shows) && Object.isExtensible(result))
    Object.defineProperty(result, shows, { value: bundle });
  return freezeDeep(result);
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
