import { freezeDeep } from "../../src/numeric/index.js";

/** What is shown of a value: one representation a MIME type, `text/plain` always among them. */
export type Bundle = Readonly<Record<string, string | object>>;

/** The name of the method by which a value shows itself; the kernel looks for it. */
const shows: unique symbol = Symbol.for("mime-bundle") as never;

/**
 * Gives a result a way to show itself that no listing, copy or comparison of it sees, and freezes it to its last part.
 *
 * The result is not copied: what is kept beside an object (a rule's graph and code) is found again under the same one.
 *
 * @param result - a plain object; one that shows itself already, or that somebody froze before, is left as it is.
 * @param bundle - makes the representations when a front end asks, not before.
 * @returns the same object, frozen.
 * @example showing({ kind: "note", text: "two gaps" }, () => ({ "text/plain": "two gaps" }));
 */
export function showing<T extends object>(result: T, bundle: () => Bundle | Promise<Bundle>): Readonly<T> {
  if (!Object.hasOwn(result, shows) && Object.isExtensible(result))
    Object.defineProperty(result, shows, { value: bundle });
  return freezeDeep(result);
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
