import { inspect } from "node:util";
import { type MimeBundle, mimeBundleMethod } from "../mime-bundle.js";

/** The representations of a value: its own if it displays itself, otherwise the text that Node would print. */
export function valueBundle(value: unknown): MimeBundle | Promise<MimeBundle> {
  const shown = ownBundle(value);
  if (shown === undefined) return { "text/plain": textOf(value) };
  if (shown instanceof Promise) return shown.then((bundle) => withText(bundle, value));
  return withText(shown, value);
}

/** Adds the text form that every bundle must have, derived from its other forms. */
export function withText(bundle: MimeBundle, value?: unknown): MimeBundle {
  if (typeof bundle["text/plain"] === "string") return bundle;
  const text = bundle["text/markdown"] ?? bundle["text/latex"];
  if (typeof text === "string") return { ...bundle, "text/plain": text };
  return {
    ...bundle,
    "text/plain": value === undefined ? `[${Object.keys(bundle).join(", ")}]` : textOf(value),
  };
}

function ownBundle(value: unknown): MimeBundle | Promise<MimeBundle> | undefined {
  if ((typeof value !== "object" && typeof value !== "function") || value === null) return undefined;
  const method: unknown = Reflect.get(value, mimeBundleMethod);
  if (typeof method !== "function") return undefined;
  const shown: unknown = method.call(value);
  // A bundle is an object by contract; anything else means that the value does not display itself.
  return typeof shown === "object" && shown !== null
    ? (shown as MimeBundle | Promise<MimeBundle>)
    : undefined;
}

function textOf(value: unknown): string {
  return inspect(value, { depth: 4, maxArrayLength: 100, breakLength: 100 });
}
